/** One line of a benchmark: what was measured, in words, and whether it meets its target; null where there is none. */
export type Figure = { what: string; found: string; target: string | null; isMet: boolean | null }

/** A figure that must be at most its target. */
export function atMost(what: string, value: number, target: number, show: (n: number) => string): Figure {
  return { what, found: show(value), target: `at most ${show(target)}`, isMet: value <= target }
}

/** What was measured only to be seen, or why it was not. */
export function plain(what: string, found: string): Figure {
  return { what, found, target: null, isMet: null }
}

export function tableOf(figures: readonly Figure[]): string {
  const rows = figures.map((f) => [f.what, f.found, f.target ?? '', f.isMet === false ? 'missed' : ''])
  const widths = [0, 1, 2].map((column) => Math.max(...rows.map((row) => row[column]!.length)))
  return rows
    .map((row) =>
      row
        .map((cell, i) => cell.padEnd(widths[i] ?? 0))
        .join('  ')
        .trimEnd(),
    )
    .join('\n')
}

/** Processor seconds of one call, on average over many. */
export function meanSeconds(calls: number, call: () => void): number {
  const before = process.cpuUsage()
  for (let i = 0; i < calls; i++) call()
  const { user, system } = process.cpuUsage(before)
  return (user + system) / 1e6 / calls
}

/** The least of several: what else the machine does can only add to it. */
export function leastSeconds(rounds: number, call: () => void): number {
  return Math.min(...Array.from({ length: rounds }, () => meanSeconds(1, call)))
}
