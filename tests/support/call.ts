import { newId } from '@/lib/db/id'
import { installAddress } from '@/lib/http/address'
import type { Route } from '@/lib/http/route'

// The routes believe the address that call() gives as they would the server's own.
installAddress()

type Options = {
  cookie?: string | undefined
  body?: unknown
  params?: Record<string, string | string[]>
  query?: Record<string, string>
  method?: string
  /** undefined removes one that is set by default (origin, idempotency-key, content-type). */
  headers?: Record<string, string | undefined>
  key?: string
  path?: string
  address?: string
}

export type Answer = {
  status: number
  /** JSON where there is some, else text. */
  body: any // eslint-disable-line @typescript-eslint/no-explicit-any -- tests look into answers freely
  headers: Headers
  response: Response
}

/** Calls an exported route as the browser would. */
export async function call(route: Route, options: Options = {}): Promise<Answer> {
  const isWrite = route.kind === 'write' || route.kind === 'upload'
  const method = options.method ?? (isWrite ? 'POST' : 'GET')
  const url = new URL(options.path ?? '/api/test', 'http://lab.example')
  for (const [key, value] of Object.entries(options.query ?? {})) url.searchParams.set(key, value)
  const isForm = options.body instanceof FormData
  const body = method === 'GET' ? null : isForm ? (options.body as FormData) : textOf(options.body)
  const headers: Record<string, string | undefined> = {
    host: url.host,
    'x-stillstand-address': options.address ?? '192.0.2.1',
    ...(options.cookie ? { cookie: options.cookie } : {}),
    ...(isWrite ? { origin: url.origin, 'idempotency-key': options.key ?? newId() } : {}),
    ...(isWrite && !isForm ? { 'content-type': 'application/json' } : {}),
    ...options.headers,
  }
  const given = Object.entries(headers).filter((entry): entry is [string, string] => entry[1] !== undefined)
  const request = new Request(url, { method, headers: given, body })
  const response = await route(request, { params: Promise.resolve(options.params ?? {}) })
  const isJson = (response.headers.get('content-type') ?? '').startsWith('application/json')
  const answer = isJson ? await response.clone().json() : await response.clone().text()
  return { status: response.status, body: answer, headers: response.headers, response }
}

function textOf(body: unknown): string {
  return typeof body === 'string' ? body : JSON.stringify(body ?? {})
}
