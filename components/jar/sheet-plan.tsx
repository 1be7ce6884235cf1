import { gridName, papers, type LabelGrid } from '@/lib/label/rules/grid'
import { labelLayout } from '@/lib/label/rules/layout'
import { Cuts } from './label-sheet'
import { pointsPerMm } from './label-shapes'

/** A sheet's cuts to scale, and how large the square on each label becomes. */
export function SheetPlan({ grid }: { grid: LabelGrid }) {
  const { widthMm, heightMm } = papers[grid.paper]
  const layout = labelLayout(grid)
  return (
    <div className="flex items-end gap-4">
      <svg
        viewBox={`0 0 ${widthMm * pointsPerMm} ${heightMm * pointsPerMm}`}
        className="h-[150px] border border-rule bg-white"
        role="img"
        aria-label={`Cuts of ${gridName(grid)}`}
      >
        <Cuts grid={grid} />
      </svg>
      {layout ? (
        <p className="text-14 text-soft">
          {grid.columns * grid.rows} labels; the square is {layout.square.sideMm.toFixed(1)} mm with its white
          border, each module {layout.moduleMm.toFixed(2)} mm.
        </p>
      ) : null}
    </div>
  )
}
