import { keptPreview } from './queries'

export const previewQueue = 'photo.preview'

/** Makes the small picture ahead of the first person who looks. */
export async function makePhotoPreview(data: { sha256: string }): Promise<void> {
  await keptPreview(data.sha256)
}
