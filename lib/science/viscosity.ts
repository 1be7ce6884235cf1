import { assertComputable, assertPositive, ScienceError } from './guard'
import { apartFrom } from './rounding'

/** Torque is read between these, in % of full scale [practice]. */
export const torqueRange = { low: 10, high: 100 } as const
/** Accuracy of the instrument in % of full scale [practice]. */
const fullScaleErrorPercent = 1

/** `factor` is mPa·s per % torque; otherwise it comes from spindle and speed. */
export type ViscosityInput = {
  torquePercent: number
  /** Distance from the initial to the nearer edge of the band in % of the value, where it is known. */
  bandPercent?: number
} & ({ factor: number } | { spindleConstant: number; rpm: number })

export type Viscosity = {
  mPas: number
  fullScalemPas: number
  errorPercent: number
  doubt: string | null
}

/** mPa·s per % torque from the constant of spindle and spring class, and the speed. */
export function viscosityFactor(spindleConstant: number, rpm: number): number {
  assertPositive('spindleConstant', spindleConstant)
  assertPositive('rpm', rpm)
  return assertComputable('spindleConstant', spindleConstant / rpm)
}

/**
 * η = torque % × factor; full scale = 100 × factor; at ±1 % of full scale the error is 100 ÷ torque % percent.
 * ISO 2555 describes the single-cylinder method and does not cover T-bars [memory].
 */
export function viscosity(input: ViscosityInput): Viscosity {
  const { torquePercent, bandPercent } = input
  assertPositive('torquePercent', torquePercent)
  const factor = 'factor' in input ? input.factor : viscosityFactor(input.spindleConstant, input.rpm)
  assertPositive('factor', factor)
  return assertComputable('torquePercent', {
    mPas: torquePercent * factor,
    fullScalemPas: 100 * factor,
    errorPercent: torqueErrorPercent(torquePercent),
    doubt: torqueDoubt(torquePercent, bandPercent),
  })
}

/** Error of a reading in % of it, from ±1 % of full scale. */
export function torqueErrorPercent(torquePercent: number): number {
  assertPositive('torquePercent', torquePercent)
  return (100 * fullScaleErrorPercent) / torquePercent
}

/** Why a reading at this torque may not be trusted, or null. */
export function torqueDoubt(torquePercent: number, bandPercent?: number): string | null {
  const error = torqueErrorPercent(torquePercent)
  if (torquePercent < torqueRange.low) {
    return `Torque is ${apartFrom(torqueRange.low, torquePercent)} %, under ${torqueRange.low} %: the reading is uncertain by ${show(error)} %`
  }
  if (torquePercent > torqueRange.high) {
    return `Torque is ${apartFrom(torqueRange.high, torquePercent)} %, beyond the end of the scale`
  }
  if (bandPercent !== undefined) {
    if (!(bandPercent >= 0)) throw new ScienceError('bandPercent', 'must not be negative')
    if (error > bandPercent / 3) {
      return `At ${show(torquePercent)} % torque the reading is uncertain by ${show(error)} %, more than a third of the band`
    }
  }
  return null
}

/** The same for a reading of `value` whose initial lies `room` away from the nearer edge of its band. */
export function torqueDoubtWithin(torquePercent: number, room: number, value: number): string | null {
  return torqueDoubt(torquePercent, bandShare(room, value))
}

/** The way to the nearer edge in % of the reading; undefined where there is no edge. */
export function bandShare(room: number, value: number): number | undefined {
  return Number.isFinite(room) && value !== 0 ? (100 * Math.max(0, room)) / Math.abs(value) : undefined
}

function show(percent: number): string {
  return percent.toFixed(1)
}
