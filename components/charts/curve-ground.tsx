import type { CurveInput, CurvePlace } from './curve-data'
import { washes } from './curve-geometry'
import type { CurveScale } from './curve-geometry'

/** What lies under the lines of a plot: paper within the band, wash outside, the scale's hairlines. */
export function CurveGround({
  input,
  scale,
  place,
}: {
  input: CurveInput
  scale: CurveScale
  place: CurvePlace
}) {
  const width = place.right - place.left
  const box = (low: number, high: number) => ({
    x: place.left,
    y: place.y(high),
    width,
    height: place.y(low) - place.y(high),
  })
  return (
    <svg width={place.right} height={place.bottom} className="absolute inset-0" aria-hidden>
      <rect {...box(0, 1)} fill="var(--paper)" />
      {washes(input.band, scale).map(([low, high]) => (
        <rect key={low} {...box(low, high)} fill="var(--wash)" />
      ))}
      {scale.ticks.map(({ share }) => (
        <path key={share} d={`M${place.left} ${place.y(share)}H${place.right}`} stroke="var(--hair)" />
      ))}
      {scale.gap ? <rect {...box(scale.gap.from, scale.gap.to)} fill="var(--ground)" /> : null}
      {scale.isFromZero ? (
        <path d={`M${place.left} ${place.y(0)}H${place.right}`} stroke="var(--ink)" strokeWidth={1.75} />
      ) : null}
    </svg>
  )
}
