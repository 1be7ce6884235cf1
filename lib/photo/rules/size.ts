/**
 * Width and height as the file's own header says, without decoding: a bitmap is too large to find out by making it.
 * Null where no such header is found.
 */
export function imageSize(bytes: Uint8Array): { width: number; height: number } | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  return pngSize(view) ?? jpegSize(view)
}

/** Signature, then the IHDR chunk, which always comes first. */
function pngSize(view: DataView): { width: number; height: number } | null {
  if (view.byteLength < 24 || view.getUint32(0) !== 0x89504e47 || view.getUint32(4) !== 0x0d0a1a0a)
    return null
  if (view.getUint32(12) !== 0x49484452) return null
  return sized(view.getUint32(16), view.getUint32(20))
}

/** Segments up to the start of a frame: SOF0 to SOF15 but the tables DHT (C4), JPG (C8) and DAC (CC). */
function jpegSize(view: DataView): { width: number; height: number } | null {
  if (view.byteLength < 4 || view.getUint16(0) !== 0xffd8) return null
  let at = 2
  while (at + 4 <= view.byteLength) {
    if (view.getUint8(at) !== 0xff) return null
    const marker = view.getUint8(at + 1)
    if (marker === 0xff) {
      at += 1
      continue
    }
    if (marker === 0xd9 || marker === 0xda) return null
    const isFrame = marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker)
    if (isFrame) {
      return at + 9 <= view.byteLength ? sized(view.getUint16(at + 7), view.getUint16(at + 5)) : null
    }
    const length = view.getUint16(at + 2)
    if (length < 2) return null
    at += 2 + length
  }
  return null
}

function sized(width: number, height: number): { width: number; height: number } | null {
  return width > 0 && height > 0 ? { width, height } : null
}
