import BinaryBitmap from '@zxing/library/esm/core/BinaryBitmap.js'
import RGBLuminanceSource from '@zxing/library/esm/core/RGBLuminanceSource.js'
import HybridBinarizer from '@zxing/library/esm/core/common/HybridBinarizer.js'
import QRCodeReader from '@zxing/library/esm/core/qrcode/QRCodeReader.js'

type Detector = { detect: (source: CanvasImageSource) => Promise<{ rawValue: string }[]> }
type DetectorClass = {
  new (options: { formats: string[] }): Detector
  getSupportedFormats: () => Promise<string[]>
}

/** Reads the text of a label's square from a picture, or null where none is seen. */
export type SquareReader = (canvas: HTMLCanvasElement) => Promise<string | null>

/**
 * The browser's own detector where it has one; else a decoder in plain script, served with the application. One in
 * WASM would be quicker, but asks the content security policy to let pages compile code.
 */
export async function makeSquareReader(): Promise<SquareReader> {
  const Own = (globalThis as { BarcodeDetector?: DetectorClass }).BarcodeDetector
  const formats = Own ? await Own.getSupportedFormats().catch(() => []) : []
  if (!Own || !formats.includes('qr_code')) return readByScript
  const detector = new Own({ formats: ['qr_code'] })
  return async (canvas) => (await detector.detect(canvas).catch(() => []))[0]?.rawValue ?? null
}

async function readByScript(canvas: HTMLCanvasElement): Promise<string | null> {
  const { width, height } = canvas
  const { data } = canvas.getContext('2d', { willReadFrequently: true })!.getImageData(0, 0, width, height)
  const grey = new Uint8ClampedArray(width * height)
  for (let i = 0; i < grey.length; i++) {
    // Rec. 601 luma; what matters is dark against light.
    grey[i] = (data[4 * i]! * 299 + data[4 * i + 1]! * 587 + data[4 * i + 2]! * 114) / 1000
  }
  const bitmap = new BinaryBitmap(new HybridBinarizer(new RGBLuminanceSource(grey, width, height)))
  try {
    return new QRCodeReader().decode(bitmap).getText()
  } catch {
    // No square in this picture; the next one comes in a moment.
    return null
  }
}
