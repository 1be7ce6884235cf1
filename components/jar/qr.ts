import { create } from 'qrcode'
import type { Qr } from './label-sheet'

/** The code alone in a QR symbol, as one path of runs: letters and digits, so that it stays coarse enough to scan. */
export function qrOf(text: string): Qr {
  const { modules } = create(text, { errorCorrectionLevel: 'H' })
  const { size } = modules
  let path = ''
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      if (!modules.get(y, x)) continue
      let run = 1
      while (x + run < size && modules.get(y, x + run)) run += 1
      path += `M${x} ${y}h${run}v1h${-run}z`
      x += run - 1
    }
  }
  return { size, path }
}
