import * as z from '@/lib/http/zod'

export const inciName = z
  .string()
  .trim()
  .min(1, 'Give the INCI name.')
  .max(200, 'An INCI name has at most 200 signs here.')

export const density = z
  .number('Give the density as a number in g/mL, such as 0.945.')
  .positive('A density is above 0 g/mL.')
  .max(25, 'Nothing in a cream is denser than 25 g/mL; perhaps the point slipped.')

/** Money is whole cents, so that sums are exact. */
export const priceCentsPerKg = z
  .number('Give the price per kg as a number, such as 18.50.')
  .int('A price has at most two decimals.')
  .min(0, 'A price is not below 0.')
  .max(100_000_000, 'That price per kg is too high to be right.')
  .nullable()

/** What stands where nobody has said where a figure is from. */
export const fromMemory = 'from memory'

const text = (max: number, what: string) => z.string().trim().max(max, `${what} has at most ${max} signs.`)
const source = text(200, 'A source').transform((typed) => typed || fromMemory)

const share = z
  .number('Give the share as a number in % w/w, such as 0.5.')
  .int('A share has at most three decimals.')
  .min(0, 'A share is not below 0 %.')
  .max(100_000, 'A share is at most 100 %.')
  .nullable()

const value = z
  .number('Give it as a number in mg KOH per g, such as 780.')
  .min(0, 'It is not below 0 mg KOH per g.')
  .max(5_000, 'Nothing takes up more than 5 000 mg KOH per g; perhaps the point slipped.')
  .nullable()

const ph = z
  .number('Give the pH as a number, such as 5.5.')
  .min(0, 'A pH is not below 0 here.')
  .max(14, 'A pH is at most 14 here.')
  .nullable()

const synonym = text(200, 'A synonym').min(1, 'A synonym is not empty.')

const fields = {
  inciName,
  function: text(100, 'A function'),
  density,
  densitySource: source,
  isOilPhase: z.boolean(),
  priceCentsPerKg,
  caution: text(500, 'A caution'),
  synonyms: z.array(synonym).max(30, 'At most 30 synonyms are kept.'),
  supplierName: text(200, 'A supplier’s name'),
  percentLowThousandths: share,
  percentHighThousandths: share,
  rangeSource: source,
  acidValue: value,
  baseValue: value,
  phLow: ph,
  phHigh: ph,
  meltsAboveC: z
    .number('Give the temperature as a number in °C, such as 60.')
    .min(-50, 'It is not below −50 °C.')
    .max(300, 'It is at most 300 °C.')
    .nullable(),
  holdsInternalPercent: z
    .number('Give it as a number in % v/v, such as 85.')
    .positive('It is above 0 %.')
    .max(100, 'It is at most 100 %.')
    .nullable(),
  figuresSource: source,
  note: text(2000, 'A note'),
}

/** A range is typed from low to high. */
function inOrder(
  given: {
    percentLowThousandths: number | null
    percentHighThousandths: number | null
    phLow: number | null
    phHigh: number | null
  },
  context: z.RefinementCtx,
) {
  const refuse = (path: string, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message })
  const { percentLowThousandths: low, percentHighThousandths: high, phLow, phHigh } = given
  if (low !== null && high !== null && low > high)
    refuse('percentHighThousandths', 'The highest share is below the lowest. Turn them round.')
  if (phLow !== null && phHigh !== null && phLow > phHigh)
    refuse('phHigh', 'The highest pH is below the lowest. Turn them round.')
}

/** A new one; what is not said is left empty, so that it can be added from a formula's line. */
export const ingredientInput = z
  .object({
    id: z.uuid(),
    inciName: fields.inciName,
    density: fields.density,
    function: fields.function.default(''),
    densitySource: fields.densitySource.default(fromMemory),
    isOilPhase: fields.isOilPhase.default(false),
    priceCentsPerKg: fields.priceCentsPerKg.default(null),
    caution: fields.caution.default(''),
    synonyms: fields.synonyms.default([]),
    supplierName: fields.supplierName.default(''),
    percentLowThousandths: share.default(null),
    percentHighThousandths: share.default(null),
    rangeSource: fields.rangeSource.default(fromMemory),
    acidValue: value.default(null),
    baseValue: value.default(null),
    phLow: ph.default(null),
    phHigh: ph.default(null),
    meltsAboveC: fields.meltsAboveC.default(null),
    holdsInternalPercent: fields.holdsInternalPercent.default(null),
    figuresSource: fields.figuresSource.default(fromMemory),
    note: fields.note.default(''),
  })
  .superRefine(inOrder)
export type IngredientInput = z.output<typeof ingredientInput>

/** A change says everything, so that nothing is emptied by what was left out. */
export const changedIngredient = z
  .object({ ...fields, version: z.number().int().min(1) })
  .superRefine(inOrder)
export type ChangedIngredient = z.output<typeof changedIngredient>

export const ingredientAddress = z.object({ id: z.uuid() })
export const ingredientSearch = z.object({ q: z.string().max(200).default('') })

/** Names of a pasted block, looked up together. */
export const ingredientNames = z.object({
  name: z
    .union([z.string(), z.array(z.string())])
    .transform((names) => (Array.isArray(names) ? names : [names]))
    .refine((names) => names.length <= 60, 'At most 60 names are looked up at once.'),
})

/** What the questions to a formula need of the ingredients that its lines name. */
export const ingredientIds = z.object({
  id: z
    .union([z.uuid(), z.array(z.uuid())])
    .transform((ids) => (Array.isArray(ids) ? ids : [ids]))
    .refine((ids) => ids.length <= 200, 'At most 200 ingredients are looked up at once.'),
})
