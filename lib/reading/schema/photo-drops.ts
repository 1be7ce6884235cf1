import * as z from '@/lib/http/zod'

const pixel = z.number().min(0).max(2000)
const stretch = z.strictObject({ x1: pixel, y1: pixel, x2: pixel, y2: pixel })

export const mostDropsOnPhoto = 500

/** Drops measured on a photo: its scale bar, and a stretch across each drop, in pixels of its measuring copy. */
export const photoDrops = z.strictObject({
  photoId: z.uuid(),
  /** Of the copy. */
  width: z.number().int().min(1).max(2000),
  height: z.number().int().min(1).max(2000),
  bar: stretch.extend({
    um: z.number().positive('The scale bar is longer than 0 micrometres.').max(100_000),
  }),
  drops: z.array(stretch).min(1).max(mostDropsOnPhoto),
})
export type PhotoDropsOfReading = z.infer<typeof photoDrops>
