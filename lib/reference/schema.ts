import { emulsionTypes } from '@/lib/formula/schema'
import * as z from '@/lib/http/zod'

/** A lot of a bought-in product: what is known of it without its formula. */
export const newReference = z.object({
  id: z.uuid(),
  name: z.string().trim().min(1, 'Give the product its name.').max(120),
  lot: z.string().trim().min(1, 'Give the lot, as it stands on the pack.').max(60),
  /** What it is made as decides how pH and viscosity are read. */
  emulsionType: z.enum(emulsionTypes),
  grams: z
    .number('Give what there is of it in g as a number.')
    .positive('What there is of it is above 0 g.')
    .max(1_000_000, 'At most 1 000 kg.'),
  note: z.string().trim().max(2000).default(''),
})
export type NewReference = z.output<typeof newReference>
