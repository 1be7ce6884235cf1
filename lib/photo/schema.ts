import * as z from '@/lib/http/zod'
import { deviceTimes } from '@/lib/reading/schema/entry'

/** What is on it: the jar as it stands, its fill beside a grey card, or drops under the microscope. */
export const photoShows = ['jar', 'colour', 'droplets'] as const
export type PhotoShows = (typeof photoShows)[number]

export const photoAddress = z.object({ id: z.uuid() })

/** Fields of the form that carries the picture; the file is named `photo`. */
export const photoFields = deviceTimes.extend({
  id: z.uuid(),
  pullJarId: z.uuid(),
  shows: z.enum(photoShows).default('jar'),
})
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
