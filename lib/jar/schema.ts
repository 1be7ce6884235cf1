import * as z from '@/lib/http/zod'

/** As scanned or typed; read by `readJarCode`. */
export const jarAddress = z.object({ code: z.string().trim().min(1).max(200) })

/** What one jar weighs and how high it is filled, measured when it was filled. */
export const filledJar = z
  .object({
    version: z.number().int().positive(),
    tareG: z.number().positive().max(10_000).nullable(),
    grossG: z.number().positive().max(20_000).nullable(),
    fillHeightMm: z.number().positive().max(500).nullable(),
  })
  .refine((jar) => jar.tareG === null || jar.grossG === null || jar.grossG > jar.tareG, {
    path: ['grossG'],
    message: 'The filled jar must be heavier than the empty one.',
  })
export type FilledJar = z.input<typeof filledJar>

/** What happens to a jar besides being read; each is an entry with its reason. */
export const mishapKinds = ['missed', 'broken', 'lost', 'wrong jar', 'pulled early'] as const
export type MishapKind = (typeof mishapKinds)[number]

export const jarKeys = {
  one: (code: string) => `/api/jars/${encodeURIComponent(code)}`,
}
