import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { emptyLine } from '@/lib/formula/rules/arrange'
import { moneyText } from '@/lib/formula/rules/numbers'
import { readDecimal, readScaled } from '@/lib/number/rules'
import type { PastedLine } from '@/lib/formula/rules/paste'
import type { TypedLine } from '@/lib/formula/rules/typed'
import type { EmulsionType } from '@/lib/formula/schema'
import type { IngredientRow } from '@/lib/ingredient/queries'

/** What is known of an ingredient fills the fields that were left empty, and its density always. */
export function filledFrom(line: TypedLine, ingredient: IngredientRow): Partial<TypedLine> {
  return {
    ingredientId: ingredient.id,
    inciName: ingredient.inciName,
    function: line.function.trim() || ingredient.function,
    density: ingredient.density.toFixed(3),
    price:
      line.price.trim() || (ingredient.priceCentsPerKg === null ? '' : moneyText(ingredient.priceCentsPerKg)),
  }
}

export function linesFromPaste(
  pasted: readonly PastedLine[],
  found: (name: string) => IngredientRow | null,
  /** The line that was pasted into: what the block does not say is as it is there. */
  at: TypedLine | undefined,
  lines: readonly TypedLine[],
): TypedLine[] {
  const hasRemainder = lines.some((line) => line.isRemainder)
  const remainderAt = hasRemainder ? -1 : pasted.findIndex((line) => !line.percent)
  return pasted.map((one, index) => {
    const own = one.phase || at?.phase || 'A'
    const isInternal =
      one.isInternal ?? lines.find((line) => line.phase === own)?.isInternal ?? at?.isInternal ?? false
    const typed: TypedLine = {
      ...emptyLine(newId(), own, isInternal),
      ...{ inciName: one.inciName, function: one.function, percent: one.percent },
      ...{ density: one.density, price: one.price, isRemainder: index === remainderAt },
    }
    const ingredient = found(one.inciName)
    if (!ingredient) return typed
    const filled = filledFrom(typed, ingredient)
    return { ...typed, ...filled, density: one.density || filled.density || '' }
  })
}

/** Adds a line's ingredient to the lab's list; the sentence where that is not possible. */
export async function addToIngredients(
  line: TypedLine,
  emulsionType: EmulsionType,
): Promise<{ id: string } | string> {
  const density = readDecimal(line.density)
  if (density === null)
    return `Give the density of ${line.inciName.trim()} first, then add it to the ingredients.`
  try {
    return await send<{ id: string }>('/api/ingredients', 'POST', {
      id: newId(),
      inciName: line.inciName,
      function: line.function,
      density,
      isOilPhase: line.isInternal === (emulsionType === 'oil-in-water'),
      priceCentsPerKg: line.price.trim() ? readScaled(line.price, 2) : null,
    })
  } catch (thrown) {
    if (thrown instanceof ClientError) return thrown.sentence
    throw thrown
  }
}
