import { z } from '@/lib/http/zod'

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

export const ingredientInput = z.object({
  id: z.uuid(),
  inciName,
  function: z.string().trim().max(100, 'A function is said in at most 100 signs.').default(''),
  density,
  isOilPhase: z.boolean().default(false),
  priceCentsPerKg: priceCentsPerKg.default(null),
  caution: z.string().trim().max(500, 'A caution has at most 500 signs.').default(''),
})
export type IngredientInput = z.infer<typeof ingredientInput>

export const ingredientSearch = z.object({ q: z.string().max(200).default('') })

/** Names of a pasted block, looked up together. */
export const ingredientNames = z.object({
  name: z
    .union([z.string(), z.array(z.string())])
    .transform((names) => (Array.isArray(names) ? names : [names]))
    .refine((names) => names.length <= 60, 'At most 60 names are looked up at once.'),
})

export const ingredientsKey = (q: string) => `/api/ingredients?q=${encodeURIComponent(q)}`
