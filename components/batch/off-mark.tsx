type Props = { isWithin: boolean; differenceG: number }

/** Where a weight lies: a hollow dot between the two ticks of what is allowed, or a solid one outside of them. */
export function OffMark({ isWithin, differenceG }: Props) {
  const x = isWithin ? 13 : differenceG < 0 ? 3 : 23
  return (
    <svg viewBox="0 0 26 12" width="26" height="12" aria-hidden className="inline-block align-[-1px]">
      <path d="M1 6H25M8 1V11M18 1V11" stroke="var(--ink)" strokeWidth="1.25" fill="none" />
      <circle
        cx={x}
        cy={6}
        r={3}
        fill={isWithin ? 'var(--ground)' : 'var(--alarm)'}
        stroke={isWithin ? 'var(--ink)' : 'var(--alarm)'}
        strokeWidth="1.5"
      />
    </svg>
  )
}
