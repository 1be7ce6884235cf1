import * as z from '@/lib/http/zod'

const row = z.number().min(0).max(20_000)
const lines = z.strictObject({ fillTop: row, topEdge: row, bottomEdge: row, base: row })

/** Where separation was measured on a photo: rows of its measuring copy, so that anyone can look again. */
export const photoLines = z.strictObject({
  photoId: z.uuid(),
  /** Of the copy. */
  width: z.number().int().min(1).max(2000),
  height: z.number().int().min(1).max(2000),
  lines,
  /** Where the jar's axis stands at the middle row, and how it leans. */
  axisX: z.number().min(0).max(2000),
  tiltDegrees: z.number().min(-45).max(45),
  /** What the server proposed, before a hand moved anything; null where there was no proposal. */
  proposal: z
    .strictObject({
      sureness: z.enum(['sure', 'look again', 'shows nothing']),
      reasons: z.array(z.string().max(200)).max(8),
      lines: lines.nullable(),
    })
    .nullable(),
})
export type PhotoLinesOfReading = z.infer<typeof photoLines>
