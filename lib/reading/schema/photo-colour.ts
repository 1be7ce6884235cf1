import * as z from '@/lib/http/zod'

const pixel = z.number().min(0).max(2000)
const square = z.strictObject({ x: pixel, y: pixel, side: z.number().min(2).max(2000) })
const light = z.number().min(0).max(1)
const patch = z.strictObject({
  mean: z.tuple([light, light, light]),
  pixels: z.number().int().min(1).max(4_000_000),
  spread: z.number().min(0).max(1000),
  unevenness: z.number().min(0).max(1000),
  clipped: light,
})

/** A colour told from a photo: where on its measuring copy the grey card and the sample lie, and what they hold. */
export const photoColour = z.strictObject({
  photoId: z.uuid(),
  /** Of the copy. */
  width: z.number().int().min(1).max(2000),
  height: z.number().int().min(1).max(2000),
  greyL: z
    .number()
    .min(10, 'A grey card has an L* of 10 to 98.')
    .max(98, 'A grey card has an L* of 10 to 98.'),
  grey: square,
  sample: square,
  /** As the device read them; the server reads them itself wherever it has the copy. */
  patches: z.strictObject({ grey: patch, sample: patch }),
  readBy: z.enum(['device', 'server']).default('device'),
})
export type PhotoColourOfReading = z.infer<typeof photoColour>
