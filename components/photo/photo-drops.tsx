import { lengthOf, type Stretch } from '@/lib/science/photo-drops'
import type { Place } from './mark-picture'

type Props = {
  src: string
  alt: string
  width: number
  height: number
  /** Its ends, as far as they are set. */
  bar: Stretch | null
  drops: readonly Stretch[]
  /** A first end that waits for its second, and where the next point would stand. */
  pending?: Place | null
  cross?: Place
}

/** A microscope photo under its scale bar and a circle on each drop, numbered as in the list. */
export function PhotoDrops({ src, alt, width, height, bar, drops, pending, cross }: Props) {
  const text = Math.max(width, height) / 50
  const arm = text * 0.7
  return (
    <>
      {/* eslint-disable-next-line @next/next/no-img-element -- in memory, or served through a permission check */}
      <img src={src} alt={alt} className="block h-auto w-full select-none" draggable={false} />
      <svg viewBox={`0 0 ${width} ${height}`} className="absolute inset-0 h-full w-full" aria-hidden>
        {(['#FFFFFF', '#0E1D17'] as const).map((colour, i) => (
          <g
            key={colour}
            fill="none"
            stroke={colour}
            strokeWidth={i === 0 ? 4.5 : 2}
            style={{ vectorEffect: 'non-scaling-stroke' }}
          >
            {bar ? (
              <path
                vectorEffect="non-scaling-stroke"
                d={`M${bar.x1} ${bar.y1}L${bar.x2} ${bar.y2}${tick(bar.x1, bar.y1, bar, arm)}${tick(bar.x2, bar.y2, bar, arm)}`}
              />
            ) : null}
            {drops.map((drop, index) => (
              <g key={index}>
                <circle
                  vectorEffect="non-scaling-stroke"
                  cx={(drop.x1 + drop.x2) / 2}
                  cy={(drop.y1 + drop.y2) / 2}
                  r={lengthOf(drop) / 2}
                />
                <path vectorEffect="non-scaling-stroke" d={`M${drop.x1} ${drop.y1}L${drop.x2} ${drop.y2}`} />
              </g>
            ))}
            {pending ? (
              <circle vectorEffect="non-scaling-stroke" cx={pending.x} cy={pending.y} r={arm / 2} />
            ) : null}
            {cross ? (
              <path
                vectorEffect="non-scaling-stroke"
                d={`M${cross.x - 2 * arm} ${cross.y}h${4 * arm}M${cross.x} ${cross.y - 2 * arm}v${4 * arm}`}
              />
            ) : null}
          </g>
        ))}
        {drops.map(({ x1, y1, x2, y2 }, index) => (
          <text
            key={index}
            x={(x1 + x2) / 2}
            y={(y1 + y2) / 2 - text * 0.3}
            fontSize={text}
            fontWeight={650}
            textAnchor="middle"
            stroke="#FFFFFF"
            strokeWidth={text / 4}
            paintOrder="stroke"
            style={{ fill: '#0E1D17' }}
          >
            {index + 1}
          </text>
        ))}
      </svg>
    </>
  )
}

/** Across the bar's end. */
function tick(x: number, y: number, bar: Stretch, arm: number): string {
  const { x1, y1, x2, y2 } = bar
  const length = Math.max(1, lengthOf(bar))
  const [dx, dy] = [(-(y2 - y1) / length) * arm, ((x2 - x1) / length) * arm]
  return `M${x - dx} ${y - dy}L${x + dx} ${y + dy}`
}
