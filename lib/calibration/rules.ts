import { percentFrom } from '@/lib/science/percent'
import { phSlope } from '@/lib/science/ph-slope'
import type { CalibrationCheck } from '@/lib/calibration/schema'

export type CalibrationResult = {
  result: 'good' | 'doubtful'
  detail: Record<string, unknown>
  /** What it showed, as a sentence. */
  sentence: string
}

/** Judges a check by the numbers typed: a meter by its slope, the others by their difference from what is known. */
export function judgeCalibration(check: CalibrationCheck): CalibrationResult {
  if (check.kind === 'meter') return judgeMeter(check)
  if (check.kind === 'viscometer') {
    const differencePercent = percentFrom(check.readMPas, check.fluidMPas)
    return judged(
      Math.abs(differencePercent) <= check.allowedPercent,
      { ...check, differencePercent },
      `The check fluid read ${signed(differencePercent, 1)} % from its value, allowed ${check.allowedPercent} %.`,
    )
  }
  const differenceG = check.readG - check.weightG
  return judged(
    // The margin forgives the last binary digits of a subtraction.
    Math.abs(differenceG) <= check.allowedG + 1e-9,
    { ...check, differenceG },
    `The weight read ${signed(differenceG, 3)} g from its value, allowed ${check.allowedG} g.`,
  )
}

function judgeMeter(check: Extract<CalibrationCheck, { kind: 'meter' }>): CalibrationResult {
  const fit = phSlope({ points: check.points, temperatureC: check.temperatureC })
  return judged(
    fit.doubt === null,
    { ...check, ...fit },
    fit.doubt ?? `Slope ${fit.efficiencyPercent.toFixed(1)} % of the theoretical one.`,
  )
}

function judged(isGood: boolean, detail: Record<string, unknown>, sentence: string): CalibrationResult {
  return { result: isGood ? 'good' : 'doubtful', detail: { ...detail, sentence }, sentence }
}

function signed(value: number, decimals: number): string {
  return `${value < 0 ? '−' : '+'}${Math.abs(value).toFixed(decimals)}`
}

/** Due is the last day on which the calibration still holds. */
export function isOverdue(calibration: { dueOn: string } | null, today: string): boolean {
  return calibration === null || calibration.dueOn < today
}
