import * as z from '@/lib/http/zod'

export const flagCauses = ['product', 'measurement', 'instrument', 'station', 'not known'] as const
export type FlagCause = (typeof flagCauses)[number]
export const flagStates = ['open', 'answered', 'closed'] as const

export const flagAddress = z.object({ number: z.coerce.number().int().positive().max(2_147_483_647) })

const version = z.number().int().positive()
const why = z.string().trim().min(1, 'Say why you think so.').max(2000)

export const flagComment = z.object({
  id: z.uuid(),
  text: z.string().trim().min(1, 'Write the comment.').max(2000),
})
export const flagAnswer = z.object({
  version,
  cause: z.enum(flagCauses, 'Choose a cause.'),
  action: z.string().trim().min(1, 'Say what is done about it.').max(2000),
  why,
})
export const flagClosing = z.object({
  version,
  note: z.string().trim().min(1, 'Say why it can be closed.').max(2000),
})
/**
 * 'doubt': the reading is good, it counts. 'reading': QA names a laboratory cause with its evidence, the reading
 * stays on record and never counts.
 */
export const flagSettling = z.object({
  version,
  settles: z.enum(['doubt', 'reading']),
  cause: z.enum(flagCauses, 'Choose a cause.'),
  why,
})
export type FlagComment = z.output<typeof flagComment>
export type FlagAnswer = z.output<typeof flagAnswer>
export type FlagClosing = z.output<typeof flagClosing>
export type FlagSettling = z.output<typeof flagSettling>
