import { copyPixels } from '@/lib/photo/schema'

export type MeasuringCopy = { blob: Blob; width: number; height: number }

/** The picture upright, without what the camera wrote beside it, at most 2,000 px along its longer side. */
export async function measuringCopy(picture: Blob): Promise<MeasuringCopy> {
  const whole = await createImageBitmap(picture, { imageOrientation: 'from-image' })
  const scale = Math.min(1, copyPixels / Math.max(whole.width, whole.height))
  const canvas = document.createElement('canvas')
  canvas.width = Math.max(1, Math.round(whole.width * scale))
  canvas.height = Math.max(1, Math.round(whole.height * scale))
  const context = canvas.getContext('2d')!
  context.imageSmoothingQuality = 'high'
  context.drawImage(whole, 0, 0, canvas.width, canvas.height)
  whole.close()
  const { width, height } = canvas
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', 0.92))
  if (!blob) throw new Error('The browser made no copy of this photo.')
  return { blob, width, height }
}

/** As a copy that is on the server already. */
export async function sizedCopy(blob: Blob): Promise<MeasuringCopy> {
  const picture = await createImageBitmap(blob)
  const { width, height } = picture
  picture.close()
  return { blob, width, height }
}
