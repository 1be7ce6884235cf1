import * as z from '@/lib/http/zod'
import { attributes, type KnownKey } from './attributes'
import { isOwnKey, type OwnKey } from './own-key'

const ownKey = z
  .custom<OwnKey>(isOwnKey, { message: 'A name of your own is up to 40 letters, digits and single spaces.' })
  .meta({ type: 'string' })

/** What is measured: one of the known, or one that a protocol has of its own. */
export const attributeKey = z.union([z.enum(Object.keys(attributes) as [KnownKey, ...KnownKey[]]), ownKey])

const jar = z.enum(['watch', 'measuring'])
const finite = z.number('Type a number here.').min(-1e9).max(1e9)

/** What a plan says of an attribute that only it has. Of a scale the place in the list is the value: the first is 0. */
export const ownAttribute = z
  .discriminatedUnion('kind', [
    z.object({
      kind: z.literal('number'),
      unit: z.string().trim().max(20, 'A unit has at most 20 signs.'),
      decimals: z.number().int().min(0).max(4),
      lower: finite,
      upper: finite,
      /** Scatter of one reading, in the unit; 0 where it is not known. */
      scatter: z.number().min(0).max(1e9),
      /** Regression may carry it to a shelf life. */
      isGradual: z.boolean(),
      jar,
    }),
    z.object({
      kind: z.literal('scale'),
      words: z
        .array(z.string().trim().min(1, 'A word of the scale is empty.').max(40))
        .min(2, 'A scale has at least two words, the best first.')
        .max(8, 'A scale has at most eight words.')
        .refine(
          (words) => new Set(words.map((word) => word.toLowerCase())).size === words.length,
          'A word stands twice in the scale.',
        ),
      jar,
    }),
  ])
  .refine((own) => own.kind === 'scale' || own.lower < own.upper, {
    path: ['upper'],
    message: 'What is possible runs from a lower to a higher number.',
  })
export type OwnAttribute = z.infer<typeof ownAttribute>
