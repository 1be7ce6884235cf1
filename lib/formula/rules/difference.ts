import type { EmulsionType, FormulaLine, FormulaStep } from '../schema'
import { targetPhText, type TargetPh } from './target-ph'
import { formulaTotals, oilAndWater, type FormulaTotals } from './totals'

export type Mark = 'same' | 'added' | 'removed' | 'changed'

type Line = Omit<FormulaLine, 'id'>
type Step = Omit<FormulaStep, 'id'>
type LineField = Exclude<keyof Line, 'inciName' | 'ingredientId'>
type StepField = keyof Step

/** One row of the two put side by side; `fields` names what is not the same. */
export type LineDifference = { mark: Mark; from: Line | null; to: Line | null; fields: LineField[] }
export type StepDifference = { mark: Mark; from: Step | null; to: Step | null; fields: StepField[] }

export type Consequences = FormulaTotals & {
  oilThousandths: number
  waterThousandths: number
  targetPh: TargetPh | null
}

type Side = {
  emulsionType: EmulsionType
  targetPh: TargetPh | null
  lines: readonly Line[]
  steps: readonly Step[]
}

export type Difference = {
  lines: LineDifference[]
  steps: StepDifference[]
  from: Consequences
  to: Consequences
  counts: Record<Exclude<Mark, 'same'>, number>
}

export function difference(from: Side, to: Side): Difference {
  const lines = lineDifferences(from.lines, to.lines)
  const steps = stepDifferences(from.steps, to.steps)
  const count = (mark: Mark) => [...lines, ...steps].filter((row) => row.mark === mark).length
  return {
    lines,
    steps,
    from: consequences(from),
    to: consequences(to),
    counts: { added: count('added'), removed: count('removed'), changed: count('changed') },
  }
}

type Told = Pick<Difference, 'from' | 'to' | 'counts'>

/** What came of it, and how much was touched, as the page's headline. */
export function differenceFinding({ from, to, counts }: Told, inside: 'water' | 'oil') {
  const parts = [
    counts.changed ? `${counts.changed} changed` : '',
    counts.added ? `${counts.added} new` : '',
    counts.removed ? `${counts.removed} gone` : '',
  ].filter(Boolean)
  const rows = parts.length ? `Lines and steps: ${parts.join(', ')}.` : 'No line and no step differs.'
  const [wasPh, nowPh] = [from, to].map((side) => targetPhText(side.targetPh) || 'none')
  const isPhMoved = wasPh !== nowPh
  const touched = isPhMoved ? `${rows} Target pH ${nowPh}, it was ${wasPh}.` : rows
  const [a, b] = [from, to].map((side) => side.internalVolumePercent)
  if (typeof a !== 'number' || typeof b !== 'number')
    return {
      strong: parts.length || isPhMoved ? 'Different' : 'The same',
      rest: ', and one holds nothing yet',
      sentence: touched,
    }
  const [was, now] = [`${a.toFixed(1)} %`, `${b.toFixed(1)} %`]
  if (!parts.length && !isPhMoved)
    return { strong: 'Nothing', rest: ` differs: ${now} ${inside} inside`, sentence: touched }
  const rest = was === now ? ` ${inside} inside, as before` : ` ${inside} inside, it was ${was}`
  return { strong: now, rest, sentence: `By volume. ${touched}` }
}

function consequences({ emulsionType, lines, targetPh }: Side): Consequences {
  return { ...formulaTotals(lines), ...oilAndWater(emulsionType, lines), targetPh }
}

const lineFields: LineField[] = [
  ...(['phase', 'function', 'percentThousandths', 'density', 'isInternal'] as const),
  ...(['isRemainder', 'priceCentsPerKg'] as const),
]
const stepFields: StepField[] = [
  ...(['phase', 'instruction', 'speedRpm', 'minutes', 'temperatureC', 'lookFor', 'caution'] as const),
]

/**
 * Lines are the same ingredient by name; one that stands several times is paired within its phase first,
 * then in order. They stand in the order of the second version, each removed one after the line it followed.
 */
function lineDifferences(from: readonly Line[], to: readonly Line[]): LineDifference[] {
  const partner = new Map<Line, Line>()
  const free = new Set(from)
  const pair = (isPartner: (a: Line, b: Line) => boolean) => {
    for (const line of to) {
      if (partner.has(line)) continue
      const found = [...free].find((one) => nameOf(one) === nameOf(line) && isPartner(one, line))
      if (!found) continue
      partner.set(line, found)
      free.delete(found)
    }
  }
  pair((a, b) => a.phase === b.phase && a.percentThousandths === b.percentThousandths)
  pair((a, b) => a.phase === b.phase)
  pair(() => true)
  const paired = to.map((line) => [partner.get(line) ?? null, line] as const)
  return woven(from, paired).map(([a, b]) => differing(a, b, lineFields))
}

/** Steps are paired where their words are the same, in order; between such pairs the next with the next. */
function stepDifferences(from: readonly Step[], to: readonly Step[]): StepDifference[] {
  const same = commonSteps(from, to)
  const paired: (readonly [Step | null, Step])[] = []
  let [i, j] = [0, 0]
  for (const [a, b] of [...same, [from.length, to.length] as const]) {
    for (; j < b; j++, i = Math.min(i + 1, a)) paired.push([i < a ? from[i]! : null, to[j]!])
    if (b < to.length) paired.push([from[a]!, to[b]!])
    ;[i, j] = [a + 1, b + 1]
  }
  return woven(from, paired).map(([a, b]) => differing(a, b, stepFields))
}

/** The longest run of steps with the same words in both, as pairs of places. */
function commonSteps(from: readonly Step[], to: readonly Step[]): (readonly [number, number])[] {
  const key = (step: Step) => step.instruction.trim().toLowerCase()
  const best = Array.from({ length: from.length + 1 }, () => Array<number>(to.length + 1).fill(0))
  for (let i = from.length - 1; i >= 0; i--)
    for (let j = to.length - 1; j >= 0; j--)
      best[i]![j] =
        key(from[i]!) === key(to[j]!)
          ? best[i + 1]![j + 1]! + 1
          : Math.max(best[i + 1]![j]!, best[i]![j + 1]!)
  const pairs: (readonly [number, number])[] = []
  let [i, j] = [0, 0]
  while (i < from.length && j < to.length) {
    if (key(from[i]!) === key(to[j]!)) pairs.push([i++, j++])
    else if (best[i + 1]![j]! >= best[i]![j + 1]!) i++
    else j++
  }
  return pairs
}

/** Puts what has no partner behind the one it followed before. */
function woven<Row>(from: readonly Row[], paired: readonly (readonly [Row | null, Row])[]) {
  const rows: (readonly [Row | null, Row | null])[] = [...paired]
  const kept = new Set(paired.map(([a]) => a))
  from.forEach((row, index) => {
    if (kept.has(row)) return
    const before = from[index - 1]
    const at = before === undefined ? -1 : rows.findIndex(([a]) => a === before)
    rows.splice(at + 1, 0, [row, null])
  })
  return rows
}

function differing<Row, Field extends keyof Row>(from: Row | null, to: Row | null, all: readonly Field[]) {
  if (!from || !to) return { mark: from ? ('removed' as const) : ('added' as const), from, to, fields: [] }
  const fields = all.filter((field) => from[field] !== to[field])
  return { mark: fields.length ? ('changed' as const) : ('same' as const), from, to, fields }
}

const nameOf = (line: Line) => line.inciName.trim().toLowerCase()
