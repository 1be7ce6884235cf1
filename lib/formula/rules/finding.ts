import { grouped } from '@/lib/number/rules'
import { filmThickness } from '@/lib/science/film'
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
  /** Sauter mean of the drops, where a batch's were measured. */
  diameterUm: number | null = null,
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
    rest: ` ${inside} inside, ${packedWords(type, totals, diameterUm)}`,
    sentence: `By volume. ${answered} of ${checks.length} questions are answered; ${totalSentence(totals)}. ${packing}`,
  }
}

function packedWords(type: EmulsionType, totals: FormulaTotals, diameterUm: number | null): string {
  if (!totals.isHighInternalPhase) return 'drops with room between'
  const film = filmText(totals, diameterUm)
  return film
    ? `held apart by ${film} of ${type === 'oil-in-water' ? 'water' : 'oil'}`
    : 'past the closest packing'
}

/** "180 nm": the mean film between packed drops, where their size is known. */
export function filmText(totals: FormulaTotals, diameterUm: number | null): string | null {
  const { internalVolumePercent } = totals
  if (!totals.isHighInternalPhase || internalVolumePercent === null || diameterUm === null) return null
  const { filmNm } = filmThickness({ internalVolumePercent, diameterUm })
  return `${grouped(Number(filmNm.toPrecision(2)), 0)} nm`
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
