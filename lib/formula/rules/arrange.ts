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

export function moveRow<Row extends { id: string }>(rows: readonly Row[], id: string, by: -1 | 1): Row[] {
  const from = rows.findIndex((row) => row.id === id)
  return from < 0 || !rows[from + by] ? [...rows] : swap(rows, from, from + by)
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
