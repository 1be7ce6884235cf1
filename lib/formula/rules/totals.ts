import { phaseFraction } from '@/lib/science/phase-fraction'
import type { FormulaLine } from '../schema'

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
