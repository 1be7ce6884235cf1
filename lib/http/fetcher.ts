import { newId } from '@/lib/db/id'
import type { ErrorBody } from './errors'

/** A refusal as the browser sees it. status 0: no answer came, nothing is known to have been saved. */
export class ClientError extends Error {
  readonly status: number
  readonly code: string
  readonly sentence: string
  readonly fields: Record<string, string>
  readonly detail: unknown

  constructor(error: ErrorBody['error']) {
    super(error.sentence)
    this.status = error.status
    this.code = error.code
    this.sentence = error.sentence
    this.fields = error.fields ?? {}
    this.detail = error.detail
  }
}

/** For SWR. With `personId` it is refused where somebody else has signed in here meanwhile. */
export async function fetcher<T>(url: string, personId?: string): Promise<T> {
  const who = personId ? { 'stillstand-person': personId } : undefined
  return readAnswer<T>(await reach(url, { headers: { accept: 'application/json', ...who } }))
}

/**
 * Give the same key again when the same act is sent again: it then happens once. With `personId` it is refused where
 * somebody else has signed in here meanwhile.
 */
export async function send<T>(
  url: string,
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  body: unknown,
  options: { key?: string; signal?: AbortSignal; personId?: string } = {},
): Promise<T> {
  const isForm = body instanceof FormData
  return readAnswer<T>(
    await reach(url, {
      method,
      body: isForm ? body : JSON.stringify(body ?? {}),
      signal: options.signal ?? null,
      headers: {
        accept: 'application/json',
        'idempotency-key': options.key ?? newId(),
        ...(isForm ? {} : { 'content-type': 'application/json' }),
        ...(options.personId ? { 'stillstand-person': options.personId } : {}),
      },
    }),
  )
}

async function reach(url: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(url, { ...init, credentials: 'same-origin' })
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause
    throw unreachable()
  }
}

export function unreachable(): ClientError {
  return new ClientError({
    status: 0,
    code: 'unreachable',
    sentence: 'The server cannot be reached. Check the connection, then try again.',
  })
}

/** No network, a restart, too many at once, or signed out: the same entry can go out later. */
export function isPassing(error: ClientError): boolean {
  return error.status === 0 || error.status === 401 || error.status === 429 || error.status >= 500
}

export async function readAnswer<T>(response: Response): Promise<T> {
  const body: unknown = await response.json().catch(() => null)
  if (response.ok) return body as T
  const error = (body as ErrorBody | null)?.error
  throw new ClientError(
    error ?? {
      status: response.status,
      code: 'unknown',
      sentence: 'The server gave an answer that cannot be read. Try again.',
    },
  )
}
