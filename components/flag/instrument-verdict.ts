import type { AgainstTrend } from '@/lib/flag/rules/against-trend'
import { movedElsewhere, type Elsewhere } from '@/lib/science/elsewhere'

export type InstrumentVerdict = Elsewhere

/** Whether the instrument read to one side elsewhere as well on that day, or only here. */
export function instrumentVerdict(rows: readonly AgainstTrend[]): InstrumentVerdict {
  return movedElsewhere(
    rows.flatMap(({ isFlagged, differencePercent, scatterPercent }) =>
      isFlagged || !differencePercent || !scatterPercent
        ? []
        : [{ difference: differencePercent, scatter: scatterPercent }],
    ),
  )
}

/** How many others were set against their own trends. */
export function comparedOthers(rows: readonly AgainstTrend[]): number {
  return rows.filter((row) => !row.isFlagged && row.differencePercent !== null && row.scatterPercent !== null)
    .length
}
