import { everyStep, type Asked, type BorneBatch, type CheckStep, type Question } from './check'
import { fastestFrom, findJoining, finishingSteps } from './joining'

// What the making asks of the emulsion, against what batches of this formula have been through and borne.

/** [practice] Above these the question is asked again with the number in it; nothing is refused. */
const gentleRpm = 600
const coldC = 40
/** A tenth more than was borne is the same speed, read off another dial. */
const same = 1.1

export function slowQuestion({ steps, joining, borne, lines }: Asked): Question {
  const minutes = joining?.step.minutes
  const added = lines.filter((line) => joining?.added && line.phase === joining.added)
  const percent = added.reduce((sum, line) => sum + line.percentThousandths, 0) / 1000
  const rate = minutes && percent ? percent / minutes : null
  const fastest = most(borne, rateOf)
  const isFaster = rate !== null && fastest !== null && rate > same * fastest.value
  return {
    key: 'slow',
    question: 'Does it go in slowly?',
    answer: !joining
      ? 'Open: no step says which phase goes into which, such as B into A.'
      : !minutes
        ? `Open: step ${joining.number} has no minutes.`
        : isFaster
          ? `Open: ${perMinute(rate)} in step ${joining.number}; the fastest borne is ${perMinute(fastest.value)}, in ${fastest.code}.`
          : `Yes, over ${minutes} min in step ${joining.number}${rate !== null && fastest ? `; ${fastest.code} bore it` : ''}.`,
    isOpen: !minutes || isFaster,
    reason: 'Faster than the outside can wrap it, the emulsion inverts.',
    mark: fastest ? `batch ${fastest.code}` : 'practice',
    at: 'drop',
    lines: added,
    steps: joining ? [joining.number] : everyStep(steps),
    figures: [isFaster ? fastest.value.toFixed(2) : null],
  }
}

export function shearQuestion({ steps, joining, borne }: Asked): Question {
  const fastest = fastestFrom(steps, joining)
  const borneMost = most(borne, (batch) => fastestFrom(batch.steps, findJoining(batch.steps))?.rpm ?? null)
  const limit = borneMost ? same * borneMost.value : gentleRpm
  const isFast = fastest !== null && fastest.rpm > limit
  return {
    key: 'shear',
    question: 'Can it bear the shear?',
    answer: !joining
      ? 'Open: no step says which phase goes into which.'
      : !fastest
        ? `Open: step ${joining.number} has no speed.`
        : !isFast
          ? borneMost
            ? `Yes, at most ${fastest.rpm} rpm; ${borneMost.code} bore ${borneMost.value}.`
            : `Yes, at most ${fastest.rpm} rpm from step ${joining.number} on.`
          : borneMost
            ? `Open: ${fastest.rpm} rpm in step ${fastest.number}; the most borne is ${borneMost.value}, in ${borneMost.code}.`
            : `Open: ${fastest.rpm} rpm in step ${fastest.number}; has a batch borne it?`,
    isOpen: !fastest || isFast,
    reason: 'Packed drops cannot slip past; fast blades tear.',
    mark: borneMost ? `batch ${borneMost.code}` : 'practice',
    at: 'film',
    lines: [],
    steps: joining ? [...new Set([joining.number, fastest?.number ?? joining.number])] : everyStep(steps),
    figures: [isFast && borneMost ? borneMost.value : null],
  }
}

/** Asked only where something homogenises what is an emulsion already. */
export function finishQuestion({ steps, joining, borne }: Asked): Question | null {
  const finishing = finishingSteps(steps, joining)
  const worst = finishing.toSorted((a, b) => (b.step.speedRpm ?? 0) - (a.step.speedRpm ?? 0))[0]
  if (!worst) return null
  const borneMost = most(borne, (batch) => {
    const own = finishingSteps(batch.steps, findJoining(batch.steps)).map(({ step }) => step.speedRpm ?? 0)
    return own.length ? Math.max(...own) : null
  })
  const rpm = worst.step.speedRpm
  const isBorne = borneMost !== null && (rpm ?? 0) <= same * borneMost.value
  const speed = rpm === null ? 'homogenising' : `${rpm} rpm`
  return {
    key: 'finish',
    question: 'Does it bear homogenising at the end?',
    answer: isBorne
      ? `Yes, ${speed} in step ${worst.number}; ${borneMost.code} bore it.`
      : `Open: ${speed} in step ${worst.number}; ${borneMost ? `the most borne is ${borneMost.value} rpm, in ${borneMost.code}` : 'no batch has borne it'}.`,
    isOpen: !isBorne,
    reason: 'It makes smaller drops, and more film than the emulsifier may cover; packed ones may break.',
    mark: isBorne ? `batch ${borneMost.code}` : 'practice',
    at: null,
    lines: [],
    steps: finishing.map(({ number }) => number),
    figures: [isBorne ? null : (borneMost?.value ?? null)],
  }
}

export function coldQuestion({ steps, joining, borne }: Asked): Question {
  const at = joining?.step.temperatureC ?? null
  const warmest = most(borne, (batch) => findJoining(batch.steps)?.step.temperatureC ?? null)
  const isBorne = at !== null && warmest !== null && at <= warmest.value
  const isWarm = at !== null && at > coldC && !isBorne
  return {
    key: 'cold',
    question: 'Is it cold enough?',
    answer: !joining
      ? 'Open: no step says which phase goes into which.'
      : at === null
        ? `Open: step ${joining.number} has no temperature.`
        : isWarm
          ? `Open: ${at} °C in step ${joining.number}, above ${coldC} °C.`
          : at > coldC
            ? `Yes, ${at} °C; ${warmest?.code} bore it.`
            : `Yes, ${at} °C; limit ${coldC} °C.`,
    isOpen: at === null || isWarm,
    reason: 'Warm oil is thin, and its films drain.',
    mark: at !== null && at > coldC && isBorne ? `batch ${warmest.code}` : 'practice',
    at: 'film',
    lines: [],
    steps: joining ? [joining.number] : everyStep(steps),
  }
}

/** The batch in which a figure was highest. */
function most(borne: readonly BorneBatch[], figure: (batch: BorneBatch) => number | null) {
  const known = borne.flatMap((batch) => {
    const value = figure(batch)
    return value === null ? [] : [{ code: batch.code, value }]
  })
  return known.toSorted((a, b) => b.value - a.value)[0] ?? null
}

function rateOf({ addedPercent, steps }: BorneBatch): number | null {
  const minutes: CheckStep['minutes'] = findJoining(steps)?.step.minutes ?? null
  return addedPercent && minutes ? addedPercent / minutes : null
}

const perMinute = (rate: number | null) => `${(rate ?? 0).toFixed(1)} % of the batch a minute`
