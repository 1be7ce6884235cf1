import { create } from 'qrcode'
import type { Qr } from './label-shapes'

/** The code alone in a QR symbol, as runs of dark modules: letters and digits, so that it stays coarse enough to scan. */
export function qrOf(text: string): Qr {
  const { modules } = create(text, { errorCorrectionLevel: 'H' })
  const { size } = modules
  const runs: Qr['runs'] = []
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      if (!modules.get(y, x)) continue
      let length = 1
      while (x + length < size && modules.get(y, x + length)) length += 1
      runs.push([x, y, length])
      x += length - 1
    }
  }
  return { size, runs }
}
