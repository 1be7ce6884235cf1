/** A place that must not be seen: ASCII of a GPS tag as cameras write it. */
export const place = '53 deg 33 N 009 deg 59 E'

/**
 * The JPEG with what a camera writes: EXIF by hand (EXIF 2.32: byte order, IFD0 with orientation and a GPS directory that
 * holds the place), an XMP packet with the place again, and a second picture behind the end, as phones append one.
 */
export function withCameraNotes(jpeg: Uint8Array, orientation: number): Uint8Array {
  const tiff = Buffer.alloc(8 + 2 + 2 * 12 + 4 + 2 + 12 + 4 + place.length + 1)
  tiff.write('II*\0', 0, 'latin1')
  tiff.writeUInt32LE(8, 4)
  tiff.writeUInt16LE(2, 8)
  entry(tiff, 10, 0x0112, 3, 1, orientation)
  const gps = 38
  entry(tiff, 22, 0x8825, 4, 1, gps)
  tiff.writeUInt16LE(1, gps)
  // GPSAreaInformation, as ASCII.
  entry(tiff, gps + 2, 0x001c, 2, place.length + 1, gps + 18)
  tiff.write(place, gps + 18, 'latin1')
  const xmp = `http://ns.adobe.com/xap/1.0/\0<x:xmpmeta><exif:GPSLatitude>${place}</exif:GPSLatitude></x:xmpmeta>`
  return new Uint8Array(
    Buffer.concat([
      jpeg.subarray(0, 2),
      segment(Buffer.concat([Buffer.from('Exif\0\0', 'latin1'), tiff])),
      segment(Buffer.from(xmp, 'latin1')),
      jpeg.subarray(2),
      Buffer.from([0xff, 0xd8]),
      segment(Buffer.from(`Exif\0\0${place}`, 'latin1')),
      Buffer.from([0xff, 0xd9]),
    ]),
  )
}

function entry(tiff: Buffer, at: number, tag: number, type: number, count: number, value: number): void {
  tiff.writeUInt16LE(tag, at)
  tiff.writeUInt16LE(type, at + 2)
  tiff.writeUInt32LE(count, at + 4)
  if (type === 3) tiff.writeUInt16LE(value, at + 8)
  else tiff.writeUInt32LE(value, at + 8)
}

function segment(body: Buffer): Buffer {
  const head = Buffer.from([0xff, 0xe1, 0, 0])
  head.writeUInt16BE(body.length + 2, 2)
  return Buffer.concat([head, body])
}
