import * as z from '@/lib/http/zod'
import { deviceTimes } from '@/lib/reading/schema/entry'

export const photoAddress = z.object({ id: z.uuid() })

/** Fields of the form that carries the picture; the file is named `photo`. */
export const photoFields = deviceTimes.extend({ id: z.uuid(), pullJarId: z.uuid() })
export type PhotoFields = z.output<typeof photoFields>

export const photoFilter = z.object({
  study: z.string().trim().min(1).max(40),
  jar: z.string().max(20).optional(),
})

export const maxPhotoBytes = 25 * 1024 * 1024
export const maxPhotoPixels = 40_000_000
export const previewWidth = 480
/** Longer side of a measuring copy. */
export const copyPixels = 2000
export const maxCopyBytes = 6 * 1024 * 1024
