import * as z from '@/lib/http/zod'

/** Part of a name or code; what is too long to be one finds nothing. */
export const finderQuery = z.object({ q: z.string().trim().max(200).catch('') })
