type Props = {
  /** Both in percent of the initial. */
  difference: number
  scatter: number | null
  reach: number
  isFlagged: boolean
  isBeyond: boolean
}

export const barWidth = 200

/** A reading against its own trend: box twice its scatter, tick where the trend leads, dot where it was read. */
export function MovedBar({ difference, scatter, reach, isFlagged, isBeyond }: Props) {
  const x = (percent: number) => barWidth / 2 + (percent / reach) * (barWidth / 2 - 8)
  const box = Math.min(reach, 2 * (scatter ?? 0))
  const isOff = Math.abs(difference) > reach
  const at = isOff ? x(Math.sign(difference) * reach) : x(difference)
  const way = Math.sign(difference)
  const colour = isBeyond ? 'var(--alarm)' : 'var(--ink)'
  return (
    <svg
      viewBox={`0 0 ${barWidth} 24`}
      width={barWidth}
      height={24}
      overflow="visible"
      aria-hidden
      className="block max-w-full shrink"
    >
      <path d={`M0 12H${x(-box)}M${x(box)} 12H${barWidth}`} stroke="var(--rule)" strokeWidth={1} />
      {box > 0 ? (
        <rect
          x={x(-box)}
          y={7}
          width={x(box) - x(-box)}
          height={10}
          fill="var(--paper)"
          stroke="var(--ink)"
        />
      ) : null}
      <path d={`M${x(0)} 4v16`} stroke="var(--ink)" strokeWidth={1.25} />
      {isOff ? (
        <path d={`M${at + way * 8} 12L${at - way} 6.5V17.5Z`} fill={colour} stroke="var(--ground)" />
      ) : (
        <circle cx={at} cy={12} r={5.5} fill={colour} stroke="var(--ground)" />
      )}
      {isFlagged ? <circle cx={at} cy={12} r={9.5} fill="none" stroke="var(--ink)" strokeWidth={2} /> : null}
    </svg>
  )
}

/** The axis that all bars share, in percent of each initial. */
export function MovedAxis({ reach }: { reach: number }) {
  const x = (percent: number) => barWidth / 2 + (percent / reach) * (barWidth / 2 - 8)
  const ticks = [-1, -2 / 3, -1 / 3, 0, 1 / 3, 2 / 3, 1].map((part) => Math.round(part * reach))
  return (
    <svg
      viewBox={`0 0 ${barWidth} 30`}
      width={barWidth}
      height={30}
      overflow="visible"
      aria-hidden
      className="block max-w-full shrink"
    >
      <path d={`M${x(-reach)} 2H${x(reach)}`} stroke="var(--ink)" strokeWidth={1.25} />
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} 2v6`} stroke="var(--ink)" />
          <text x={x(tick)} y={24} fontSize={13} textAnchor="middle">
            {tick > 0 ? `+${tick}` : String(tick).replace('-', '−')}
          </text>
        </g>
      ))}
    </svg>
  )
}
