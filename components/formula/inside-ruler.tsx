import { colourOf } from '@/components/marks/drawn'

type Props = { percent: number | null; before: { number: number; percent: number } | null }

const from = 40
const to = 100
const wide = 600
const place = (percent: number) => ((Math.max(from, Math.min(to, percent)) - from) / (to - from)) * wide

/** Internal phase on a level that is true to scale from 40 to 100 %, with the packing of equal balls marked. */
export function InsideRuler({ percent, before }: Props) {
  const ticks = Array.from({ length: 13 }, (_, index) => from + index * 5)
  const packed = place(74)
  const words =
    percent === null ? 'no internal phase yet' : `${percent.toFixed(1)} % internal phase by volume`
  return (
    <svg
      viewBox={`-10 0 ${wide + 20} 82`}
      className="h-auto w-full"
      role="img"
      aria-label={`${words}; equal balls are packed closest at 74.0 %`}
    >
      <rect x={packed} y={48} width={wide - packed} height={12} fill={colourOf('recess')} />
      <path d={`M0 60H${wide}`} stroke="var(--ink)" strokeWidth="2" />
      {ticks.map((tick) => (
        <path
          key={tick}
          d={`M${place(tick)} 60v${tick % 10 === 0 ? -14 : -8}`}
          stroke="var(--ink)"
          strokeWidth={tick % 10 === 0 ? 2 : 1}
        />
      ))}
      {ticks
        .filter((tick) => tick % 20 === 0)
        .map((tick) => (
          <text key={tick} x={place(tick)} y={80} fontSize="15" textAnchor="middle">
            {tick}
          </text>
        ))}
      <path d={`M${packed} 22V66`} stroke="var(--ink)" strokeWidth="2" />
      <text x={packed - 8} y={34} fontSize="14" textAnchor="end">
        equal balls, packed closest: 74.0
      </text>
      <text x={packed + 8} y={34} fontSize="14">
        high internal phase
      </text>
      {before ? (
        <circle
          cx={place(before.percent)}
          cy={60}
          r={7}
          fill="var(--ground)"
          stroke="var(--ink)"
          strokeWidth="2"
        />
      ) : null}
      {percent === null ? null : (
        <>
          <path d={`M${place(percent)} 54V24`} stroke="var(--ink)" strokeWidth="2" />
          <circle
            cx={place(percent)}
            cy={60}
            r={8}
            fill="var(--ink)"
            stroke="var(--ground)"
            strokeWidth="2"
          />
          <text
            x={Math.min(place(percent), wide - 20)}
            y={19}
            fontSize="24"
            fontWeight="750"
            textAnchor="middle"
          >
            {percent.toFixed(1)}
          </text>
        </>
      )}
    </svg>
  )
}
