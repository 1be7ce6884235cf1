import type { MeasuringCopy } from './measuring-copy'

/** The copy's own pixels, as the server reads them too. */
export async function readPixels({ blob, width, height }: MeasuringCopy): Promise<ImageData> {
  const picture = await createImageBitmap(blob)
  const canvas = document.createElement('canvas')
  canvas.width = width
  canvas.height = height
  const context = canvas.getContext('2d', { willReadFrequently: true })!
  context.drawImage(picture, 0, 0)
  picture.close()
  return context.getImageData(0, 0, width, height)
}
