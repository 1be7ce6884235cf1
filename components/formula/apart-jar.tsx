import { Drawn } from '@/components/marks/drawn'
import type { Point, Shape } from '@/components/marks/shape'
import { dots, stripes } from '@/components/marks/texture'
import type { Amounts } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'

type Props = { amounts: (Amounts & { id: string })[]; emulsionType: EmulsionType }

const wide = 64
const high = 560

/** The jar if it all came apart: each line a layer of its own volume, oil above, water below. */
export function ApartJar({ amounts, emulsionType }: Props) {
  const isWater = (line: Amounts) => line.isInternal === (emulsionType !== 'oil-in-water')
  const volume = amounts.reduce((sum, line) => sum + line.percentThousandths / line.density, 0)
  const share = (line: Amounts) => (volume ? (line.percentThousandths / line.density / volume) * high : 0)
  const ordered = [...amounts.filter((line) => !isWater(line)), ...amounts.filter(isWater)]
  const oilHeight = ordered.filter((line) => !isWater(line)).reduce((sum, line) => sum + share(line), 0)
  return (
    <figure className="hidden w-[76px] shrink-0 lg:block">
      <svg
        viewBox={`-6 -18 ${wide + 12} ${high + 26}`}
        width={wide + 12}
        height={high + 26}
        role="img"
        aria-label={`Oil ${((100 * oilHeight) / high).toFixed(1)} %, water ${(100 - (100 * oilHeight) / high).toFixed(1)} % of the volume`}
      >
        {volume ? <Drawn shapes={layers(oilHeight)} /> : null}
        {volume ? <Drawn shapes={edges(ordered.map(share))} /> : null}
        <path
          d={`M0 -16V${high - 4}Q0 ${high + 2} 6 ${high + 2}H${wide - 6}Q${wide} ${high + 2} ${wide} ${high - 4}V-16`}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="3"
        />
      </svg>
      <figcaption className="mt-1 text-13 text-soft">
        The jar if it all came apart: each line a layer, by volume
      </figcaption>
    </figure>
  )
}

function layers(oilHeight: number): Shape[] {
  const water: Point[] = [
    [0, oilHeight],
    [wide, oilHeight],
    [wide, high],
    [0, high],
  ]
  return [
    { kind: 'rect', x: 0, y: 0, w: wide, h: oilHeight, fill: 'oil' },
    { kind: 'path', steps: dots({ left: 0, right: wide, top: 0, bottom: oilHeight }, 9, 1.35), fill: 'dot' },
    { kind: 'rect', x: 0, y: oilHeight, w: wide, h: high - oilHeight, fill: 'water' },
    { kind: 'path', steps: stripes(water, 8, 5.2, 'rising'), fill: 'cream' },
    { kind: 'line', x1: 0, x2: wide, y1: oilHeight, y2: oilHeight, stroke: 'ink', width: 3 },
  ]
}

function edges(heights: number[]): Shape[] {
  let y = 0
  return heights.slice(0, -1).map((height) => {
    y += height
    return { kind: 'line', x1: 0, x2: wide, y1: y, y2: y, stroke: 'dot', width: 1 }
  })
}
