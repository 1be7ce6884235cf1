import { jpegParts, type JpegPart } from './jpeg-parts'

/** How a picture is to be turned, 1 to 8 (EXIF 2.32, tag 0x0112); 1, upright, where the file says nothing. */
export type Orientation = 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8

export function orientationOf(bytes: Uint8Array): Orientation {
  const exif = jpegParts(bytes)?.parts.find((part) => isExif(bytes, part))
  return exif ? readOrientation(bytes.subarray(exif.from + 10, exif.to)) : 1
}

export function isExif(bytes: Uint8Array, { marker, from }: JpegPart): boolean {
  return marker === 0xe1 && startsWith(bytes, from + 4, 'Exif\0\0')
}

export function startsWith(bytes: Uint8Array, at: number, text: string): boolean {
  if (at + text.length > bytes.length) return false
  for (let i = 0; i < text.length; i += 1) if (bytes[at + i] !== text.charCodeAt(i)) return false
  return true
}

/** The EXIF segment that says nothing but how the picture is turned. */
export function exifOfOrientation(orientation: Orientation): Uint8Array {
  const bytes = new Uint8Array(36)
  const view = new DataView(bytes.buffer)
  view.setUint16(0, 0xffe1)
  view.setUint16(2, 34)
  bytes.set([0x45, 0x78, 0x69, 0x66, 0, 0], 4)
  bytes.set([0x4d, 0x4d, 0, 42, 0, 0, 0, 8], 10)
  view.setUint16(18, 1)
  view.setUint16(20, 0x0112)
  view.setUint16(22, 3)
  view.setUint32(24, 1)
  view.setUint16(28, orientation)
  return bytes
}

/** Of the TIFF header's first directory. */
function readOrientation(tiff: Uint8Array): Orientation {
  const view = new DataView(tiff.buffer, tiff.byteOffset, tiff.byteLength)
  if (tiff.length < 14) return 1
  const isLittle = view.getUint16(0) === 0x4949
  const directory = view.getUint32(4, isLittle)
  if (directory + 2 > tiff.length) return 1
  const count = view.getUint16(directory, isLittle)
  for (let i = 0; i < count; i += 1) {
    const at = directory + 2 + i * 12
    if (at + 12 > tiff.length) return 1
    if (view.getUint16(at, isLittle) !== 0x0112) continue
    const value = view.getUint16(at + 8, isLittle)
    return value >= 1 && value <= 8 ? (value as Orientation) : 1
  }
  return 1
}
