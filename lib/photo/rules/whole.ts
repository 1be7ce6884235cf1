import { jpegParts } from './jpeg-parts'
import { startsWith } from './orientation'
import { pngParts } from './png-parts'

/**
 * What is wrong with a picture that was sent: cut short, or a second kind of file hidden behind it or in its comments.
 * Phones append pictures and data of their own, so bytes behind the end alone are no reason. Null where it is sound.
 */
export function wrongWith(bytes: Uint8Array): 'cut short' | 'two files in one' | null {
  const jpeg = jpegParts(bytes)
  const png = jpeg ? null : pngParts(bytes)
  const end = jpeg?.end ?? png?.end
  if (end === undefined) return 'cut short'
  const comments = jpeg?.parts.filter(({ marker }) => marker === 0xfe) ?? []
  const places = [...comments, { from: end, to: bytes.length }]
  return places.some(({ from, to }) => holdsOther(bytes.subarray(from, to))) ? 'two files in one' : null
}

const others = [
  'PK\u0003\u0004',
  'PK\u0005\u0006',
  '%PDF-',
  '<script',
  '<html',
  '<svg',
  '<!doctype',
  '<?php',
  'GIF89a',
]

function holdsOther(bytes: Uint8Array): boolean {
  return others.some((mark) => {
    for (let at = nextOf(bytes, mark, 0); at !== -1; at = nextOf(bytes, mark, at + 1))
      if (startsWith(lowered(bytes.subarray(at, at + mark.length)), 0, mark.toLowerCase())) return true
    return false
  })
}

/** The next byte that may begin the mark. */
function nextOf(bytes: Uint8Array, mark: string, from: number): number {
  return bytes.indexOf(mark.charCodeAt(0), from)
}

function lowered(bytes: Uint8Array): Uint8Array {
  return bytes.map((byte) => (byte >= 0x41 && byte <= 0x5a ? byte + 32 : byte))
}
