import * as z from '@/lib/http/zod'
import { entryDetail } from './entry'

const reason = z.string().trim().min(1, 'A reading is changed only with a reason. Say why.').max(500)

/** A correction is a new reading that supersedes the old one; both stay on record. */
export const correction = z.object({
  id: z.uuid(),
  typed: z.string().min(1, 'Type what it should be.').max(12_000),
  /** What was marked on a photo is measured at the jar; a correction is typed. */
  detail: entryDetail.omit({ photoColour: true, photoDrops: true }).default({}),
  instrumentId: z.uuid().nullish(),
  isConfirmed: z.boolean().default(false),
  reason,
})
export type Correction = z.output<typeof correction>

export const voiding = z.object({ id: z.uuid(), reason })
export type Voiding = z.output<typeof voiding>

export const readingAddress = z.object({ id: z.uuid() })

export const readingFilter = z.object({
  study: z.string().trim().min(1).max(40),
  attribute: z.string().max(44).optional(),
})
