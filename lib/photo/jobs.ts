import { env } from '@/lib/env'
import { sweepIncoming } from '@/lib/files/incoming'
import type { JobContext } from '@/lib/jobs/job'
import { sweepUnnamed } from './commands/sweep-unnamed'
import { keptPreview } from './queries/file'

export const previewQueue = 'photo.preview'

/** Makes the small picture ahead of the first person who looks. */
export async function makePhotoPreview(data: { sha256: string; type: string }): Promise<void> {
  await keptPreview(data.sha256, data.type)
}

export const sweepQueue = 'photo.sweep'
const oneDayMs = 24 * 3_600_000

/**
 * A server that died while a file arrived leaves a part of it behind, which nobody would ever read; one that died between
 * file and row, a whole file that nothing names.
 */
export async function sweepFiles({ db }: JobContext): Promise<void> {
  await sweepIncoming(env().filesFolder, oneDayMs)
  await sweepUnnamed(db, oneDayMs)
}
