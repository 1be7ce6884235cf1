import { heatWeight } from '../marks/heat'
import type { CurvePlace } from './curve-data'
import { colourRole, curveName, spreadNames } from './curve-geometry'
import type { PlottedCurve } from './curve-geometry'
import { halo } from './halo'

/** Width of a name in the 17 px it is set in, near enough to keep it off today's line. */
const NAME_LETTER = 8.6

export function CurveNames({
  curves,
  place,
  today,
  behind,
}: {
  curves: PlottedCurve[]
  place: CurvePlace
  today: number | null
  behind: (share: number) => string
}) {
  const named = curves.filter(({ measured }) => measured.length > 0)
  return (['edge', 'after'] as const).flatMap((side) => {
    const group = named.filter(({ name }) => name.side === side)
    const ys = spreadNames(
      group.map(({ name }) => place.y(name.share) + (side === 'edge' ? -9 : 5)),
      19,
      place.top + 18,
      place.bottom - 5,
    )
    return group.map(({ series, name }, index) => {
      const length = `${curveName(series)} ${series.standing}`.length * NAME_LETTER
      const x = side === 'edge' ? place.right - 8 : afterX(place, name.weeks, length, today)
      const y = ys[index] ?? 0
      return (
        <text
          key={series.id}
          x={x}
          y={y}
          fontSize={17}
          textAnchor={side === 'edge' ? 'end' : 'start'}
          style={{
            fill: `var(--${colourRole(series)})`,
            ...halo(behind((place.bottom - y + 6) / (place.bottom - place.top))),
          }}
        >
          <tspan fontWeight={series.kind === 'batch' ? 600 : heatWeight(series.temperatureC)}>
            {curveName(series)}
          </tspan>
          <tspan fontWeight={colourRole(series) === 'alarm' ? 600 : 430}> {series.standing}</tspan>
        </text>
      )
    })
  })
}

/** A name follows its latest reading; where today's line would cross it, it stands before the reading. */
function afterX(place: CurvePlace, weeks: number, length: number, today: number | null): number {
  const x = place.x(weeks) + 14
  const crosses = today !== null && x < place.x(today) && x + length > place.x(today) - 4
  const before = place.x(weeks) - 16 - length
  if ((crosses || x + length > place.right - 6) && before > place.left) return before
  return Math.min(x, place.right - length - 6)
}
