import { askedAt } from '@/lib/protocol/rules/plan'
import type { PlannedAttribute, ProtocolPlan } from '@/lib/protocol/schema'
import { askedConditions, methodText, type Conditions } from '@/lib/reading/rules/conditions'
import { attributeOf, type Attribute, type AttributeKey } from '@/lib/reading/schema/attributes'
import { toleranceBand } from '@/lib/science/band'
import { ScienceError } from '@/lib/science/guard'
import type { Band, Standing } from '@/lib/science/series'
import type { Written } from '@/lib/study/rules/words'
import { dayIn } from '@/lib/study/rules/calendar'
import type { CurrentSeries, InitialMean, LastReading } from './queries/values'

export type LastValue = {
  readingId: string
  value: number | null
  word: string | null
  typed: string
  measuredAt: string
  /** The lab's day. */
  day: string
  jarCode: string | null
  by: string
  detail: Record<string, unknown>
}

/** One thing to measure on a jar, with everything that stands beside its field. */
export type BenchField = {
  attribute: AttributeKey
  label: string
  unit: string
  kind: Attribute['kind']
  decimals: Attribute['decimals']
  words: readonly string[] | null
  possible: Attribute['possible']
  replicates: number
  method: string
  /** Given where torque is typed: mPa·s = torque % × spindleConstant ÷ rpm. */
  viscosity: { spindle: string; spindleConstant: number; rpm: number } | null
  /** What the protocol says of it, as a value is made of what is typed. */
  planned: PlannedAttribute
  /** How the batch's own initial was come by, and what its emulsion is: a difference is told from them. */
  initialDetail: Record<string, unknown> | null
  emulsionType: string | null
  band: Band | null
  initial: number | null
  /** Under which the initial was read, else what the method says. */
  conditions: Conditions
  /** The newest first; one on the Bench, three on a jar's own screen. */
  last: LastValue[]
  standing: Standing
  used: number | null
}

export type JarOfBench = {
  studyId: string
  batchId: string
  studyStationId: string
  asks: string
  attribute: string | null
  plan: ProtocolPlan
  emulsionType: string | null
  /** Of its station in the plan. */
  position: number
  timeWeeks: number
}

export type Values = {
  zone: string
  series: CurrentSeries[]
  readings: LastReading[]
  initials: InitialMean[]
}

/** What the protocol asks of this jar: a watch jar stays sealed, a repeat answers one question. */
export function plannedFor(
  jar: Pick<JarOfBench, 'asks' | 'attribute' | 'plan' | 'position' | 'timeWeeks'>,
): PlannedAttribute[] {
  if (jar.asks === 'repeat')
    return jar.plan.attributes.filter((planned) => planned.attribute === jar.attribute)
  const kind = jar.asks === 'watch' ? 'watch' : 'measuring'
  return askedAt(jar.plan, jar.plan.stations[jar.position], jar.timeWeeks, kind)
}

/** How a value of this jar is written, also of what it was once asked and is no more. */
export function writtenAs(fields: BenchField[], key: string): Written {
  return fields.find((field) => field.attribute === key) ?? attributeOf(key, undefined)
}

export function fieldsOf(jar: JarOfBench, values: Values): BenchField[] {
  return plannedFor(jar).map((planned) => fieldOf(planned, jar, values))
}

function fieldOf(planned: PlannedAttribute, jar: JarOfBench, values: Values): BenchField {
  const { key, ...attribute } = attributeOf(planned.attribute, planned)
  const isHere = (row: { studyId: string; batchId: string; attribute: string }) =>
    row.studyId === jar.studyId && row.batchId === jar.batchId && row.attribute === key
  const series = values.series.find((row) => isHere(row) && row.studyStationId === jar.studyStationId)
  const atStart = values.initials.find(isHere)
  const initial = series?.initial ?? atStart?.value ?? null
  return {
    attribute: planned.attribute,
    label: attribute.label,
    unit: attribute.unit,
    kind: attribute.kind,
    decimals: attribute.decimals,
    words: attribute.words ?? null,
    possible: attribute.possible,
    replicates: jar.asks === 'watch' ? 1 : planned.replicates,
    method: methodText(planned),
    viscosity: planned.viscosity ?? null,
    planned,
    initialDetail: atStart?.detail ?? null,
    emulsionType: jar.emulsionType,
    conditions: askedConditions(atStart?.detail ?? null, planned),
    band: series?.band ?? bandFrom(planned, initial),
    initial,
    last: values.readings
      .filter((row) => isHere(row) && row.studyStationId === jar.studyStationId)
      .map((row) => lastValue(row, values.zone)),
    standing: series?.standing ?? 'untold',
    used: series?.used ?? null,
  }
}

function lastValue(row: LastReading, zone: string): LastValue {
  const { value, word, typed, measuredAt, jarCode, by, detail } = row
  return {
    readingId: row.id,
    value,
    word,
    typed,
    measuredAt,
    day: dayIn(zone, measuredAt),
    jarCode,
    by,
    detail,
  }
}

/** Before the first reading there is no series yet, but there is a band to stay in. */
function bandFrom(planned: PlannedAttribute, initial: number | null): Band | null {
  if (initial === null && planned.tolerance.kind !== 'range') return null
  try {
    return toleranceBand(planned.tolerance, initial ?? 0)
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

const worstFirst: Standing[] = ['out', 'leaning', 'steady', 'untold']

/** How the jar's glyph stands: as the worst of its batch's series at its station. */
export function worstStanding(standings: Standing[]): Standing {
  return worstFirst.find((standing) => standings.includes(standing)) ?? 'untold'
}

export type Layers = { topPercent: number; bottomPercent: number }

/** What the jar's glyph holds: the layers last measured in it, else in its sisters at the station. */
export function layersOf(readings: LastReading[], jar: JarOfBench & { jarId: string }): Layers | null {
  const here = readings.filter(
    (row) =>
      row.attribute === 'separation' &&
      row.studyId === jar.studyId &&
      row.batchId === jar.batchId &&
      row.studyStationId === jar.studyStationId,
  )
  const row = here.find((reading) => reading.jarId === jar.jarId) ?? here[0]
  if (!row) return null
  const { topPercent, bottomPercent } = row.detail
  return { topPercent: Number(topPercent ?? 0), bottomPercent: Number(bottomPercent ?? 0) }
}
