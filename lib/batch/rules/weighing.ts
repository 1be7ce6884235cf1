import { grouped, readDecimal } from '@/lib/number/rules'
import { dayText } from '@/lib/report/rules'
import { netGrams, totalGrams } from '@/lib/science/making'
import { percentOf } from '@/lib/science/percent'

/** However narrow the tolerance, it is never finer than a balance of 0.01 g shows. */
export const balanceStepG = 0.01

export function targetGrams(sizeG: number, percentThousandths: number): number {
  return Math.round(sizeG * percentThousandths) / 100_000
}

export function toleranceGrams(targetG: number, tolerancePercent: number): number {
  return Math.max((targetG * tolerancePercent) / 100, balanceStepG)
}

type Tolerance = {
  tolerancePercent: number
  protocolName: string | null
  protocolTolerancePercent: number | null
}

/** "1 %", or "0.5 % as Prototype screen asks" where it is the protocol's. */
export function toleranceWords(batch: Tolerance): string {
  const { tolerancePercent, protocolName, protocolTolerancePercent } = batch
  const isProtocols = protocolName !== null && protocolTolerancePercent === tolerancePercent
  return `${tolerancePercent} %${isProtocols ? ` as ${protocolName} asks` : ''}`
}

export type Weighed = {
  differenceG: number
  /** Null where the target is 0. */
  differencePercent: number | null
  isWithin: boolean
  /** "0.38 g to go", "0.41 g too much", "Within what is allowed": while it is poured. */
  words: string
  /** "inside", "0.38 g short", "0.41 g over": of what was kept. */
  told: string
}

export function weighed(targetG: number, actualG: number, tolerancePercent: number): Weighed {
  const differenceG = actualG - targetG
  // Grams are read to 0.001; without rounding 52.26 would miss a limit of 52.26 by float noise.
  const isWithin =
    Math.round(Math.abs(differenceG) * 1e6) <= Math.round(toleranceGrams(targetG, tolerancePercent) * 1e6)
  const off = gramsText(Math.abs(differenceG))
  return {
    differenceG,
    differencePercent: targetG > 0 ? percentOf(differenceG, targetG) : null,
    isWithin,
    told: isWithin ? 'inside' : `${off} g ${differenceG < 0 ? 'short' : 'over'}`,
    words: isWithin ? 'Within what is allowed' : `${off} g ${differenceG < 0 ? 'to go' : 'too much'}`,
  }
}

/** Two decimals as the balance shows them; three below 1 g. */
export function gramsText(grams: number): string {
  return grouped(grams, Math.abs(grams) > 0 && Math.abs(grams) < 1 && !isHundredths(grams) ? 3 : 2)
}

const isHundredths = (grams: number) => Math.abs(grams * 100 - Math.round(grams * 100)) < 1e-6

export function percentOffText(percent: number | null): string {
  if (percent === null) return ''
  const sign = percent > 0 ? '+' : percent < 0 ? '\u2212' : ''
  return `${sign}${Math.abs(percent).toFixed(2)} %`
}

type Portion = { id: string; netG: number; supersedes: string | null }

/** Portions that count: a corrected one stays on record and no longer adds up. */
export function currentPortions<P extends Portion>(portions: readonly P[]): P[] {
  const superseded = new Set(portions.map((portion) => portion.supersedes))
  return portions.filter((portion) => !superseded.has(portion.id))
}

export const gramsIn = (portions: readonly Portion[]) =>
  totalGrams(currentPortions(portions).map((portion) => portion.netG))

export type ReadWeight = { netG: number } | { field: 'actualTyped' | 'tareTyped'; sentence: string }

/** The net of what was typed at the balance, or why it is none. Only a correction may say that nothing went in. */
export function readWeight(grossTyped: string, tareTyped: string, isCorrection: boolean): ReadWeight {
  const grossG = readDecimal(grossTyped)
  if (grossG === null) {
    const sentence = `"${grossTyped.slice(0, 20)}" is not a weight. Type digits with one comma or point.`
    return { field: 'actualTyped', sentence }
  }
  const tareG = tareTyped.trim() ? readDecimal(tareTyped) : 0
  if (tareG === null) {
    const sentence = `"${tareTyped.slice(0, 20)}" is not a tare. Type digits with one comma or point.`
    return { field: 'tareTyped', sentence }
  }
  if (tareG < 0) return { field: 'tareTyped', sentence: 'A vessel does not weigh less than 0 g.' }
  if (grossG > 1_000_000)
    return { field: 'actualTyped', sentence: 'A line of more than 1 000 kg cannot be right here.' }
  if (grossG < 0 || (grossG === 0 && !isCorrection))
    return {
      field: 'actualTyped',
      sentence: 'A weight is above 0 g. Tare the vessel and weigh again.',
    }
  const netG = grossG < tareG ? -1 : netGrams(grossG, tareG)
  if (netG < 0 || (netG === 0 && !isCorrection)) {
    const sentence = `With a tare of ${gramsText(tareG)} g nothing went in. Look at the tare again.`
    return { field: 'tareTyped', sentence }
  }
  return { netG }
}

type Instrument = {
  code: string
  result: string | null
  dueOn: string | null
  detail: { sentence?: string } | null
}

/** What is doubtful about an instrument today, as a sentence; null where nothing is. */
export function instrumentDoubt({ code, result, dueOn, detail }: Instrument, today: string): string | null {
  if (dueOn === null) return `${code} has no check on record.`
  if (result === 'doubtful') return `${code} failed its last check. ${detail?.sentence ?? ''}`.trim()
  return dueOn < today ? `The check of ${code} was due on ${dayText(dueOn)}.` : null
}
