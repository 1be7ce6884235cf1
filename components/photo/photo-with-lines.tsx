import type { PhotoLines } from '@/lib/science/photo-lines'
import { lineNames, lineOrder, type Line } from './lines'
import { PictureLabel } from './picture-label'

type Props = {
  src: string
  alt: string
  width: number
  height: number
  lines: PhotoLines
  axisX: number
  tiltDegrees: number
  /** The line in hand. */
  picked?: Line
  /** Where it is too small for words. */
  isUnnamed?: boolean
}

/** A photo under its four lines, each named at its end. */
export function PhotoWithLines({
  src,
  alt,
  width,
  height,
  lines,
  axisX,
  tiltDegrees,
  picked,
  isUnnamed,
}: Props) {
  const slope = Math.tan((tiltDegrees * Math.PI) / 180)
  const at = (line: Line, x: number) => lines[line] - (x - axisX) * slope
  return (
    <>
      {/* eslint-disable-next-line @next/next/no-img-element -- in memory, or served through a permission check */}
      <img src={src} alt={alt} className="block h-auto w-full select-none" draggable={false} />
      <svg viewBox={`0 0 ${width} ${height}`} className="absolute inset-0 h-full w-full" aria-hidden>
        {lineOrder.map((line) => (
          <g key={line}>
            {(['halo', 'line'] as const).map((kind) => (
              <line
                key={kind}
                x1={0}
                y1={at(line, 0)}
                x2={width}
                y2={at(line, width)}
                stroke={kind === 'halo' ? '#FFFFFF' : '#0E1D17'}
                strokeWidth={(kind === 'halo' ? 4 : 1.5) + (line === picked ? 2 : 0)}
                vectorEffect="non-scaling-stroke"
              />
            ))}
          </g>
        ))}
      </svg>
      {isUnnamed ? null : (
        <svg className="absolute inset-0 h-full w-full" aria-hidden>
          {lineOrder.map((line) => (
            <PictureLabel
              key={line}
              {...{ width, height }}
              x={width}
              y={at(line, width)}
              dy={line === 'fillTop' || line === 'bottomEdge' ? '-0.4em' : '1.05em'}
              anchor="end"
              isBold={line === picked}
            >
              {lineNames[line]}
            </PictureLabel>
          ))}
        </svg>
      )}
    </>
  )
}
