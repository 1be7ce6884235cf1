import type { CheckLot } from '@/lib/calibration/rules'
import { lotDoubt } from '@/lib/lot/rules'
import { bufferPh } from '@/lib/science/buffer-ph'
import { certifiedValue } from '@/lib/science/certificate'
import { percentFrom } from '@/lib/science/percent'
import type { DailyCheck } from '../schema'

export type DailyReading = { read: number; temperatureC: number | null }
export type DailyResult = {
  result: 'good' | 'doubtful'
  expected: number
  difference: number
  allowed: number
  unit: string
  sentence: string
}

const roomC = 25

/** What the instrument should show: the weight, the fluid's value, or the buffer's at its temperature. */
export function expectedOf(check: DailyCheck, temperatureC: number | null, lot: CheckLot | null): number {
  if (check.kind === 'balance') return check.weightG
  if (lot)
    return certifiedValue(
      lot.certificate,
      temperatureC ?? (check.kind === 'viscometer' ? check.temperatureC : roomC),
    )
  if (check.kind === 'viscometer') return check.fluidMPas
  return check.buffer
    ? bufferPh({ buffer: check.buffer, temperatureC: temperatureC ?? roomC }).ph
    : check.bufferPh!
}

/** Good within what is allowed; doubtful outside it, with a lot that is too old, or a fluid at another temperature. */
export function judgeDailyCheck(
  check: DailyCheck,
  { read, temperatureC }: DailyReading,
  lot: CheckLot | null,
  day: string,
): DailyResult {
  const expected = expectedOf(check, temperatureC, lot)
  const [difference, allowed, unit, places] =
    check.kind === 'viscometer'
      ? ([percentFrom(read, expected), check.allowedPercent, '%', 1] as const)
      : check.kind === 'balance'
        ? ([read - expected, check.allowedG, 'g', 3] as const)
        : ([read - expected, check.allowedPh, 'pH', 2] as const)
  const old = lot && lotDoubt(lot, day)
  const isOff =
    check.kind === 'viscometer' &&
    !lot &&
    temperatureC !== null &&
    Math.abs(temperatureC - check.temperatureC) > 1
  const isGood = Math.abs(difference) <= allowed + 1e-9 && !old && !isOff
  const sentence = [
    old,
    isOff ? `The fluid was at ${temperatureC} °C; its value holds at ${check.temperatureC} °C.` : null,
    `${names[check.kind]} read ${difference < 0 ? '−' : '+'}${Math.abs(difference).toFixed(places)} ${unit} from its value, allowed ${allowed} ${unit}.`,
  ]
  return {
    result: isGood ? 'good' : 'doubtful',
    expected,
    difference,
    allowed,
    unit,
    sentence: sentence.filter(Boolean).join(' '),
  }
}

const names = { meter: 'The buffer', viscometer: 'The check fluid', balance: 'The check weight' }
