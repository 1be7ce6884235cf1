import { neutralisedPercent } from '@/lib/science/neutralisation'
import { sourceOf, type Asked, type CheckLine, type Question } from './check'

/** Of an acid polymer: below this it has hardly swollen, above it base is left over [from memory]. */
const swollenFrom = 40
const leftOverAbove = 110

/** An acid polymer without its neutraliser, or a neutraliser with nothing, or not enough, to take up. */
export function neutralQuestion(asked: Asked): Question | null {
  const valueOf = (line: CheckLine, of: 'acidValue' | 'baseValue') => asked.factsOf(line)?.[of] ?? null
  const polymers = asked.inWater.filter(isAcidPolymer)
  const bases = asked.inWater.filter(
    (line) => valueOf(line, 'baseValue') !== null || /neutrali[sz]/i.test(line.function),
  )
  if (!polymers.length && !bases.length) return null
  // A soap forms where the acid is in the oil, so that counts where the water has none.
  const hasAcid = (line: CheckLine) => isAcidPolymer(line) || valueOf(line, 'acidValue') !== null
  const inWater = asked.inWater.filter(hasAcid)
  const acids = inWater.length ? inWater : asked.inOil.filter(hasAcid)
  const titrated = (lines: readonly CheckLine[], of: 'acidValue' | 'baseValue') =>
    lines.map((line) => ({ percent: line.percentThousandths / 1000, value: valueOf(line, of) }))
  const [acidValues, baseValues] = [titrated(acids, 'acidValue'), titrated(bases, 'baseValue')]
  const unknown = [...acids, ...bases].find(
    (line) => valueOf(line, acids.includes(line) ? 'acidValue' : 'baseValue') === null,
  )
  const percent =
    acids.length && bases.length && !unknown
      ? neutralisedPercent({ acids: acidValues.map(known), bases: baseValues.map(known) })
      : null
  const said = answerFor({ acids, bases, unknown, percent })
  return {
    key: 'neutral',
    question: 'Does the neutraliser fit the acid?',
    ...said,
    reason: 'An acid polymer swells only as it is neutralised; base left over drives the pH up.',
    mark:
      percent === null
        ? 'practice'
        : sourceOf([...acids, ...bases].map((line) => asked.factsOf(line)?.figuresSource ?? 'practice')),
    at: null,
    lines: [...acids, ...bases],
    steps: [],
    figures: [...acidValues, ...baseValues].map(({ value }) => value),
  }
}

type Told = {
  acids: readonly CheckLine[]
  bases: readonly CheckLine[]
  unknown: CheckLine | undefined
  percent: number | null
}

function answerFor({ acids, bases, unknown, percent }: Told): { answer: string; isOpen: boolean } {
  const [acid, base] = [acids[0]?.inciName, bases[0]?.inciName]
  if (!base) return { answer: `Open: nothing neutralises ${acid}.`, isOpen: true }
  if (!acid) return { answer: `Open: nothing here is an acid that ${base} could take up.`, isOpen: true }
  if (percent === null) {
    const what = unknown && acids.includes(unknown) ? 'acid' : 'base'
    return { answer: `Open: the book has no ${what} value of ${unknown?.inciName}.`, isOpen: true }
  }
  const taken = `${base} takes up ${percent.toFixed(0)} % of the acid of ${acid}`
  if (percent > leftOverAbove) return { answer: `Open: too much, ${taken}.`, isOpen: true }
  if (percent < swollenFrom) return { answer: `Open: little, ${taken}.`, isOpen: true }
  return { answer: `Yes, ${taken}.`, isOpen: false }
}

/** Those sold as a salt are neutralised already. */
function isAcidPolymer(line: CheckLine): boolean {
  return /carbomer|^acrylates\//i.test(line.inciName) && !/sodium|ammonium|potassium/i.test(line.inciName)
}

const known = ({ percent, value }: { percent: number; value: number | null }) => ({
  percent,
  value: value ?? 0,
})
