import { Drawn } from './drawn'
import { standingShapes, type Standing } from './standing-shapes'

const inRow = 25
const size = 20
const pitch = 24
const rowPitch = 30

/** A hundred jars on four shelves, of which so many stand otherwise: a share that can be counted. */
export function Hundred({
  count,
  as,
  rest,
  title,
}: {
  count: number
  as: Standing
  rest: Standing
  title: string
}) {
  const width = inRow * pitch
  const height = 4 * rowPitch
  const of = {
    [as]: standingShapes({ standing: as, size }),
    [rest]: standingShapes({ standing: rest, size }),
  }
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={title}
      className="block h-auto w-full max-w-[600px]"
    >
      {Array.from({ length: 4 }, (_, row) => (
        <g key={row}>
          {Array.from({ length: inRow }, (_, i) => (
            <g key={i} transform={`translate(${(i + 0.5) * pitch} ${row * rowPitch + size + 4})`}>
              <Drawn shapes={of[row * inRow + i < count ? as : rest]!} />
            </g>
          ))}
          <line
            x1={0}
            x2={width}
            y1={row * rowPitch + size + 5}
            y2={row * rowPitch + size + 5}
            style={{ stroke: 'var(--ink)' }}
            strokeWidth={1.25}
          />
        </g>
      ))}
    </svg>
  )
}
