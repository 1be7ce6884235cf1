import type { z } from 'zod'
import { refuse } from './errors'
import { fromZod } from './respond'

const largestBody = 1_000_000

/** An address that cannot be one looks like one that is not there. */
export async function parseParams<P>(
  schema: z.ZodType<P> | undefined,
  params: Promise<unknown> | undefined,
): Promise<P> {
  const given = (await params) ?? {}
  if (!schema) return given as P
  const parsed = schema.safeParse(given)
  if (!parsed.success) throw refuse.notFound()
  return parsed.data
}

export function parseQuery<Q>(schema: z.ZodType<Q> | undefined, url: URL): Q {
  const given: Record<string, string | string[]> = {}
  for (const key of new Set(url.searchParams.keys())) {
    const values = url.searchParams.getAll(key)
    given[key] = values.length === 1 ? values[0]! : values
  }
  return parseWith(schema, given)
}

export function parseBody<I>(schema: z.ZodType<I> | undefined, text: string): I {
  let given: unknown = {}
  if (text.trim() !== '') {
    try {
      given = JSON.parse(text)
    } catch {
      throw refuse.unreadable('What was sent is not JSON. Reload the page and try again.')
    }
  }
  return parseWith(schema, given)
}

export function parseWith<T>(schema: z.ZodType<T> | undefined, given: unknown): T {
  if (!schema) return given as T
  const parsed = schema.safeParse(given)
  if (!parsed.success) throw fromZod(parsed.error)
  return parsed.data
}

export async function readBody(request: Request): Promise<string> {
  if (!request.body) return ''
  const type = request.headers.get('content-type') ?? ''
  if (!/^application\/json\b/i.test(type))
    throw refuse.unsupported('This address takes JSON. Send it with the content type application/json.')
  const decoder = new TextDecoder('utf-8', { fatal: true })
  let text = ''
  let bytes = 0
  try {
    for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
      bytes += chunk.byteLength
      if (bytes > largestBody) break
      text += decoder.decode(chunk, { stream: true })
    }
    if (bytes <= largestBody) text += decoder.decode()
  } catch {
    throw refuse.unreadable('What was sent is not readable as text. Reload the page and try again.')
  }
  if (bytes > largestBody)
    throw refuse.tooLarge('What was sent is larger than 1 MB. Send it in smaller parts.')
  // PostgreSQL can keep no NUL in text.
  if (text.includes('\\u0000') || text.includes('\u0000'))
    throw refuse.invalid('What was sent holds a character that cannot be kept. Type it again.')
  return text
}
