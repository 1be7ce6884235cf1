import { highInternalPhaseAbove } from '@/lib/science/phase-fraction'
import { joining } from '@/lib/science/volume-share'

type Props = {
  lines: { targetG: number; density: number; isInternal: boolean }[]
  minutes: number | null
}

const wide = 260
const high = 110

/** How full the emulsion gets while the inner phase goes in evenly, and from when its drops are packed. */
export function JoiningCurve({ lines, minutes }: Props) {
  const portions = (isInternal: boolean) =>
    lines
      .filter((line) => line.isInternal === isInternal)
      .map((line) => ({ mass: line.targetG, density: line.density }))
  const curve = joining(portions(true), portions(false))
  if (!curve) return null
  const { fractionAt: at, packedShare } = curve
  const end = at(1)
  const x = (share: number) => share * wide
  const y = (fraction: number) => high - fraction * high
  const points = Array.from({ length: 41 }, (_, index) => index / 40)
  const isPacked = packedShare < 1
  const ending = `${(100 * end).toFixed(1)} % inside at the end`
  const from =
    minutes === null
      ? `after ${Math.round(100 * packedShare)} % of it`
      : `from minute ${Math.round(packedShare * minutes)}`
  return (
    <figure>
      <svg
        viewBox={`-30 -8 ${wide + 40} ${high + 32}`}
        className="h-auto w-full max-w-[300px]"
        role="img"
        aria-label={isPacked ? `Drops are packed ${from}; ${ending}` : ending}
      >
        <path d={`M0 0V${high}H${wide}`} fill="none" stroke="var(--ink)" strokeWidth="2" />
        <path d={`M0 ${y(highInternalPhaseAbove)}H${wide}`} stroke="var(--ink)" strokeWidth="1.5" />
        <text x={-4} y={y(highInternalPhaseAbove) + 5} fontSize="14" textAnchor="end" fontWeight="650">
          74
        </text>
        <path
          d={points.map((share, index) => `${index ? 'L' : 'M'}${x(share)} ${y(at(share))}`).join('')}
          fill="none"
          stroke="var(--water)"
          strokeWidth="4"
        />
        {isPacked ? (
          <>
            <path d={`M${x(packedShare)} ${y(highInternalPhaseAbove)}V${high}`} stroke="var(--ink)" />
            <circle cx={x(packedShare)} cy={y(highInternalPhaseAbove)} r="5" fill="var(--ink)" />
          </>
        ) : null}
        <text x={wide} y={high + 18} fontSize="14" textAnchor="end">
          {minutes === null ? 'all in' : `${minutes} min`}
        </text>
      </svg>
      <figcaption className="text-15">
        {isPacked ? `Drops are packed ${from}, ${ending}.` : `${ending}.`}
      </figcaption>
    </figure>
  )
}
