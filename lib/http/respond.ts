import { ZodError } from 'zod'
import { newId } from '@/lib/db/id'
import { fromDatabaseError } from './database-errors'
import { AppError, refuse, type ErrorBody } from './errors'
import { log } from './log'

/** On every answer of the API, refusals too. */
export const safeHeaders: Record<string, string> = {
  'cache-control': 'no-store',
  'content-security-policy':
    "default-src 'none'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'",
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': 'camera=(self), geolocation=(), microphone=()',
  'referrer-policy': 'same-origin',
  'x-content-type-options': 'nosniff',
  'x-frame-options': 'DENY',
}

export type Reply = { headers: Headers; status: number }

export function newReply(requestId: string): Reply {
  return { headers: new Headers({ ...safeHeaders, 'x-request-id': requestId }), status: 200 }
}

export function answerJson(reply: Reply, json: string): Response {
  reply.headers.set('content-type', 'application/json; charset=utf-8')
  return new Response(json, { status: reply.status, headers: reply.headers })
}

export function answerError(reply: Reply, thrown: unknown): Response {
  const error = toAppError(thrown)
  const body: ErrorBody = { error: { status: error.status, code: error.code, sentence: error.sentence } }
  if (error.fields) body.error.fields = error.fields
  if (error.detail !== undefined) body.error.detail = error.detail
  if (error.retryAfterSeconds) reply.headers.set('retry-after', String(error.retryAfterSeconds))
  if (error.status >= 500) {
    body.error.incident = newId()
    log.error(
      { incident: body.error.incident, requestId: reply.headers.get('x-request-id'), err: thrown },
      'failed',
    )
  }
  reply.status = error.status
  return answerJson(reply, JSON.stringify(body))
}

export function toAppError(thrown: unknown): AppError {
  if (thrown instanceof AppError) return thrown
  if (thrown instanceof ZodError) return fromZod(thrown)
  return (
    fromDatabaseError(thrown) ??
    new AppError(
      500,
      'fault',
      'This did not work and the fault is the server’s. Nothing was saved. Try again; if it stays, give the manager the incident number.',
      { cause: thrown },
    )
  )
}

export function fromZod(error: ZodError): AppError {
  const fields: Record<string, string> = {}
  for (const issue of error.issues) fields[issue.path.map(String).join('.')] ??= issue.message
  const [first] = Object.entries(fields)
  const others = Object.keys(fields).length - 1
  // A form's own field shows its sentence where it was typed; a place further in is named before it.
  const where = first?.[0].includes('.') ? `${placeInWords(first[0])}: ` : ''
  const more = others > 0 ? ` ${others} more like it.` : ''
  return refuse.invalid(`${where}${first?.[1] ?? 'This cannot be taken.'}${more}`, fields)
}

/** "check.points.0.mV" is "Point 1, mV": rows by their number, names in words, what merely holds them left out. */
export function placeInWords(path: string): string {
  const parts = path.split('.')
  const words = parts.flatMap((part, index) => {
    if (/^\d+$/.test(part)) return []
    const isRow = /^\d+$/.test(parts[index + 1] ?? '')
    if (!isRow && index < parts.length - 1) return []
    const plain = /^m[VG]$/.test(part) ? part : part.replace(/[A-Z]+/g, (upper) => ` ${upper.toLowerCase()}`)
    return [isRow ? `${plain.replace(/ies$/, 'y').replace(/s$/, '')} ${Number(parts[index + 1]) + 1}` : plain]
  })
  const said = words.join(', ') || path
  return said.charAt(0).toUpperCase() + said.slice(1)
}
