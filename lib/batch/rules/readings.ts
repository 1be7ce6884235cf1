import { readDecimal } from '@/lib/number/rules'
import { centrifuge } from '@/lib/science/centrifuge'
import { mean } from '@/lib/science/mean'
import { viscosity, viscosityFactor } from '@/lib/science/viscosity'
import { dropsOf, dropSizes, readDrops, type Drops } from './droplets'
import type { BatchAttribute, BatchReadingDetail } from '../schema'

export const measured: Record<
  BatchAttribute,
  { label: string; unit: string; possible: { lower: number; upper: number } | null }
> = {
  look: { label: 'Look', unit: '', possible: null },
  ph: { label: 'pH', unit: '', possible: { lower: 0, upper: 14 } },
  viscosity: { label: 'Viscosity', unit: 'mPa·s', possible: { lower: 1, upper: 100_000_000 } },
  density: { label: 'Density', unit: 'g/mL', possible: { lower: 0.2, upper: 2 } },
  centrifuge: { label: 'Centrifuge', unit: '% separated', possible: { lower: 0, upper: 100 } },
  droplets: { label: 'Droplets', unit: 'micrometres', possible: dropSizes },
  temperature: { label: 'Temperature', unit: '°C', possible: { lower: -50, upper: 200 } },
}

type Typed = { attribute: BatchAttribute; typed: string; detail: BatchReadingDetail }
/** What the server makes of the details. */
export type KeptDetail = BatchReadingDetail & { rcf?: number; drops?: Drops }
export type BatchValue = { value: number | null; detail: KeptDetail }
export type NoValue = { field: string; sentence: string }

/** The value of what was typed, or why it is none and at which field. */
export function batchValue(
  { attribute, typed, detail }: Typed,
  spindles: readonly { name: string; constant: number }[],
): BatchValue | NoValue {
  const { label, unit, possible } = measured[attribute]
  if (possible === null) return { value: null, detail }
  if (attribute === 'droplets') return fromDrops(typed, detail)
  const number = readDecimal(typed)
  if (number === null) {
    return { field: 'typed', sentence: `${label} is a number, with one comma or point. Type it again.` }
  }
  if (attribute === 'viscosity' && detail.spindle) return fromTorque(number, detail, spindles)
  if (number < possible.lower || number > possible.upper) {
    const said = `${label} runs from ${possible.lower} to ${possible.upper}${unit ? ` ${unit}` : ''}.`
    return { field: 'typed', sentence: `${said} Type it again.` }
  }
  if (attribute !== 'centrifuge') return { value: number, detail }
  const { rpm, radiusMm, minutes } = detail
  if (!rpm) return { field: 'detail.rpm', sentence: 'Give the speed of the rotor in rpm.' }
  if (!radiusMm) return { field: 'detail.radiusMm', sentence: 'Give the radius of the rotor in mm.' }
  if (!minutes) return { field: 'detail.minutes', sentence: 'Give the minutes that it ran.' }
  const { rcf } = centrifuge({ rpm, radiusMm })
  return { value: number, detail: { ...detail, rcf } }
}

/** The Sauter mean of what was counted: what a film's thickness goes by. */
function fromDrops(typed: string, detail: BatchReadingDetail): BatchValue | NoValue {
  const counted = readDrops(typed)
  if (typeof counted === 'string') return { field: 'typed', sentence: counted }
  const drops = dropsOf(counted)
  if (!drops) return { value: counted.diametersUm[0] ?? null, detail }
  return { value: Number(drops.d32.toPrecision(12)), detail: { ...detail, drops } }
}

function fromTorque(
  torquePercent: number,
  detail: BatchReadingDetail,
  spindles: readonly { name: string; constant: number }[],
): BatchValue | NoValue {
  if (torquePercent <= 0 || torquePercent > 110) {
    return {
      field: 'typed',
      sentence: 'Torque runs from 0 to 100 %, and at 0 % the spindle turns in nothing. Read it again.',
    }
  }
  if (!detail.rpm) return { field: 'detail.rpm', sentence: 'Say how fast the spindle turned, in rpm.' }
  const spindle = spindles.find(({ name }) => name === detail.spindle)
  if (!spindle) {
    return {
      field: 'detail.spindle',
      sentence: `The constant of spindle ${detail.spindle} is not known here. Choose the instrument that it belongs to, or give mPa·s.`,
    }
  }
  const { mPas } = viscosity({ torquePercent, factor: viscosityFactor(spindle.constant, detail.rpm) })
  return {
    value: Number(mPas.toPrecision(12)),
    detail: { ...detail, torquePercent, spindleConstant: spindle.constant },
  }
}

type Reading = {
  id: string
  moment: string
  attribute: string
  replicate: number
  value: number | null
  supersedes: string | null
}

/** Readings that count; a corrected one stays on record. */
export function currentReadings<R extends Pick<Reading, 'id' | 'supersedes'>>(readings: readonly R[]): R[] {
  const superseded = new Set(readings.map((reading) => reading.supersedes))
  return readings.filter((reading) => !superseded.has(reading.id))
}

/** The mean of an attribute's replicates, as the study's initial takes it; null where there is no number. */
export function initialOf(readings: readonly Reading[], moment: string, attribute: BatchAttribute) {
  const values = currentReadings(readings).flatMap((reading) =>
    reading.moment === moment && reading.attribute === attribute && reading.value !== null
      ? [reading.value]
      : [],
  )
  return values.length ? mean(values) : null
}

type ForStudy = Reading & { typed: string; detail: BatchReadingDetail; instrumentId: string | null }
type Asked = { attribute: string; torque: { spindle: string; rpm: number } | null; replicates: number }

/**
 * What a study's start takes from the batch: its initial as it is to be typed there. A torque serves only where it was
 * read with the protocol's spindle and speed.
 */
export function initialForStudy(readings: readonly ForStudy[], asked: Asked) {
  const own = currentReadings(readings)
    .filter((reading) => reading.moment === 'initial' && reading.attribute === asked.attribute)
    .filter((reading) => reading.value !== null)
    .toSorted((a, b) => a.replicate - b.replicate)
    .slice(0, asked.replicates)
  const { torque } = asked
  const isSame = ({ detail }: ForStudy) => detail.spindle === torque?.spindle && detail.rpm === torque?.rpm
  if (!own.length || (torque && !own.every(isSame))) return null
  return {
    texts: own.map((reading) => (torque || asked.attribute === 'ph' ? reading.typed : String(reading.value))),
    instrumentId: own.find((reading) => reading.instrumentId)?.instrumentId ?? null,
  }
}

/** [practice] Closure torque is measured on the first jar and on every tenth after it. */
export const torqueEvery = 10
export const isTorqueJar = (number: number) => (number - 1) % torqueEvery === 0

/** pH is read as the emulsion lets one: water outside directly, oil outside in an extract. */
export const phPaths = ['direct', 'extract', 'water phase'] as const
export const phPathFor = (emulsionType: string) =>
  emulsionType === 'oil-in-water' ? ('direct' as const) : ('extract' as const)
