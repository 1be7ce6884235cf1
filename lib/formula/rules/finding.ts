import type { EmulsionType } from '../schema'
import type { FormulaCheck } from './checks'
import { percentText } from './numbers'
import type { FormulaTotals } from './totals'

export type Finding = { strong: string; rest: string; sentence: string }

/** What the lines amount to, as the page's headline and the sentence under it. */
export function formulaFinding(
  type: EmulsionType,
  totals: FormulaTotals,
  checks: readonly FormulaCheck[],
): Finding {
  const inside = innerWord(type)
  const volume = totals.internalVolumePercent
  if (volume === null) {
    return {
      strong: 'Nothing',
      rest: ' is in it yet',
      sentence: 'Type the first line, or paste a block of lines from a spreadsheet.',
    }
  }
  const answered = checks.filter((check) => !check.isOpen).length
  const packing = totals.isHighInternalPhase
    ? 'Above 74.0 % equal round drops no longer fit; drops of mixed sizes still may.'
    : 'Up to 74.0 % round drops of one size fit.'
  return {
    strong: `${volume.toFixed(1)} %`,
    rest: ` ${inside} inside, ${totals.isHighInternalPhase ? 'past the closest packing' : 'drops with room between'}`,
    sentence: `By volume. ${answered} of ${checks.length} questions are answered; ${totalSentence(totals)}. ${packing}`,
  }
}

export function innerWord(type: EmulsionType): 'water' | 'oil' {
  return type === 'oil-in-water' ? 'oil' : 'water'
}

/** "total 100.00 %", or what is missing or too much. */
export function totalSentence(
  totals: Pick<FormulaTotals, 'totalThousandths' | 'missingThousandths'>,
): string {
  const total = `total ${percentText(totals.totalThousandths)} %`
  if (totals.missingThousandths > 0) return `${total}, ${percentText(totals.missingThousandths)} % missing`
  if (totals.missingThousandths < 0) return `${total}, ${percentText(-totals.missingThousandths)} % too much`
  return total
}
