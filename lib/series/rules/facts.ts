import { type Attribute } from '@/lib/reading/schema/attributes'
import { driftMethod, ruleMethods } from '@/lib/science/methods/drift'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import type { SeriesFinding, SeriesInput, Tolerance } from '@/lib/science/series'
import type { DriftCalculation } from '@/lib/shelf-case/rules/content'
import { shownWithUnit } from '@/lib/study/rules/words'

type Of = {
  attribute: Attribute
  station: string
  batch: string
  input: SeriesInput
  finding: SeriesFinding
  calculation: DriftCalculation | null
  when: string
}

/** What one series is computed from: first what decides where it stands, last the whole input for `calc`. */
export function seriesFacts({
  attribute,
  station,
  batch,
  input,
  finding,
  calculation,
  when,
}: Of): FigureFacts {
  const { label, unit, words } = attribute
  const value = (number: number) =>
    words ? `${shownWithUnit(attribute, number)} (${exactly(number)})` : exactly(number, unit)
  const { band, leavesAtLow: low, leavesAtHigh: high } = finding
  const counted = finding.points.filter((point) => point.counted)
  return factsOf(driftMethod, {
    name: `${label} at ${station}, batch ${batch}`,
    result: finding.standing.charAt(0).toUpperCase() + finding.standing.slice(1),
    when,
    values: {
      latest:
        finding.latest === null ? null : `${value(finding.latest)}, week ${exactly(finding.latestTime ?? 0)}`,
      used: finding.used === null ? null : exactly(100 * finding.used, '%'),
      rules: finding.rules.length > 0 ? rulesText(finding) : 'none',
      band: bandText(band, value),
      tolerance: toleranceText(input.tolerance, unit),
      initial: `${value(finding.initial)}${input.initial.length > 1 ? ` of ${input.initial.length}` : ''}`,
      n: counted.length,
      doubted: finding.points.length - counted.length || null,
      slope:
        finding.slope === null ? null : exactly(finding.slope, unit === '' ? 'a week' : `${unit} a week`),
      slopeP: finding.slopeP,
      residualSd: finding.residualSd === null ? null : exactly(finding.residualSd, unit),
      s: exactly(input.repeatabilitySd, unit),
      leavesAt: finding.leavesAt,
      leavesBetween:
        low === null && high === null ? null : `${weekOr(low, 'not before')} to ${weekOr(high, 'no end')}`,
      endTime: input.endTime,
      coldest: input.coldest ? `${input.coldest.times.length} times` : 'there is none',
    },
    ...(calculation ? { input: calculation.input } : {}),
  })
}

function rulesText({ rules }: SeriesFinding): string {
  return [
    ...new Set(
      rules.map(
        ({ rule, at }) => `${ruleMethods[rule].name.toLowerCase()} in week ${exactly(Number(at.toFixed(1)))}`,
      ),
    ),
  ].join('; ')
}

function weekOr(time: number | null, otherwise: string): string {
  return time === null ? otherwise : exactly(time)
}

function bandText({ lower, upper }: SeriesFinding['band'], value: (number: number) => string): string {
  if (lower === null) return upper === null ? 'open' : `at most ${value(upper)}`
  return upper === null ? `at least ${value(lower)}` : `${value(lower)} to ${value(upper)}`
}

export function toleranceText(tolerance: Tolerance, unit: string): string {
  if (tolerance.kind === 'range') {
    const { lower = null, upper = null } = tolerance
    return `range, ${bandText({ lower, upper }, (number) => exactly(number, unit))}`
  }
  const of = tolerance.kind === 'percent' ? '% of the initial' : `${unit} from the initial`.trim()
  const { below, above } = tolerance
  const sides = [
    below === undefined ? '' : `${exactly(below)} below`,
    above === undefined ? '' : `${exactly(above)} above`,
  ].filter(Boolean)
  return `${sides.join(', ')}, ${of}`
}
