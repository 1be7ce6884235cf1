import type { TypedLine } from './typed'

/** Phases in order of their first line. */
export function phasesOf(lines: readonly { phase: string }[]): string[] {
  return [...new Set(lines.map((line) => line.phase))]
}

/** The next free letter: A, B, C … */
export function nextPhase(lines: readonly { phase: string }[]): string {
  const taken = new Set(phasesOf(lines))
  const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ'
  return [...letters].find((letter) => !taken.has(letter)) ?? `P${taken.size + 1}`
}

/** Lines of one phase stand together, in the order in which the phases first appear. */
export function grouped<Line extends { phase: string }>(lines: readonly Line[]): Line[] {
  return phasesOf(lines).flatMap((phase) => lines.filter((line) => line.phase === phase))
}

export function emptyLine(id: string, phase: string, isInternal: boolean): TypedLine {
  return {
    ...{ id, phase, isInternal, ingredientId: null, inciName: '', function: '' },
    ...{ percent: '', density: '', price: '', isRemainder: false },
  }
}

/** A line one place up or down; past the end of its phase it goes over into the next one. */
export function moveLine(lines: readonly TypedLine[], id: string, by: -1 | 1): TypedLine[] {
  const from = lines.findIndex((line) => line.id === id)
  const line = lines[from]
  if (!line) return [...lines]
  const neighbour = lines[from + by]
  if (!neighbour) return [...lines]
  if (neighbour.phase !== line.phase) {
    const moved = { ...line, phase: neighbour.phase, isInternal: neighbour.isInternal }
    return lines.map((other) => (other.id === id ? moved : other))
  }
  return swap(lines, from, from + by)
}

/** A line put beside another one, whose phase it takes over. */
export function placeLine(
  lines: readonly TypedLine[],
  id: string,
  besideId: string,
  side: 'before' | 'after',
): TypedLine[] {
  const beside = lines.find((line) => line.id === besideId)
  const placed = placeRow(lines, id, besideId, side)
  if (!beside) return placed
  return placed.map((line) =>
    line.id === id && line.phase !== beside.phase
      ? { ...line, phase: beside.phase, isInternal: beside.isInternal }
      : line,
  )
}

/** A row put before or after another one. */
export function placeRow<Row extends { id: string }>(
  rows: readonly Row[],
  id: string,
  besideId: string,
  side: 'before' | 'after',
): Row[] {
  const row = rows.find((one) => one.id === id)
  const rest = rows.filter((one) => one.id !== id)
  const at = rest.findIndex((one) => one.id === besideId)
  if (!row || at < 0) return [...rows]
  const cut = side === 'before' ? at : at + 1
  return [...rest.slice(0, cut), row, ...rest.slice(cut)]
}

export function moveRow<Row extends { id: string }>(rows: readonly Row[], id: string, by: -1 | 1): Row[] {
  const from = rows.findIndex((row) => row.id === id)
  return from < 0 || !rows[from + by] ? [...rows] : swap(rows, from, from + by)
}

const numberColumns = ['percent', 'density', 'price'] as const

/**
 * Numbers pasted without names, put into the cells from one of them rightwards and downwards; a sentence
 * where they do not fit.
 */
export function fillNumbers(
  lines: readonly TypedLine[],
  id: string,
  column: string,
  rows: readonly (readonly string[])[],
): TypedLine[] | string {
  const firstColumn = numberColumns.findIndex((one) => one === column)
  if (firstColumn < 0)
    return 'These are numbers without names. Put the cursor into % w/w, g/mL or per kg, then paste them again.'
  const first = lines.findIndex((line) => line.id === id)
  if (first + rows.length > lines.length) {
    return `That are ${rows.length} numbers, and only ${lines.length - first} lines stand from here on. Nothing was changed.`
  }
  return lines.map((line, index) => {
    const row = rows[index - first]
    if (!row || index < first) return line
    return row.reduce(
      (filled, cell, offset) => withNumber(filled, numberColumns[firstColumn + offset], cell),
      line,
    )
  })
}

function withNumber(line: TypedLine, column: (typeof numberColumns)[number] | undefined, cell: string) {
  if (!column || cell === '') return line
  if (column !== 'percent') return { ...line, [column]: cell }
  if (/^q/i.test(cell)) return line
  return line.isRemainder ? line : { ...line, percent: cell }
}

function swap<Row>(rows: readonly Row[], a: number, b: number): Row[] {
  const next = [...rows]
  const [one, two] = [next[a], next[b]]
  if (one !== undefined && two !== undefined) {
    next[a] = two
    next[b] = one
  }
  return next
}
