import type { AgainstTrend } from '@/lib/flag/rules/against-trend'

/** Beyond its own scatter once over a reading has moved; twice over nobody puts it down to chance. */
const moved = 1
const far = 2
/** Two neighbours may agree by chance; with three one can tell the instrument from the product. */
const leastOthers = 3

export type InstrumentVerdict = 'steady' | 'moved' | 'untold'

/** Whether the instrument read to one side elsewhere as well on that day, or only here. */
export function instrumentVerdict(rows: readonly AgainstTrend[]): InstrumentVerdict {
  const shifts = rows.flatMap((row) =>
    row.isFlagged || row.difference === null || !row.differencePercent || !row.scatterPercent
      ? []
      : [row.differencePercent / row.scatterPercent],
  )
  if (shifts.length < leastOthers) return 'untold'
  const sorted = shifts.toSorted((a, b) => a - b)
  const middle = sorted[Math.floor(sorted.length / 2)]!
  const sameSide = shifts.filter((shift) => Math.sign(shift) === Math.sign(middle) && Math.abs(shift) > moved)
  if (Math.abs(middle) > moved && sameSide.length >= leastOthers) return 'moved'
  return shifts.some((shift) => Math.abs(shift) > far) ? 'untold' : 'steady'
}

/** How many others were set against their own trends. */
export function comparedOthers(rows: readonly AgainstTrend[]): number {
  return rows.filter((row) => !row.isFlagged && row.differencePercent !== null && row.scatterPercent !== null)
    .length
}
