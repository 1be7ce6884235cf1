import { bufferPh } from '@/lib/science/buffer-ph'
import { certifiedValue, type CertifiedValue } from '@/lib/science/certificate'
import { ScienceError } from '@/lib/science/guard'
import { percentFrom } from '@/lib/science/percent'
import { phSlope } from '@/lib/science/ph-slope'
import { lotDoubt, type LotAge } from '@/lib/lot/rules'
import type { CalibrationCheck } from '@/lib/calibration/schema'

export type CalibrationResult = {
  result: 'good' | 'doubtful'
  detail: Record<string, unknown>
  /** What it showed, as a sentence. */
  sentence: string
}
export type CheckLot = LotAge & { id: string; kind: string; certificate: CertifiedValue[] }

/**
 * Judges a check by the numbers typed: a meter by its slope, the others by their difference from what is known. A lot
 * that is too old makes it doubtful, whatever it showed.
 */
export function judgeCalibration(
  check: CalibrationCheck,
  lots: readonly CheckLot[] = [],
  day = '',
): CalibrationResult {
  const found = judgeFigures(check, lots)
  const old = lots.flatMap((lot) => lotDoubt(lot, day) ?? [])
  if (old.length === 0) return found
  const sentence = `${old.join(' ')} ${found.sentence}`
  return { result: 'doubtful', detail: { ...found.detail, sentence }, sentence }
}

function judgeFigures(check: CalibrationCheck, lots: readonly CheckLot[]): CalibrationResult {
  if (check.kind === 'meter') return judgeMeter(check, lots)
  if (check.kind === 'viscometer') {
    const fluidMPas = fluidOf(check, lots)
    const differencePercent = percentFrom(check.readMPas, fluidMPas)
    return judged(
      Math.abs(differencePercent) <= check.allowedPercent,
      { ...check, fluidMPas, differencePercent },
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

type MeterCheck = Extract<CalibrationCheck, { kind: 'meter' }>
type ViscometerCheck = Extract<CalibrationCheck, { kind: 'viscometer' }>

/** The pH of each buffer at the temperature: from its standard table, from its lot's certificate, or as typed. */
export function bufferOf(
  point: MeterCheck['points'][number],
  temperatureC: number,
  lots: readonly CheckLot[],
): number {
  if (point.lotId !== undefined) return lotValue(point.lotId, 'buffer', temperatureC, lots)
  return point.buffer ? bufferPh({ buffer: point.buffer, temperatureC }).ph : point.bufferPh!
}

function fluidOf({ lotId, fluidMPas, temperatureC }: ViscometerCheck, lots: readonly CheckLot[]): number {
  return lotId === undefined ? fluidMPas! : lotValue(lotId, 'check fluid', temperatureC!, lots)
}

function lotValue(id: string, kind: string, temperatureC: number, lots: readonly CheckLot[]): number {
  const lot = lots.find((one) => one.id === id && one.kind === kind)
  if (!lot) throw new ScienceError('lotId', `is no lot of a ${kind}`)
  return certifiedValue(lot.certificate, temperatureC)
}

function judgeMeter(check: MeterCheck, lots: readonly CheckLot[]): CalibrationResult {
  const points = check.points.map((point) => ({
    ...point,
    bufferPh: bufferOf(point, check.temperatureC, lots),
  }))
  const fit = phSlope({ points, temperatureC: check.temperatureC })
  return judged(
    fit.doubt === null,
    { ...check, points, ...fit },
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
