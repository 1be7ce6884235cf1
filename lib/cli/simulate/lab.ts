import type { Tolerance } from '../../science/series'
import type { Chance } from './chance'

/** How a lab measures one attribute, in the unit of the attribute. */
export type Method = {
  attribute: 'ph' | 'viscosity' | 'separation'
  tolerance: Tolerance
  /** What the emulsion truly is on the day it is made. */
  start: number
  /** SD of one replicate at the start value. */
  repeatability: number
  /** The error grows with the value. */
  isRelative: boolean
  replicates: number
  /** As it is displayed, so as it is typed. */
  shown: (value: number) => number
  digits: (value: number) => string
  /** Distance from the start to the edge. */
  room: number
  /** Separation has one side only; so have no choice of direction. */
  isOneSided: boolean
  detectionLimit?: number
}

/** One lab's way of working, fixed here: nothing of it is tuned on what the table reports. */
export type Lab = Record<'ph' | 'viscosity' | 'separation', Method>

/** Repeatability of pH in units, of viscosity as a share, of separation in points of fill height. */
export type Repeatability = { ph: number; viscosity: number; separation: number; detectionLimit: number }

export const lotionRepeatability: Repeatability = {
  ph: 0.03,
  viscosity: 0.04,
  separation: 0.5,
  detectionLimit: 1,
}

/** A cream of high internal phase in a jar filled 45 mm high: what is read is a millimetre of it. */
export const packedCreamRepeatability: Repeatability = {
  ph: 0.1,
  viscosity: 0.08,
  separation: 100 / 45,
  detectionLimit: 100 / 45,
}

export type Tolerances = { ph: number; viscosityPercent: number; separation: number }

/** pH units and percent each way from the initial, and points of fill height. */
export const tolerances: Tolerances = { ph: 0.5, viscosityPercent: 25, separation: 5 }
/** As tight as some brands ask for: printed, to show what such a band costs. */
export const narrowTolerances: Tolerances = { ph: 0.3, viscosityPercent: 15, separation: 2 }

export const stations = [
  { name: '5 °C', temperatureC: 5, rate: 0.1, isFreezeThaw: false },
  { name: '25 °C', temperatureC: 25, rate: 0.35, isFreezeThaw: false },
  { name: '40 °C', temperatureC: 40, rate: 1, isFreezeThaw: false },
  { name: '45 °C', temperatureC: 45, rate: 1.4, isFreezeThaw: false },
  // Half of each cycle is spent at room temperature, half frozen: it ages as the 25 °C station does at most.
  { name: 'freeze-thaw', temperatureC: -10, rate: 0.35, isFreezeThaw: true },
] as const
export const hottest = 3
/** Rates are relative to 40 °C; drifts are said in shares of the hottest station's. */
export const shareOfHottest = (station: number) => stations[station]!.rate / stations[hottest]!.rate

export const dayError = { shareOfRepeatability: 0.5, perWeek: 0.7 } as const
export const missingPulls = 0.03
export const blunders = 0.005

export function labWith(repeatability: Repeatability, tolerance: Tolerances = tolerances): Lab {
  return {
    ph: {
      attribute: 'ph',
      tolerance: { kind: 'shift', below: tolerance.ph, above: tolerance.ph },
      start: 5.5,
      repeatability: repeatability.ph,
      isRelative: false,
      replicates: 1,
      shown: (value) => Math.round(value * 100) / 100,
      digits: (value) => value.toFixed(2),
      room: tolerance.ph,
      isOneSided: false,
    },
    viscosity: {
      attribute: 'viscosity',
      tolerance: { kind: 'percent', below: tolerance.viscosityPercent, above: tolerance.viscosityPercent },
      start: 40_000,
      repeatability: repeatability.viscosity * 40_000,
      isRelative: true,
      replicates: 2,
      shown: (value) => Number(value.toPrecision(3)),
      digits: (value) => String(Number(value.toPrecision(3))),
      room: (tolerance.viscosityPercent / 100) * 40_000,
      isOneSided: false,
    },
    separation: {
      attribute: 'separation',
      tolerance: { kind: 'range', upper: tolerance.separation },
      start: 0,
      repeatability: repeatability.separation,
      isRelative: false,
      replicates: 1,
      shown: (value) => Math.max(0, Math.round(value * 10) / 10),
      digits: (value) => value.toFixed(1),
      room: tolerance.separation,
      isOneSided: true,
      detectionLimit: repeatability.detectionLimit,
    },
  }
}

/** The instrument's own error week by week, in repeatability SDs: it wanders and comes back. Week 0 is the initial's. */
export function dayErrors(chance: Chance, weeks: number): number[] {
  const { shareOfRepeatability, perWeek } = dayError
  const fresh = Math.sqrt(1 - perWeek ** 2)
  const errors = [shareOfRepeatability * chance.normal()]
  for (let week = 1; week <= weeks; week++) {
    errors.push(perWeek * errors[week - 1]! + fresh * shareOfRepeatability * chance.normal())
  }
  return errors
}

/** What is written down for a jar that truly is at `truth`, on an instrument that is off by so many SDs. */
export function measured(chance: Chance, method: Method, truth: number, instrument: number): number[] {
  const scale = method.isRelative && method.start !== 0 ? truth / method.start : 1
  return Array.from({ length: method.replicates }, () => {
    const value = truth + (instrument + chance.normal()) * method.repeatability * scale
    const typed = method.shown(value)
    return chance.happens(blunders) ? blundered(chance, method, typed) : typed
  })
}

function blundered(chance: Chance, method: Method, value: number): number {
  return chance.happens(0.5) ? decimalSlip(chance, value) : swappedDigits(chance, method, value)
}

export function decimalSlip(chance: Chance, value: number): number {
  return chance.happens(0.5) ? value * 10 : value / 10
}

function swappedDigits(chance: Chance, method: Method, value: number): number {
  const signs = [...method.digits(value)]
  const places = signs.flatMap((sign, i) => (/\d/.test(sign) ? [i] : []))
  if (places.length < 2) return value
  const first = chance.below(places.length - 1)
  const [a, b] = [places[first]!, places[first + 1]!]
  ;[signs[a], signs[b]] = [signs[b]!, signs[a]!]
  return Number(signs.join(''))
}
