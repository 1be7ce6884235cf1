import { mkdir, open, rm } from 'node:fs/promises'
import { Readable } from 'node:stream'
import type { IncomingMessage } from 'node:http'
import { fileTypeFromBuffer } from 'file-type'
import formidable, { errors as formErrors, type File } from 'formidable'
import { env } from '@/lib/env'
import { incomingIn } from '@/lib/files/incoming'
import { AppError, refuse } from './errors'

export type Received = { path: string; sha256: string; bytes: number; type: string; originalName: string }

/** Types are told by content, whatever the name or the browser says. */
export type Accepted = { maxBytes: number; types: readonly string[] }
type Sent = { file: Received; beside: Received | null; texts: Record<string, string> }

/** A form's field `file`, and where it is taken the file in another field that goes along with it. */
export async function receive(
  request: Request,
  { maxBytes, types }: Accepted,
  beside?: Accepted & { field: string },
): Promise<Sent> {
  if (!/^multipart\/form-data\b/i.test(request.headers.get('content-type') ?? '') || !request.body)
    throw refuse.unsupported('This address takes a file. Send it as a form with one field named file.')
  const folder = incomingIn(env().filesFolder)
  await mkdir(folder, { recursive: true })
  const form = formidable({
    uploadDir: folder,
    hashAlgorithm: 'sha256',
    maxFiles: beside ? 2 : 1,
    maxFields: 30,
    maxFieldsSize: 100_000,
    maxFileSize: maxBytes,
    maxTotalFileSize: maxBytes + (beside?.maxBytes ?? 0),
    allowEmptyFiles: false,
  })
  // Names are the server's own; the caller's name is kept as text only.
  const stored: string[] = []
  form.on('fileBegin', (_name, file) => void stored.push(file.filepath))
  try {
    const source = Object.assign(Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0]), {
      headers: headersOf(request),
      method: request.method,
      url: request.url,
    })
    const [fields, files] = await form.parse(source as unknown as IncomingMessage)
    const file = files['file']?.[0]
    if (!file)
      throw refuse.invalid('No file arrived. Choose one and send it again.', { file: 'Choose a file.' })
    const texts: Record<string, string> = {}
    for (const [name, values] of Object.entries(fields)) texts[name] = values?.at(-1) ?? ''
    const other = beside && files[beside.field]?.[0]
    if (other && other.size > beside.maxBytes)
      throw refuse.tooLarge(`The file beside it is larger than ${Math.floor(beside.maxBytes / 1e6)} MB.`)
    return {
      file: await received(file, types),
      beside: other ? await received(other, beside.types) : null,
      texts,
    }
  } catch (thrown) {
    await Promise.all(stored.map(discard))
    throw toRefusal(thrown, maxBytes)
  }
}

async function received(
  { filepath, originalFilename, hash, size }: File,
  types: readonly string[],
): Promise<Received> {
  const name = originalFilename ?? ''
  if (name.includes('/'))
    throw refuse.invalid(
      `"${name.slice(0, 60)}" is a path and not a file's name. Name the file plainly and send it again.`,
      {
        file: 'A plain name, without a path.',
      },
    )
  const type = await typeOf(filepath)
  if (!type || !types.includes(type))
    throw refuse.unsupported(`This file is not one of ${types.join(', ')} by its content. Choose another.`)
  const originalName = name.replace(/[\u0000-\u001f]/g, '').slice(0, 200)
  return { path: filepath, sha256: String(hash), bytes: size, type, originalName }
}

export async function discard(filePath: string): Promise<void> {
  await rm(filePath, { force: true })
}

// Without a length formidable takes the body for empty, unless it is told that it comes in pieces.
function headersOf(request: Request): Record<string, string> {
  const headers = Object.fromEntries(request.headers)
  return headers['content-length'] ? headers : { ...headers, 'transfer-encoding': 'chunked' }
}

async function typeOf(filePath: string): Promise<string | undefined> {
  const handle = await open(filePath)
  try {
    const head = Buffer.alloc(4100)
    const { bytesRead } = await handle.read(head, 0, head.length, 0)
    const start = head.subarray(0, bytesRead)
    // UTF-16's mark looks like the start of a sound file.
    const isWide = start[0] === 0xff && start[1] === 0xfe
    return isWide ? textType(start) : ((await fileTypeFromBuffer(start))?.mime ?? textType(start))
  } finally {
    await handle.close()
  }
}

/** Text has no signature; what holds no control characters is text, in one byte or in two (UTF-16 with its mark). */
function textType(head: Uint8Array): string | undefined {
  const isWide = head[0] === 0xff && head[1] === 0xfe
  const isText = head.every(
    (byte) => byte >= 0x20 || [9, 10, 12, 13].includes(byte) || (isWide && byte === 0),
  )
  return isText ? 'text/plain' : undefined
}

function toRefusal(thrown: unknown, maxBytes: number): unknown {
  if (thrown instanceof AppError) return thrown
  const { code, httpCode } = thrown as { code?: number; httpCode?: number }
  if (
    code === formErrors.biggerThanMaxFileSize ||
    code === formErrors.biggerThanTotalMaxFileSize ||
    httpCode === 413
  )
    return refuse.tooLarge(`The file is larger than ${Math.floor(maxBytes / 1e6)} MB. Choose a smaller one.`)
  if (code === formErrors.noEmptyFiles)
    return refuse.invalid('The file is empty. Choose another.', { file: 'Choose another file.' })
  if (httpCode) return refuse.unreadable('The file did not arrive whole. Send it again.')
  return thrown
}
