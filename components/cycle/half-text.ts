import type { BoardStep } from '@/lib/cycle/queries/board'
import { readDecimal } from '@/lib/number/rules'
import { instantOfTyped, typedIn } from './earlier-time'
import { emptyReached, type HalfText, type ReachedText } from './half-fields'

export const emptyHalf: HalfText = { ...emptyReached, begunAt: '', endedAt: '', held: '', heldReason: '' }

export function reachedOf({ reached, core, frozen, note }: ReachedText) {
  return {
    reachedC: readDecimal(reached),
    coreC: readDecimal(core),
    isFrozenThrough: frozen === '' ? null : frozen === 'yes',
    note,
  }
}

/** Null while a time is not typed whole. A time that still reads as it was is that very instant. */
export function halfOf(text: HalfText, zone: string, was?: Pick<BoardStep, 'begunAt' | 'endedAt'>) {
  const instantOf = (typed: string, before?: string) =>
    before && typedIn(before, zone) === typed ? before : instantOfTyped(typed, zone)
  const begunAt = instantOf(text.begunAt, was?.begunAt)
  const endedAt = instantOf(text.endedAt, was?.endedAt)
  if (begunAt === null || endedAt === null) return null
  const heldHours = readDecimal(text.held) ?? 0
  const heldReason = heldHours > 0 ? text.heldReason : ''
  return { begunAt, endedAt, ...reachedOf(text), heldHours, heldReason }
}

export function textOf(step: BoardStep, zone: string): HalfText {
  const shown = (value: number | null) => (value === null ? '' : String(value).replace('-', '−'))
  return {
    begunAt: typedIn(step.begunAt, zone),
    endedAt: typedIn(step.endedAt, zone),
    reached: shown(step.reachedC),
    core: shown(step.coreC),
    frozen: step.isFrozenThrough === null ? '' : step.isFrozenThrough ? 'yes' : 'no',
    held: step.heldHours > 0 ? String(step.heldHours) : '',
    heldReason: step.heldReason,
    note: step.note,
  }
}

/** A number that cannot be read is typed again rather than left out. */
export function unreadable(...texts: string[]): string | undefined {
  return texts.some((text) => text.trim() !== '' && readDecimal(text) === null)
    ? 'One of the numbers cannot be read. Type it again.'
    : undefined
}
