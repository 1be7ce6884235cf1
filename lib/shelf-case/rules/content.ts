import type { shelfLife } from '@/lib/science/shelf-life'
import type { extrapolationCap } from '@/lib/science/extrapolation-cap'

/** What a case freezes. Every printed figure is in here, with the exact input it was computed from. */
export type CaseContent = {
  format: 'stillstand-case-1'
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
  limit: string
  n: number
  basis: 'regression' | 'observed'
  /** How y of the calculation follows from the readings. */
  scale: string
  calc: { topic: 'shelf-life'; input: ShelfLifeInput; output: ShelfLifeOutput } | null
  /** Months at which the bound meets the limit; null where it stays inside up to the horizon, or not asked. */
  crossingMonths: number | null
  supportedMonths: number
  decidedBy: string | null
  worst: { batch: string; months: number; value: number } | null
  band: { lower: number | null; upper: number | null; initial: number | null }
  reading: { batch: string; months: number }[]
}

export type ShelfEvidence = {
  label: string
  temperatureC: number | null
  isFreezeThaw: boolean
  voice: string
  batch: string
  jars: { months: number; topPercent: number; bottomPercent: number; percent: number; standing: string }[]
}

export type TemperatureRecord = {
  station: string
  calc: {
    topic: 'mkt'
    input: { temperaturesC: number[]; hoursEach: number[] }
    output: { mktC: number; meanC: number; minC: number; maxC: number }
  }
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
