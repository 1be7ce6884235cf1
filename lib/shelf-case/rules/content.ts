import type { OwnAttribute } from '@/lib/reading/schema/own'
import type { assessSeries } from '@/lib/science/drift'
import type { extrapolationCap } from '@/lib/science/extrapolation-cap'
import type { mkt } from '@/lib/science/mkt'
import type { separation } from '@/lib/science/separation'
import type { SeriesInput } from '@/lib/science/series'
import type { shelfLife } from '@/lib/science/shelf-life'
import type { TemperatureLimits } from '@/lib/science/temperature-log'

/** What `npm run calc -- TOPIC` makes again to the last digit: topic, exact input and answer. */
export type Calculation<Topic extends string, Input, Output> = { topic: Topic; input: Input; output: Output }

export type DriftInput = Pick<SeriesInput, 'initial' | 'tolerance' | 'endTime' | 'repeatabilitySd'> & {
  times: number[]
  values: number[][]
  coldest?: { times: number[]; values: number[] }
  detectionLimit?: number
  settled?: { time: number; rule: 'jump' | 'spread' | 'out' }[]
}
type DriftAnswer =
  ('band' | 'standing' | 'used' | 'slope' | 'slopeP' | 'leavesAt' | 'leavesAtLow' | 'leavesAtHigh') | 'rules'
export type DriftCalculation = Calculation<
  'drift',
  DriftInput,
  Pick<ReturnType<typeof assessSeries>, DriftAnswer>
>

/**
 * What a case freezes: every printed figure, with the exact input of the calculation it comes from. Cases frozen in
 * format 1 stay as they are and lack what is marked "since format 2".
 */
export type CaseContent = {
  format: 'stillstand-case-1' | 'stillstand-case-2'
  lab: { name: string; timeZone: string }
  case: { code: string; kind: 'real time' | 'provisional' }
  study: { code: string; title: string; startedOn: string; lastReadOn: string; endWeeks: number }
  batches: { code: string; formula: string; emulsionType: string; madeOn: string | null }[]
  station: { name: string; temperatureC: number; voice: string; timePointsMonths: number[] }
  proposal: {
    months: number
    storageStatement: string
    whyFewer: string
    provisionalRule: string
    reviewOn: string | null
    periodAfterOpeningMonths: number | null
    periodAfterOpeningEvidence: string
  }
  supportedMonths: number
  limitingAttribute: string | null
  dataMonths: number
  cap: {
    /** Since format 2. */
    topic?: 'extrapolation-cap'
    input: Parameters<typeof extrapolationCap>[0]
    output: ReturnType<typeof extrapolationCap>
    why: string
  } | null
  attributes: AttributeEvidence[]
  shelves: ShelfEvidence[]
  temperatureRecord: TemperatureRecord | null
  weakens: Weakness[]
  missing: { jar: string; station: string; label: string; reason: string }[]
  readings: ReadingEvidence[]
  /** What outside laboratories reported; left out where there is none. */
  outside?: OutsideEvidence[]
  putForward: { by: string; initials: string; at: string }
  /** Put forward by an invented person of the demo: the report says so on every page. */
  isInvented: boolean
}

export type ShelfLifeInput = Parameters<typeof shelfLife>[0]
export type ShelfLifeOutput = ReturnType<typeof shelfLife>

export type AttributeEvidence = {
  attribute: string
  label: string
  unit: string
  /** What an attribute of the protocol's own is. */
  own?: OwnAttribute
  limit: string
  n: number
  basis: 'regression' | 'observed'
  /** How y of the calculation follows from the readings. */
  scale: string
  calc: Calculation<'shelf-life', ShelfLifeInput, ShelfLifeOutput> | null
  /** Months at which the bound meets the limit; null where it stays inside up to the horizon, or not asked. */
  crossingMonths: number | null
  supportedMonths: number
  decidedBy: string | null
  worst: { batch: string; months: number; value: number } | null
  band: { lower: number | null; upper: number | null; initial: number | null }
  reading: { batch: string; months: number }[]
  /** How each batch stands at the station of the case: band, worst reading and last time passed. Since format 2. */
  series?: { batch: string; calc: DriftCalculation | null }[]
}

/** It supports and computes nothing: microbiology and preservation belong to qualified laboratories. */
export type OutsideEvidence = {
  what: string
  test: string
  batch: string | null
  weeks: number | null
  outcome: string
  value: string
  labName: string
  reportNumber: string
  reportedOn: string
  by: string
  /** Of the document. */
  sha256: string
}

export type ShelfEvidence = {
  label: string
  temperatureC: number | null
  isFreezeThaw: boolean
  voice: string
  batch: string
  jars: {
    months: number
    topPercent: number
    bottomPercent: number
    percent: number
    standing: string
    /** The layers drawn, from the heights measured. Since format 2. */
    calc?: Calculation<'separation', Parameters<typeof separation>[0], ReturnType<typeof separation>> | null
  }[]
  /** The jars' separation and standings. Since format 2. */
  calc?: DriftCalculation | null
}

export type TemperatureRecord = {
  station: string
  calc: Calculation<'mkt', Parameters<typeof mkt>[0], ReturnType<typeof mkt>>
  /** What the excursions are found from: the first entry, hours since it, the station's limits. Since format 2. */
  log?: { firstAt: string; hours: number[]; limits: TemperatureLimits }
  /** Where the jars were moved: each station in turn, with how many of the entries are its own, and its limits. */
  stays?: { station: string; fromAt: string; entries: number; limits: TemperatureLimits }[]
  excursions: { from: string; to: string; hours: number; worstC: number }[]
}

export type Weakness = {
  state: 'stands' | 'answered' | 'missing'
  title: string
  text: string
  by: string | null
}

export type ReadingEvidence = {
  batch: string
  station: string
  jar: string
  weeks: number
  attribute: string
  replicate: number
  typed: string
  value: number | null
  word: string | null
  measuredAt: string
  recordedAt: string
  by: string
  state: 'counts' | 'does not count' | 'superseded' | 'void'
  reason: string | null
}
