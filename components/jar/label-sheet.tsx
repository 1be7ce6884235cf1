import type { CSSProperties } from 'react'
import { labelPlace, labelsPerSheet, papers, type LabelGrid } from '@/lib/label/rules/grid'
import { Drawn } from '../marks/drawn'
import { pointsPerMm, labelShapes, type Label } from './label-shapes'

/** A label is paper in either theme: a scanner wants black on white. */
const paperInk = { '--ink': '#000', background: '#fff', color: '#000' } as CSSProperties

/** One sheet as it leaves the printer, true to scale; on screen with the cuts that the sheet has already. */
export function LabelSheet({
  grid,
  labels,
  name,
}: {
  grid: LabelGrid
  labels: { index: number; item: Label }[]
  name: string
}) {
  const { widthMm, heightMm } = papers[grid.paper]
  return (
    <svg
      viewBox={`0 0 ${widthMm * pointsPerMm} ${heightMm * pointsPerMm}`}
      role="group"
      aria-label={name}
      className="label-sheet block w-full border border-hair"
      style={
        { ...paperInk, '--sheet-width': `${widthMm}mm`, '--sheet-height': `${heightMm}mm` } as CSSProperties
      }
      data-paper={grid.paper}
    >
      <Cuts grid={grid} />
      {labels.map(({ index, item }) => {
        const { square, words } = labelShapes(grid, index, item)
        return (
          <g key={item.id}>
            <g role="img" aria-label={`Square of jar ${item.jarCode}`}>
              <Drawn shapes={square} />
            </g>
            <Drawn shapes={words} />
          </g>
        )
      })}
    </svg>
  )
}

/** Outlines of all labels of a sheet, without what is printed on them. */
export function Cuts({ grid }: { grid: LabelGrid }) {
  return (
    <g data-screen-only>
      {Array.from({ length: labelsPerSheet(grid) }, (_, index) => {
        const { xMm, yMm } = labelPlace(grid, index)
        return (
          <rect
            key={index}
            x={xMm * pointsPerMm}
            y={yMm * pointsPerMm}
            width={grid.widthMm * pointsPerMm}
            height={grid.heightMm * pointsPerMm}
            rx={3}
            fill="none"
            stroke="#a9bbb0"
            strokeWidth={0.6}
          />
        )
      })}
    </g>
  )
}
