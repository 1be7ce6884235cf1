import { targetPhText } from '../target-ph'
import { named, several, sourceOf, type Asked, type Question } from './check'

export function preservativeQuestion(asked: Asked): Question | null {
  const found = preservativesOf(asked)
  if (!asked.inWater.length) return null
  return {
    key: 'preservative',
    question: 'What preserves it?',
    answer: found[0] ? `${several(found.map(named))}.` : 'Open: no line is a preservative.',
    isOpen: !found.length,
    reason:
      'Water without one grows things. Whether it is enough, only a challenge test of a qualified laboratory says.',
    mark: 'practice',
    at: null,
    lines: found.length ? found : asked.inWater,
    steps: [],
  }
}

/** The pH in which the preservatives work, against the one that the formula is meant to have. */
export function phQuestion(asked: Asked): Question | null {
  const limited = preservativesOf(asked).flatMap((line) => {
    const facts = asked.factsOf(line)
    if (!facts || (facts.phLow === null && facts.phHigh === null)) return []
    return [{ line, low: facts.phLow ?? 0, high: facts.phHigh ?? 14, from: facts.figuresSource }]
  })
  if (!limited.length) return null
  const { targetPh } = asked
  const outside = limited.filter(
    ({ low, high }) => targetPh !== null && (targetPh.low < low || targetPh.high > high),
  )
  const range = ({ line, low, high }: (typeof limited)[number]) =>
    `${line.inciName} works from pH ${low.toFixed(2)} to ${high.toFixed(2)}`
  return {
    key: 'ph',
    question: 'Does the preservative work at the target pH?',
    answer:
      targetPh === null
        ? `Open: no target pH is given with the lines. ${several(limited.map(range))}.`
        : outside.length
          ? `Open: target ${targetPhText(targetPh)}; ${several(outside.map(range))}.`
          : `Yes, target ${targetPhText(targetPh)}; ${several(limited.map(range))}.`,
    isOpen: targetPh === null || outside.length > 0,
    reason: 'Acid preservatives work only where they are not dissociated; others are split at a high pH.',
    mark: sourceOf(limited.map(({ from }) => from)),
    at: null,
    lines: limited.map(({ line }) => line),
    steps: [],
    // A single value stands once.
    figures: [
      ...new Set([targetPh?.low ?? null, targetPh?.high ?? null]),
      ...limited.flatMap(({ low, high }) => [low, high]),
    ],
  }
}

const preservativesOf = ({ lines }: Asked) =>
  lines.filter((line) => /preserv/i.test(line.function) && !/booster/i.test(line.function))
