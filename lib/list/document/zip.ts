import { Zip, ZipDeflate } from 'fflate'

/** Of every file: the day of the export stands in the archive's own name. */
const mtime = new Date(1980, 0, 1)

/** A ZIP archive handed on as it grows, so that a long list is never whole in memory. */
export async function* zipOf(
  files: AsyncIterable<{ name: string; parts: AsyncIterable<string> }>,
): AsyncGenerator<Uint8Array> {
  const ready: Uint8Array[] = []
  const zip = new Zip((error, bytes) => {
    if (error) throw error
    ready.push(bytes)
  })
  for await (const { name, parts } of files) {
    const file = new ZipDeflate(name)
    file.mtime = mtime
    zip.add(file)
    for await (const part of chunked(parts)) {
      file.push(Buffer.from(part))
      yield* ready.splice(0)
    }
    file.push(new Uint8Array(0), true)
    yield* ready.splice(0)
  }
  zip.end()
  yield* ready.splice(0)
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
