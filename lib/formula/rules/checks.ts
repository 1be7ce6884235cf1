import type { EmulsionType } from '../schema'
import { densityQuestion, meltQuestion, rangeQuestion } from './checks/book'
import {
  askedAbout,
  noGround,
  type Asked,
  type CheckKey,
  type CheckLine,
  type CheckStep,
  type GivenAnswer,
  type Ground,
  type Question,
} from './checks/check'
import { gelQuestion, polymerQuestion, saltQuestion, thickQuestion } from './checks/film'
import { holdsQuestion } from './checks/holds'
import { findJoining } from './checks/joining'
import { neutralQuestion } from './checks/neutraliser'
import { phQuestion, preservativeQuestion } from './checks/preservative'
import { coldQuestion, finishQuestion, shearQuestion, slowQuestion } from './checks/process'
import { agreeQuestion } from './checks/salt-and-polymer'
import type { TargetPh } from './target-ph'
import { formulaTotals } from './totals'

export type FormulaCheck = {
  key: CheckKey
  question: string
  answer: string
  /** Neither the formula nor a person answers it yet. A question, never a rule. */
  isOpen: boolean
  /** Whether a person is asked at all; false where the formula answers it itself. */
  isAsked: boolean
  reason: string
  mark: string
  at: 'film' | 'drop' | null
  lines: { id: string; name: string }[]
  steps: readonly number[]
  /** What it rests on; an answer holds while this stays the same. */
  askedAbout: string
  /** The latest answer that holds, of this version or an earlier one; else the latest that did. */
  given: GivenAnswer | null
  /** Answered once, but what it rests on has changed since. */
  isReopened: boolean
}

/** Questions with a reason each, answered by the formula's own lines and steps or by a person's note. */
export function formulaChecks(
  type: EmulsionType,
  lines: readonly CheckLine[],
  steps: readonly CheckStep[],
  ground: Ground = noGround,
  targetPh: TargetPh | null = null,
): FormulaCheck[] {
  const newest = ground.answers.toSorted((a, b) => b.number - a.number || (a.at < b.at ? 1 : -1))
  const asked = lookAt(type, lines, steps, ground, targetPh)
  return questionsTo(asked).map((question) => {
    const about = askedAbout(asked, question)
    const own = newest.filter((given) => given.question === question.key)
    // An answer holds again where what it rested on came back.
    const holding = own.find((given) => given.askedAbout === about)
    const given = holding ?? own[0] ?? null
    const holds = holding !== undefined
    return {
      key: question.key,
      question: question.question,
      answer: question.answer,
      isOpen: question.isOpen && !holds,
      isAsked: question.isOpen,
      reason: question.reason,
      mark: question.mark,
      at: question.at,
      lines: question.lines.map(({ id, inciName }) => ({ id, name: inciName })),
      steps: question.steps,
      askedAbout: about,
      given,
      isReopened: question.isOpen && given !== null && !holds,
    }
  })
}

function questionsTo(asked: Asked): Question[] {
  const inside = asked.isWaterInside
    ? {
        film: [polymerQuestion(asked), gelQuestion(asked), slowQuestion(asked)],
        cold: [coldQuestion(asked), thickQuestion(asked), saltQuestion(asked)],
      }
    : { film: [], cold: [] }
  return [
    ...inside.film,
    shearQuestion(asked),
    ...inside.cold,
    holdsQuestion(asked),
    agreeQuestion(asked),
    neutralQuestion(asked),
    finishQuestion(asked),
    preservativeQuestion(asked),
    phQuestion(asked),
    meltQuestion(asked),
    rangeQuestion(asked),
    densityQuestion(asked),
  ].filter((question) => question !== null)
}

function lookAt(
  type: EmulsionType,
  all: readonly CheckLine[],
  steps: readonly CheckStep[],
  ground: Ground,
  targetPh: TargetPh | null,
): Asked {
  const lines = all.filter((line) => line.percentThousandths > 0)
  const isWaterInside = type !== 'oil-in-water'
  const weighed = lines.flatMap((line) =>
    line.density !== null && line.density > 0
      ? [{ ...line, density: line.density, priceCentsPerKg: null }]
      : [],
  )
  return {
    type,
    isWaterInside,
    lines,
    inWater: lines.filter((line) => line.isInternal === isWaterInside),
    inOil: lines.filter((line) => line.isInternal !== isWaterInside),
    steps,
    joining: findJoining(steps),
    internalVolumePercent: formulaTotals(weighed).internalVolumePercent,
    factsOf: (line) => (line.ingredientId ? (ground.facts[line.ingredientId] ?? null) : null),
    borne: ground.borne,
    targetPh,
  }
}
