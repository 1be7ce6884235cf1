import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import { readDecimal, readScaled, readTyped } from '@/lib/number/rules'
import type { BookRow } from '@/lib/ingredient/queries'
import { fromMemory } from '@/lib/ingredient/schema'

/** What stands in the dialog's fields: text as typed, kept when it is wrong. */
export type TypedIngredient = {
  inciName: string
  function: string
  synonyms: string
  supplierName: string
  isOilPhase: boolean
  density: string
  densitySource: string
  price: string
  percentLow: string
  percentHigh: string
  rangeSource: string
  acidValue: string
  baseValue: string
  phLow: string
  phHigh: string
  meltsAboveC: string
  holdsInternalPercent: string
  figuresSource: string
  caution: string
  note: string
}

export function typeIngredient(row: Omit<BookRow, 'usedIn' | 'match'> | null): TypedIngredient {
  const text = (value: number | null | undefined) =>
    value === null || value === undefined ? '' : String(value)
  const share = (value: number | null | undefined) =>
    value === null || value === undefined ? '' : percentText(value)
  return {
    inciName: row?.inciName ?? '',
    function: row?.function ?? '',
    synonyms: row?.synonyms.join('\n') ?? '',
    supplierName: row?.supplierName ?? '',
    isOilPhase: row?.isOilPhase ?? false,
    density: row ? row.density.toFixed(3) : '',
    densitySource: row?.densitySource ?? fromMemory,
    price: row && row.priceCentsPerKg !== null ? moneyText(row.priceCentsPerKg) : '',
    percentLow: share(row?.percentLowThousandths),
    percentHigh: share(row?.percentHighThousandths),
    rangeSource: row?.rangeSource ?? fromMemory,
    acidValue: text(row?.acidValue),
    baseValue: text(row?.baseValue),
    phLow: text(row?.phLow),
    phHigh: text(row?.phHigh),
    meltsAboveC: text(row?.meltsAboveC),
    holdsInternalPercent: text(row?.holdsInternalPercent),
    figuresSource: row?.figuresSource ?? fromMemory,
    caution: row?.caution ?? '',
    note: row?.note ?? '',
  }
}

/** As the server takes it; what cannot be read is sent as it is, and comes back with its sentence. */
export function bodyOf(typed: TypedIngredient) {
  const scaled = (text: string, places: number) => {
    if (!text.trim()) return null
    // A number with too many decimals is no whole one, and is refused for that.
    return readScaled(text, places) ?? (readDecimal(text) === null ? text : 0.5)
  }
  return {
    inciName: typed.inciName,
    function: typed.function,
    synonyms: typed.synonyms.split('\n').filter((name) => name.trim() !== ''),
    supplierName: typed.supplierName,
    isOilPhase: typed.isOilPhase,
    density: readDecimal(typed.density) ?? typed.density,
    densitySource: typed.densitySource,
    priceCentsPerKg: scaled(typed.price, 2),
    percentLowThousandths: scaled(typed.percentLow, 3),
    percentHighThousandths: scaled(typed.percentHigh, 3),
    rangeSource: typed.rangeSource,
    acidValue: readTyped(typed.acidValue),
    baseValue: readTyped(typed.baseValue),
    phLow: readTyped(typed.phLow),
    phHigh: readTyped(typed.phHigh),
    meltsAboveC: readTyped(typed.meltsAboveC),
    holdsInternalPercent: readTyped(typed.holdsInternalPercent),
    figuresSource: typed.figuresSource,
    caution: typed.caution,
    note: typed.note,
  }
}
