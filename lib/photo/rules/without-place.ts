import { jpegParts, type JpegPart } from './jpeg-parts'
import { exifOfOrientation, isExif, orientationOf, startsWith } from './orientation'
import { pngParts } from './png-parts'

/**
 * The picture without what the camera wrote beside it: place, time, names, further pictures behind the first. Pixels,
 * colour profile and the way it is turned stay as they are, nothing is compressed anew. The same bytes where there is
 * nothing to take out, and where the file is no JPEG or PNG that can be followed to its end.
 */
export function withoutPlace(bytes: Uint8Array): Uint8Array {
  const jpeg = jpegParts(bytes)
  if (jpeg) return jpegWithout(bytes, jpeg.parts, jpeg.end)
  const png = pngParts(bytes)
  return png ? pngWithout(bytes, png.parts, png.end) : bytes
}

function jpegWithout(bytes: Uint8Array, parts: JpegPart[], end: number): Uint8Array {
  const kept = parts.filter((part) => !saysMore(bytes, part))
  if (kept.length === parts.length && end === bytes.length) return bytes
  const orientation = orientationOf(bytes)
  const pieces = kept.map(({ from, to }) => bytes.subarray(from, to))
  if (orientation !== 1) pieces.splice(1, 0, exifOfOrientation(orientation))
  return joined(pieces)
}

/** EXIF, XMP, IPTC, makers' own segments, comments and the index of further pictures; not JFIF, colour profile, Adobe's transform. */
function saysMore(bytes: Uint8Array, part: JpegPart): boolean {
  const { marker, from } = part
  if (marker === 0xfe) return true
  if (marker < 0xe0 || marker > 0xef) return false
  if (isExif(bytes, part)) return true
  const isKept =
    (marker === 0xe0 && startsWith(bytes, from + 4, 'JFIF\0')) ||
    (marker === 0xe2 && startsWith(bytes, from + 4, 'ICC_PROFILE\0')) ||
    (marker === 0xee && startsWith(bytes, from + 4, 'Adobe'))
  return !isKept
}

const pngTalk = ['eXIf', 'tEXt', 'iTXt', 'zTXt', 'tIME']

function pngWithout(
  bytes: Uint8Array,
  parts: { type: string; from: number; to: number }[],
  end: number,
): Uint8Array {
  const kept = parts.filter(({ type }) => !pngTalk.includes(type))
  if (kept.length === parts.length && end === bytes.length) return bytes
  return joined([bytes.subarray(0, 8), ...kept.map(({ from, to }) => bytes.subarray(from, to))])
}

function joined(pieces: Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.length, 0))
  let at = 0
  for (const piece of pieces) {
    whole.set(piece, at)
    at += piece.length
  }
  return whole
}
