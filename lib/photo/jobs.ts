import { keptPreview } from './queries/file'

export const previewQueue = 'photo.preview'

/** Makes the small picture ahead of the first person who looks. */
export async function makePhotoPreview(data: { sha256: string; type: string }): Promise<void> {
  await keptPreview(data.sha256, data.type)
}
