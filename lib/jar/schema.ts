import * as z from '@/lib/http/zod'
import type { WhatFollows } from '@/lib/pull/queries/what-follows'
import { deviceTimes } from '@/lib/reading/schema/entry'

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

export const jarMishap = deviceTimes.extend({
  id: z.uuid(),
  kind: z.enum(mishapKinds),
  reason: z.string().trim().min(1, 'Say how it came to that.').max(500),
  /** The pull it happened in, as it was shown; without one it is the jar alone that is broken, lost or opened. */
  pull: z.object({ pullJarId: z.uuid(), version: z.number().int().positive() }).nullable().default(null),
})
export type JarMishap = z.output<typeof jarMishap>

export type NotedMishap = {
  id: string
  /** The line of the pull that will not be read now, and how many later ones with it. */
  pullJarId: string | null
  version: number | null
  alsoMissed: number
  follows: WhatFollows | null
}
