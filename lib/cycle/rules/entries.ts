import type { BoardPress, BoardStep, CyclePlace } from '../queries/board'

type Half = { cycle: number; half: string }

const isOf =
  (half: Half) =>
  (one: Half): boolean =>
    one.cycle === half.cycle && one.half === half.half

/** Everything that was ever on record of an ended half, oldest first; as many as there are, so often it was written. */
export function entriesOf(place: Pick<CyclePlace, 'steps' | 'past'>, half: Half): BoardStep[] {
  return [...place.past, ...place.steps].filter(isOf(half)).toSorted(byRecord)
}

/** Likewise of its begin at the board. */
export function beginsOf(place: Pick<CyclePlace, 'presses' | 'pastBegins'>, half: Half): BoardPress[] {
  return [...place.pastBegins, ...place.presses.filter(({ press }) => press === 'begin')]
    .filter(isOf(half))
    .toSorted(byRecord)
}

function byRecord(a: { recordedAt: string }, b: { recordedAt: string }): number {
  return Date.parse(a.recordedAt) - Date.parse(b.recordedAt)
}
