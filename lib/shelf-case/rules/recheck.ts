import { extrapolationCap } from '@/lib/science/extrapolation-cap'
import { nominalMonths } from '@/lib/science/months'
import { separation } from '@/lib/science/separation'
import { shelfLife } from '@/lib/science/shelf-life'
import { hoursOfEntries } from '@/lib/science/temperature-log'
import {
  bandOf,
  lastPassedMonths,
  regressionInput,
  regressionMonths,
  worstOf,
} from '@/lib/shelf-case/rules/attribute'
import { limitingOf, reachedMonths } from '@/lib/shelf-case/rules/build'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'
import type { AttributeEvidence, CaseContent, DriftCalculation } from '@/lib/shelf-case/rules/content'
import { findingOf } from '@/lib/shelf-case/rules/drift-calculation'
import { excursionsOf } from '@/lib/shelf-case/rules/temperature'
import { weaknesses } from '@/lib/shelf-case/rules/weakness'
import type { AttributeKey } from '@/lib/reading/schema/attributes'

/** A figure as the case states it, and as it comes out again. */
export type Rechecked = { what: string; stated: unknown; again: unknown }

/** In every digit, wherever the members stand. */
export function isSame({ stated, again }: Rechecked): boolean {
  return canonicalJson(stated ?? null) === canonicalJson(again ?? null)
}

export type Stated = { where: string; topic: string; input: unknown; output: unknown }

/** Every calculation that stands anywhere in the content, with its place. */
export function calculationsOf(content: CaseContent): Stated[] {
  const found: Stated[] = []
  const visit = (value: unknown, where: string) => {
    if (value === null || typeof value !== 'object') return
    const { label, batch, topic, input, output } = value as Record<string, unknown>
    const names = [label, batch].filter((name) => typeof name === 'string')
    const here = names.length > 0 ? `${where} (${names.join(', ')})` : where
    if (input !== undefined && output !== undefined) {
      // The cap of a case frozen in format 1 does not name its topic.
      found.push({
        where: here,
        topic: typeof topic === 'string' ? topic : 'extrapolation-cap',
        input,
        output,
      })
      return
    }
    for (const [key, member] of Object.entries(value))
      visit(member, Array.isArray(value) ? `${here}[${key}]` : here === '' ? key : `${here}.${key}`)
  }
  visit(content, '')
  return found
}

/**
 * Every figure of a case that is no answer of a calculation itself but follows from one: made again from the inputs
 * alone. What a case of format 1 lacks is not asked of it.
 */
export function figuresOf(content: CaseContent): Rechecked[] {
  const cap = content.cap && extrapolationCap(content.cap.input)
  const capMonths = cap?.capMonths ?? Infinity
  const attributes = content.attributes.map((a) => ({ a, again: attributeAgain(a, content, capMonths) }))
  const limiting = limitingOf(
    attributes.map(({ a, again }) => ({
      attribute: a.attribute,
      supportedMonths: again.supportedMonths ?? a.supportedMonths,
    })),
  )
  const reached = dataMonthsAgain(content)
  return [
    figure('supported months', content.supportedMonths, limiting?.supportedMonths ?? 0),
    figure('attribute that limits', content.limitingAttribute, limiting?.attribute ?? null),
    ...(reached === null ? [] : [figure('months of data', content.dataMonths, reached)]),
    ...(content.cap
      ? [figure('months of data in the cap', content.cap.input.dataMonths, content.dataMonths)]
      : []),
    ...attributes.flatMap(({ a, again }) =>
      Object.entries(again).map(([name, value]) =>
        figure(`${a.label}: ${names[name as keyof Again]}`, statedOf(a)[name as keyof Again], value),
      ),
    ),
    ...shelfFigures(content),
    ...weaknessFigures(content),
    ...temperatureFigures(content),
  ]
}

const figure = (what: string, stated: unknown, again: unknown): Rechecked => ({ what, stated, again })

type Again = Partial<
  Pick<AttributeEvidence, 'n' | 'crossingMonths' | 'supportedMonths' | 'decidedBy' | 'worst' | 'band'>
> & { input?: unknown; scale?: string }

const names: Record<keyof Again, string> = {
  n: 'readings',
  crossingMonths: 'month in which the bound meets the limit',
  supportedMonths: 'supported months',
  decidedBy: 'batch that decides',
  worst: 'worst latest reading',
  band: 'band',
  input: 'what the regression was given, from the readings',
  scale: 'scale of the regression',
}

function statedOf(a: AttributeEvidence): Again {
  return { ...a, input: a.calc?.input }
}

function attributeAgain(a: AttributeEvidence, content: CaseContent, capMonths: number): Again {
  const output = a.calc && shelfLife(a.calc.input)
  const regressed: Again = output
    ? {
        crossingMonths: output.crossing,
        supportedMonths: regressionMonths(output.crossing, capMonths),
        decidedBy: output.crossing === null ? null : output.limitingBatch,
      }
    : {}
  const judged = (a.series ?? []).flatMap(({ batch, calc }) =>
    calc ? [{ batch, calc, finding: findingOf(calc.input) }] : [],
  )
  if (judged.length === 0 || judged.length < (a.series ?? []).length) return regressed
  const least = judged
    .map(({ batch, finding }) => ({ batch, months: lastPassedMonths(finding) }))
    .reduce((min, b) => (b.months < min.months ? b : min))
  return {
    ...(output ? regressed : { supportedMonths: Math.floor(least.months), decidedBy: least.batch }),
    worst: worstOf(judged),
    band: bandOf(judged),
    ...fromReadings(a, content, judged),
  }
}

/** The regression's input once more, from the readings that the report lists. */
function fromReadings(
  a: AttributeEvidence,
  content: CaseContent,
  judged: { batch: string; calc: DriftCalculation; finding: { initial: number } }[],
): Again {
  const batches = judged.map(({ batch, finding }) => ({
    batch,
    initial: finding.initial,
    observations: content.readings.flatMap((r) =>
      r.batch === batch &&
      r.attribute === a.attribute &&
      r.state === 'counts' &&
      r.value !== null &&
      (r.station === 'initial' || r.station === content.station.name)
        ? [{ weeks: r.weeks, value: r.value }]
        : [],
    ),
  }))
  const n = batches.flatMap((b) => b.observations).length
  const [first] = judged
  if (!a.calc || !first) return { n }
  const planned = { attribute: a.attribute as AttributeKey, tolerance: first.calc.input.tolerance }
  return { n, ...regressionInput(planned, batches) }
}

function dataMonthsAgain(content: CaseContent): number | null {
  const series = content.attributes.flatMap((a) => a.series ?? [])
  if (series.length === 0 || series.some(({ calc }) => calc === null)) return null
  return reachedMonths(
    content.batches.map(({ code }) =>
      series.flatMap(({ batch, calc }) => (batch === code && calc ? findingOf(calc.input).points : [])),
    ),
  )
}

function shelfFigures(content: CaseContent): Rechecked[] {
  return content.shelves.flatMap((shelf) => {
    const at = `separation at ${shelf.label} of ${shelf.batch}`
    const layers = shelf.jars.flatMap((jar) => {
      if (!jar.calc) return []
      const { topPercent, bottomPercent } = separation(jar.calc.input)
      const stated = { topPercent: jar.topPercent, bottomPercent: jar.bottomPercent }
      return [figure(`${at}: layers, month ${jar.months.toFixed(1)}`, stated, { topPercent, bottomPercent })]
    })
    if (!shelf.calc) return layers
    // A day of which nothing took part is drawn as it was read; it is no figure of the rules.
    const points = findingOf(shelf.calc.input).points
    const again = points.map((p) => ({
      months: nominalMonths(p.time),
      percent: p.mean,
      standing: p.standing,
    }))
    const told = new Set(again.map((p) => p.months))
    const stated = shelf.jars
      .filter((jar) => told.has(jar.months))
      .map(({ months, percent, standing }) => ({ months, percent, standing }))
    return [figure(`${at}: percent and standing of each jar`, stated, again), ...layers]
  })
}

/** Doubts that the figures themselves raise; those of flags are quoted from the record. */
function weaknessFigures(content: CaseContent): Rechecked[] {
  if (content.format === 'stillstand-case-1') return []
  const computed = weaknesses({
    ...content,
    flags: [],
    amendments: [],
    moves: [],
    stations: [],
    record: content.temperatureRecord,
    missing: [],
  })
  const stated = content.weakens.filter((w) => w.state === 'stands' && !/^Flag \d+ is open$/.test(w.title))
  return [figure('doubts that the figures raise', stated, computed)]
}

function temperatureFigures({ temperatureRecord: record }: CaseContent): Rechecked[] {
  if (!record?.log) return []
  const { hoursEach } = record.calc.input
  return [
    figure('hours that each temperature stands for', hoursEach, hoursOfEntries(record.log.hours)),
    figure('excursions of the station', record.excursions, excursionsOf(record)),
  ]
}
