export type PngPart = { type: string; from: number; to: number }

/** The chunks of a PNG up to IEND; null where the file is cut short or none. */
export function pngParts(bytes: Uint8Array): { parts: PngPart[]; end: number } | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  if (bytes.length < 20 || view.getUint32(0) !== 0x89504e47 || view.getUint32(4) !== 0x0d0a1a0a) return null
  const parts: PngPart[] = []
  let at = 8
  while (at + 12 <= bytes.length) {
    const to = at + 12 + view.getUint32(at)
    if (to > bytes.length) return null
    const type = String.fromCharCode(...bytes.subarray(at + 4, at + 8))
    parts.push({ type, from: at, to })
    if (type === 'IEND') return { parts, end: to }
    at = to
  }
  return null
}
