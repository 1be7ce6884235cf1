/** One segment of a JPEG: its marker, and where it begins and ends, both counted from the first byte. */
export type JpegPart = { marker: number; from: number; to: number }

/**
 * The segments of a JPEG up to its end of image, compressed data included in the scan it follows (ITU-T T.81, annex B).
 * `end` is where the picture ends; what comes after belongs to no picture. Null where the file is cut short or none.
 */
export function jpegParts(bytes: Uint8Array): { parts: JpegPart[]; end: number } | null {
  if (bytes.length < 4 || bytes[0] !== 0xff || bytes[1] !== 0xd8) return null
  const parts: JpegPart[] = [{ marker: 0xd8, from: 0, to: 2 }]
  let at = 2
  while (at + 1 < bytes.length) {
    if (bytes[at] !== 0xff) return null
    const marker = bytes[at + 1]!
    if (marker === 0xff) {
      at += 1
      continue
    }
    if (marker === 0xd9) {
      parts.push({ marker, from: at, to: at + 2 })
      return { parts, end: at + 2 }
    }
    if (at + 4 > bytes.length) return null
    const length = bytes[at + 2]! * 256 + bytes[at + 3]!
    if (length < 2 || at + 2 + length > bytes.length) return null
    let to = at + 2 + length
    if (marker === 0xda) to = endOfScan(bytes, to)
    parts.push({ marker, from: at, to })
    at = to
  }
  return null
}

/** Compressed data goes on over stuffed zeros and restart markers. */
function endOfScan(bytes: Uint8Array, from: number): number {
  let at = from
  while (at + 1 < bytes.length) {
    const next = bytes.indexOf(0xff, at)
    if (next === -1 || next + 1 >= bytes.length) return bytes.length
    const marker = bytes[next + 1]!
    if (marker !== 0 && marker !== 0xff && !(marker >= 0xd0 && marker <= 0xd7)) return next
    at = marker === 0xff ? next + 1 : next + 2
  }
  return bytes.length
}
