import { phaseFraction } from '@/lib/science/phase-fraction'
import type { EmulsionType, FormulaLine } from '../schema'

export const wholeThousandths = 100_000

export type Amounts = Pick<FormulaLine, 'percentThousandths' | 'density' | 'isInternal' | 'priceCentsPerKg'>

export type FormulaTotals = {
  totalThousandths: number
  /** Above 0: still missing; below 0: too much. */
  missingThousandths: number
  internalMassPercent: number | null
  internalVolumePercent: number | null
  isHighInternalPhase: boolean
  /** Null while no line has a price. */
  costCentsPerKg: number | null
  linesWithoutPrice: number
}

/** What is shown live beside the lines; the internal phase comes from lib/science alone. */
export function formulaTotals(lines: readonly Amounts[]): FormulaTotals {
  const filled = lines.filter((line) => line.percentThousandths > 0)
  const totalThousandths = filled.reduce((sum, line) => sum + line.percentThousandths, 0)
  const fraction = filled.length
    ? phaseFraction({
        lines: filled.map((line) => ({
          percent: line.percentThousandths / 1000,
          density: line.density,
          internal: line.isInternal,
        })),
      })
    : null
  const priced = filled.filter((line) => line.priceCentsPerKg !== null)
  const cost = priced.reduce((sum, line) => sum + line.percentThousandths * (line.priceCentsPerKg ?? 0), 0)
  return {
    totalThousandths,
    missingThousandths: wholeThousandths - totalThousandths,
    internalMassPercent: fraction?.internalMassPercent ?? null,
    internalVolumePercent: fraction?.internalVolumePercent ?? null,
    isHighInternalPhase: fraction?.highInternalPhase ?? false,
    costCentsPerKg: priced.length ? Math.round(cost / wholeThousandths) : null,
    linesWithoutPrice: filled.length - priced.length,
  }
}

/** What the "q.s. to 100" line has to be, never below 0. */
export function remainderThousandths(others: readonly { percentThousandths: number }[]): number {
  return Math.max(0, wholeThousandths - others.reduce((sum, line) => sum + line.percentThousandths, 0))
}

/** How much of the formula is oil (or silicone) phase and how much water phase, by mass. */
export function oilAndWater(
  type: EmulsionType,
  lines: readonly Pick<Amounts, 'percentThousandths' | 'isInternal'>[],
): { oilThousandths: number; waterThousandths: number } {
  const oilIsInside = type === 'oil-in-water'
  const oil = lines.filter((line) => line.isInternal === oilIsInside)
  const water = lines.filter((line) => line.isInternal !== oilIsInside)
  const sum = (some: typeof oil) => some.reduce((all, line) => all + line.percentThousandths, 0)
  return { oilThousandths: sum(oil), waterThousandths: sum(water) }
}

/** What a jar of that many grams costs, in cents and parts of them. */
export function jarCents(costCentsPerKg: number, grams: number): number {
  return (costCentsPerKg * grams) / 1000
}

export type PhaseTotal = {
  phase: string
  isInternal: boolean
  percentThousandths: number
  volumePercent: number
}

/** Per phase, in order of first appearance: share by mass and by volume (additive, as phase-fraction takes it). */
export function phaseTotals(lines: readonly (Amounts & { phase: string })[]): PhaseTotal[] {
  return [...new Set(lines.map((line) => line.phase))].map((phase) => {
    const own = lines.filter((line) => line.phase === phase)
    const marked = lines.map((line) => ({ ...line, isInternal: line.phase === phase }))
    return {
      phase,
      isInternal: own.some((line) => line.isInternal),
      percentThousandths: own.reduce((sum, line) => sum + line.percentThousandths, 0),
      volumePercent: formulaTotals(marked).internalVolumePercent ?? 0,
    }
  })
}
