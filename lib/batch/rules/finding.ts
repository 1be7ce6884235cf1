import { grouped } from '@/lib/number/rules'
import type { BatchState, TypeFound } from '../schema'
import { restHours } from './rest'

type BatchFacts = {
  state: BatchState
  weighings: { actualG: number | null; phase: string }[]
  steps: { doneAt: string | null }[]
  yieldG: number | null
  restedHours: number | null
  emulsionType: string
  emulsionTypeFound: TypeFound | null
  decisionReason: string | null
}

export type BatchFinding = { strong: string; rest: string; sentence: string }

/** Where the batch stands and what it waits for: the page's headline. */
export function batchFinding(batch: BatchFacts): BatchFinding {
  if (batch.state === 'rejected') {
    return { strong: 'Rejected', rest: '', sentence: batch.decisionReason ?? '' }
  }
  if (batch.state === 'released') {
    return {
      strong: `${grouped(batch.yieldG ?? 0, 0)} g`,
      rest: ' released for jars',
      sentence: `${typeSentence(batch)}${batch.decisionReason ? ` ${batch.decisionReason}` : ''}`,
    }
  }
  if (batch.state === 'resting') return restingFinding(batch)
  const left = batch.weighings.filter((line) => line.actualG === null)
  const stepsLeft = batch.steps.filter((step) => step.doneAt === null).length
  if (left.length) {
    const done = batch.weighings.length - left.length
    return {
      strong: `${done} of ${batch.weighings.length}`,
      rest: ' lines weighed',
      sentence: `Phase ${left[0]?.phase} is next. ${stepsLeft} process ${stepsLeft === 1 ? 'step' : 'steps'} to do.`,
    }
  }
  return stepsLeft
    ? {
        strong: `${batch.steps.length - stepsLeft} of ${batch.steps.length}`,
        rest: ' steps done',
        sentence: 'Everything is weighed.',
      }
    : { strong: 'All weighed and made', rest: '', sentence: 'Give the yield, then it rests.' }
}

function restingFinding(batch: BatchFacts): BatchFinding {
  const hours = Math.floor(batch.restedHours ?? 0)
  if (batch.emulsionTypeFound) {
    return {
      strong: typeHeadline(batch),
      rest: '',
      sentence: `Rested ${hours} h. Release it or reject it.`,
    }
  }
  return {
    strong: `${hours} h`,
    rest: ' at rest',
    sentence:
      hours < restHours.least
        ? `It rests ${restHours.least} to ${restHours.most} h; the emulsion-type test comes after that.`
        : 'Ready for the emulsion-type test.',
  }
}

function typeHeadline(batch: BatchFacts): string {
  if (batch.emulsionTypeFound === 'not clear') return 'Type not clear'
  return isTypeAsStated(batch.emulsionType, batch.emulsionTypeFound)
    ? `${sentenceCase(batch.emulsionType)}, as designed`
    : `Tested ${batch.emulsionTypeFound}, designed ${batch.emulsionType}`
}

function typeSentence(batch: BatchFacts): string {
  return batch.emulsionTypeFound ? `${typeHeadline(batch)}.` : ''
}

/** A test tells which phase is outside; it cannot tell oil from silicone, so either answers for both. */
export function isTypeAsStated(stated: string, found: string | null): boolean {
  if (found === stated) return true
  const outside = (type: string | null) => (type === 'oil-in-water' ? 'water' : 'oil')
  return found !== null && found !== 'not clear' && outside(stated) === outside(found)
}

function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
