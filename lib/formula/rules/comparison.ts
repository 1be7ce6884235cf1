import { attributes, attributeName } from '@/lib/reading/schema/attributes'
import { worstOf } from '@/lib/study/rules/cells'
import { degrees, timeWords } from '@/lib/study/rules/finding'
import { capital, counted, listed, numberWord } from '@/lib/study/rules/words'
import type { Standing } from '@/lib/science/series'

export type ComparedSeries = {
  formulaId: string
  studyCode: string
  batchId: string
  batchCode: string
  studyStationId: string
  kind: string
  temperatureC: number | null
  voice: string
  attribute: string
  standing: Standing
  outSinceWeeks: number | null
  leavesAtWeeks: number | null
  latestWeeks: number | null
  /** Of its station in its study: cycles are counted by them, and a long study in months. */
  timePoints: number[]
  endWeeks: number
}

/** Where one formula stands with one attribute at one kind of station: its worst batch, and how many were read. */
export type Place = { series: ComparedSeries; others: number }
export type Shelf = {
  key: string
  kind: string
  temperatureC: number | null
  rows: { attribute: string; label: string; places: (Place | null)[] }[]
}

const ranks: Standing[] = ['untold', 'steady', 'leaning', 'out']

/** Stations of the same kind and temperature are one shelf, hottest first as on a sheet; a row for each attribute. */
export function shelvesOf(formulaIds: readonly string[], series: readonly ComparedSeries[]): Shelf[] {
  const order = Object.keys(attributes)
  return [...new Map(series.map((one) => [keyOf(one), one])).entries()]
    .toSorted(([, a], [, b]) => heat(b) - heat(a))
    .map(([key, { kind, temperatureC }]) => {
      const own = series.filter((one) => keyOf(one) === key)
      const measured = [...new Set(own.map((one) => one.attribute))].toSorted(
        (a, b) => order.indexOf(a) - order.indexOf(b),
      )
      return {
        ...{ key, kind, temperatureC: kind === 'temperature' ? temperatureC : null },
        rows: measured.map((attribute) => ({
          attribute,
          label: attributeName(attribute),
          places: formulaIds.map((id) =>
            placeOf(own.filter((one) => one.formulaId === id && one.attribute === attribute)),
          ),
        })),
      }
    })
}

/** Freeze-thaw and the road stand under the ovens. */
function heat({ kind, temperatureC }: ComparedSeries): number {
  return kind === 'temperature' ? (temperatureC ?? 0) : -1000
}

function placeOf(own: ComparedSeries[]): Place | null {
  const worst = own.toSorted(
    (a, b) =>
      ranks.indexOf(b.standing) - ranks.indexOf(a.standing) ||
      (a.outSinceWeeks ?? a.leavesAtWeeks ?? Infinity) - (b.outSinceWeeks ?? b.leavesAtWeeks ?? Infinity) ||
      (b.latestWeeks ?? 0) - (a.latestWeeks ?? 0),
  )[0]
  return worst ? { series: worst, others: own.length - 1 } : null
}

export type ComparedFormula = { id: string; code: string }
export type ComparisonFinding = { strong: string; rest: string; sentence: string }

/** Which prototype stands where, in one line: who holds everywhere, else who comes apart last. */
export function comparisonFinding(
  formulas: readonly ComparedFormula[],
  series: readonly ComparedSeries[],
): ComparisonFinding {
  const standing = (id: string) =>
    worstOf(series.filter((one) => one.formulaId === id).map((one) => one.standing))
  const having = (wanted: Standing) => formulas.filter((one) => standing(one.id) === wanted)
  const [steady, leaning, out] = [having('steady'), having('leaning'), having('out')]
  const untold = formulas.filter((one) => standing(one.id) === 'untold')
  const names = (some: readonly ComparedFormula[]) => listed(some.map((one) => one.code))
  const waits = untold.length
    ? `${names(untold)} ${untold.length === 1 ? 'has' : 'have'} nothing to tell yet.`
    : ''
  if (!formulas.length) {
    return { strong: 'Nothing', rest: ' is picked to compare', sentence: 'Pick formulas in the list.' }
  }
  if (untold.length === formulas.length) {
    return {
      strong: 'Too early',
      rest: ` to tell ${counted(formulas.length, 'formula')} apart`,
      sentence: 'None of them has been read in a study often enough.',
    }
  }
  const told = [outSentence(out, series), leaning.length ? `Leaning: ${names(leaning)}.` : '', waits]
  if (steady.length) {
    return {
      strong: names(steady),
      rest: ` ${steady.length === 1 ? 'stands' : 'stand'} everywhere so far`,
      sentence: told.filter(Boolean).join(' '),
    }
  }
  if (leaning.length) {
    return {
      strong: names(leaning),
      rest: ` ${leaning.length === 1 ? 'leans' : 'lean'}, none stands everywhere`,
      sentence: [outSentence(out, series), waits].filter(Boolean).join(' '),
    }
  }
  return {
    strong: out.length === 1 ? names(out) : capital(numberWord(out.length)),
    rest: `${out.length === 1 ? ' is' : ` of ${numberWord(formulas.length)} are`} out somewhere`,
    sentence: [outSentence(out, series), waits].filter(Boolean).join(' '),
  }
}

function outSentence(out: readonly ComparedFormula[], series: readonly ComparedSeries[]): string {
  const parts = out.map(
    ({ id, code }) => `${code} ${outPlaces(series.filter((one) => one.formulaId === id))}`,
  )
  return parts.length ? `Out: ${parts.join('; ')}.` : ''
}

/** Each station where it is out, with what left first there, hottest first. */
function outPlaces(series: readonly ComparedSeries[]): string {
  const first = new Map<string, ComparedSeries>()
  for (const one of series) {
    if (one.standing !== 'out') continue
    const known = first.get(keyOf(one))
    if (!known || (one.outSinceWeeks ?? Infinity) < (known.outSinceWeeks ?? Infinity))
      first.set(keyOf(one), one)
  }
  const places = [...first.values()].toSorted((a, b) => heat(b) - heat(a))
  return listed(
    places.map((one) =>
      one.outSinceWeeks === null
        ? stationWords(one)
        : `${stationWords(one)} from ${timeOf(one, one.outSinceWeeks)}`,
    ),
  )
}

const keyOf = (one: ComparedSeries) => (one.kind === 'temperature' ? `${one.temperatureC}` : one.kind)
const timeOf = (one: ComparedSeries, weeks: number) =>
  timeWords({ ...one, id: one.studyStationId }, weeks, one.endWeeks)

export function stationWords({ kind, temperatureC }: Pick<ComparedSeries, 'kind' | 'temperatureC'>): string {
  if (kind === 'freeze-thaw') return 'in freeze-thaw'
  return kind === 'transport' ? 'on the road' : `at ${degrees(temperatureC)}`
}

/** Under a mark: since when it is out, when it is to leave, or that it holds. */
export function placeText({ series }: Place): string {
  const { standing, outSinceWeeks, leavesAtWeeks, latestWeeks } = series
  if (standing === 'out') return outSinceWeeks === null ? 'out' : timeOf(series, outSinceWeeks)
  if (standing === 'leaning')
    return leavesAtWeeks === null ? 'leaning' : `out ${timeOf(series, leavesAtWeeks)}`
  if (standing === 'untold') return 'untold'
  return latestWeeks === null ? 'holds' : `to ${timeOf(series, latestWeeks)}`
}
