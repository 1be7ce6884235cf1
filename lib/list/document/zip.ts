import { crc32, deflateRawSync } from 'node:zlib'

type Entry = { name: string; offset: number; crc: number; packed: number; plain: number }

const utf8 = 0x0800
const sizesFollow = 0x0008
const deflated = 8

/** A ZIP archive written as it grows (PKWARE APPNOTE 6.3.9, sizes in data descriptors), up to 4 GB. */
export async function* zipOf(
  files: AsyncIterable<{ name: string; parts: AsyncIterable<string> }>,
): AsyncGenerator<Uint8Array> {
  const entries: Entry[] = []
  let offset = 0
  for await (const { name, parts } of files) {
    const head = header(
      0x04034b50,
      [
        [2, 20],
        [2, utf8 | sizesFollow],
        [2, deflated],
        [4, stamp],
        [4, 0],
        [4, 0],
        [4, 0],
      ],
      name,
    )
    const entry = { name, offset, crc: 0, packed: 0, plain: 0 }
    yield head
    for await (const part of chunked(parts)) {
      const bytes = Buffer.from(part)
      // Blocks that each end at a byte may follow one another; an empty last one closes the stream.
      const packed = deflateRawSync(bytes, { finishFlush: syncFlush })
      entry.crc = crc32(bytes, entry.crc)
      entry.plain += bytes.length
      entry.packed += packed.length
      yield packed
    }
    yield lastBlock
    entry.packed += lastBlock.length
    const descriptor = numbers([
      [4, 0x08074b50],
      [4, entry.crc],
      [4, entry.packed],
      [4, entry.plain],
    ])
    yield descriptor
    offset += head.length + entry.packed + descriptor.length
    entries.push(entry)
  }
  const directory = Buffer.concat(entries.map(directoryEntry))
  yield directory
  yield numbers([
    [4, 0x06054b50],
    [2, 0],
    [2, 0],
    [2, entries.length],
    [2, entries.length],
    [4, directory.length],
    [4, offset],
    [2, 0],
  ])
}

/** Z_SYNC_FLUSH of zlib. */
const syncFlush = 2
/** A final block of fixed codes that holds nothing (RFC 1951, 3.2.3). */
const lastBlock = Buffer.from([0x03, 0x00])
/** 1980-01-01: the day of the file stands in its name. */
const stamp = 0x00210000

function directoryEntry({ name, offset, crc, packed, plain }: Entry): Buffer {
  return header(
    0x02014b50,
    [
      [2, 20],
      [2, 20],
      [2, utf8 | sizesFollow],
      [2, deflated],
      [4, stamp],
      [4, crc],
      [4, packed],
      [4, plain],
    ],
    name,
    [
      [2, 0],
      [2, 0],
      [2, 0],
      [4, 0],
      [4, offset],
    ],
  )
}

type Field = [bytes: 2 | 4, value: number]

function header(signature: number, fields: Field[], name: string, after: Field[] = []): Buffer {
  const text = Buffer.from(name)
  return Buffer.concat([numbers([[4, signature], ...fields, [2, text.length], [2, 0], ...after]), text])
}

function numbers(fields: Field[]): Buffer {
  const bytes = Buffer.alloc(fields.reduce((sum, [size]) => sum + size, 0))
  let at = 0
  for (const [size, value] of fields)
    at = size === 2 ? bytes.writeUInt16LE(value, at) : bytes.writeUInt32LE(value, at)
  return bytes
}

/** Many short texts as few long ones, which pack better. */
async function* chunked(parts: AsyncIterable<string>): AsyncGenerator<string> {
  let text = ''
  for await (const part of parts) {
    text += part
    if (text.length < 100_000) continue
    yield text
    text = ''
  }
  if (text) yield text
}
