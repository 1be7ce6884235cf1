import type { DropsFound } from '@/lib/formula/queries/find-drops'
import { percentText } from '@/lib/formula/rules/numbers'
import type { Amounts, FormulaTotals, PhaseTotal } from '@/lib/formula/rules/totals'
import { costMethod, jarCostMethod, oilWaterMethod, totalMethod } from '@/lib/science/methods/making'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import { filmMethod, phaseFractionMethod } from '@/lib/science/methods/emulsion'
import { filmThickness } from '@/lib/science/film'
import { highInternalPhaseAbove } from '@/lib/science/phase-fraction'

type Lines = readonly Amounts[]

/** What topic phase-fraction takes; lines without a share are left out, as the page does. */
function fractionInput(lines: Lines, isInside: (line: Amounts) => boolean) {
  return {
    lines: lines
      .filter((line) => line.percentThousandths > 0)
      .map((line) => ({
        percent: line.percentThousandths / 1000,
        density: line.density,
        internal: isInside(line),
      })),
  }
}

export function insideFacts(lines: Lines, totals: FormulaTotals, by: 'volume' | 'mass'): FigureFacts {
  const { internalVolumePercent: volume, internalMassPercent: mass } = totals
  return factsOf(phaseFractionMethod, {
    name: `Internal phase by ${by}`,
    result: exactly((by === 'volume' ? volume : mass) ?? 0, '%'),
    lines: by === 'volume' ? [0, 1, 3] : [2],
    values: {
      total: totals.totalThousandths / 1000,
      [by === 'volume' ? 'mass' : 'volume']: by === 'volume' ? mass : volume,
    },
    more: lineRows(lines.filter((line) => line.isInternal)),
    input: fractionInput(lines, (line) => line.isInternal),
  })
}

export function highInternalFacts(lines: Lines, totals: FormulaTotals): FigureFacts {
  return factsOf(phaseFractionMethod, {
    name: 'High internal phase',
    result: totals.isHighInternalPhase ? 'Yes' : 'No',
    lines: [0, 1, 3],
    values: { volume: totals.internalVolumePercent, limit: 100 * highInternalPhaseAbove },
    input: fractionInput(lines, (line) => line.isInternal),
  })
}

export function filmFacts(
  { internalVolumePercent }: FormulaTotals,
  { diameterUm, batchCode }: DropsFound,
): FigureFacts {
  const { filmNm } = filmThickness({ internalVolumePercent: internalVolumePercent ?? 0, diameterUm })
  return factsOf(filmMethod, {
    name: `Film between drops as measured in ${batchCode}`,
    result: exactly(filmNm, 'nm'),
    values: { volume: internalVolumePercent, diameterUm },
  })
}

export function phaseFacts(lines: readonly (Amounts & { phase: string })[], total: PhaseTotal): FigureFacts {
  const isOwn = (line: Amounts & { phase?: string }) => line.phase === total.phase
  return factsOf(phaseFractionMethod, {
    name: `Phase ${total.phase} by volume`,
    result: exactly(total.volumePercent, '%'),
    lines: [0],
    values: {},
    more: [
      { says: `phase ${total.phase} by mass`, value: exactly(total.percentThousandths / 1000, '% w/w') },
      ...lineRows(lines.filter(isOwn)),
    ],
    // Asked of the phase as if it were the internal one.
    input: fractionInput(lines, isOwn),
  })
}

export function totalFacts(lines: Lines, totals: FormulaTotals): FigureFacts {
  return factsOf(totalMethod, {
    result: `${percentText(totals.totalThousandths)} %`,
    values: {
      lines: lines.filter((line) => line.percentThousandths > 0).length,
      missing: totals.missingThousandths / 1000,
    },
    input: fractionInput(lines, (line) => line.isInternal),
  })
}

export function costFacts(lines: Lines, totals: FormulaTotals, result: string): FigureFacts {
  const filled = lines.filter((line) => line.percentThousandths > 0)
  return factsOf(costMethod, {
    result,
    values: {
      priced: filled.length - totals.linesWithoutPrice,
      unpriced: totals.linesWithoutPrice || null,
    },
    more: filled
      .filter((line) => line.priceCentsPerKg !== null)
      .map((line, index) => ({
        says: `${index + 1}: ${percentText(line.percentThousandths)} % at`,
        value: `${exactly((line.priceCentsPerKg ?? 0) / 100)} per kg`,
      })),
  })
}

export function jarCostFacts(totals: FormulaTotals, grams: number, result: string): FigureFacts {
  return factsOf(jarCostMethod, {
    result,
    values: {
      perKg: (totals.costCentsPerKg ?? 0) / 100,
      grams,
      unpriced: totals.linesWithoutPrice || null,
    },
  })
}

export function oilWaterFacts(parts: { oilThousandths: number; waterThousandths: number }): FigureFacts {
  return factsOf(oilWaterMethod, {
    result: oilWaterText(parts),
    values: { oil: parts.oilThousandths / 1000, water: parts.waterThousandths / 1000 },
  })
}

/** "12.40 to 87.60". */
export function oilWaterText(parts: { oilThousandths: number; waterThousandths: number }): string {
  return `${percentText(parts.oilThousandths)} to ${percentText(parts.waterThousandths)}`
}

function lineRows(lines: readonly (Amounts & { inciName?: string })[]) {
  return lines
    .filter((line) => line.percentThousandths > 0)
    .map((line, index) => ({
      says: line.inciName || `line ${index + 1}`,
      value: `${percentText(line.percentThousandths)} % ÷ ${line.density} g/mL`,
    }))
}
