import { Jimp } from 'jimp'

/** A small photo, as a camera would hand it over. */
export async function photo() {
  const image = new Jimp({ width: 64, height: 48, color: 0x88aa99ff })
  return { name: 'jar.jpg', mimeType: 'image/jpeg', buffer: await image.getBuffer('image/jpeg') }
}
