import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Permission } from '@/lib/auth/permissions'
import { db, type Db, type Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { assertSameOrigin, authenticate, authorize, readKey } from './guard'
import { claimKey, hashBody, keepAnswer } from './idempotency'
import { parseBody, parseParams, parseQuery, parseWith, readBody } from './parse'
import { keepRefusal } from './refusal'
import { answerError, answerJson, newReply, type Reply } from './respond'
import { discard, receive, type Accepted, type Received } from './upload'

type Context = { params: Promise<unknown> }

/** A route is a declaration; the sweeps read its permission off the exported function. */
export type Route = ((request: Request, context?: Context) => Promise<Response>) & {
  permission: Permission
  kind: 'read' | 'write' | 'upload' | 'download'
}

type Common<P> = { permission: Permission; params?: z.ZodType<P> }
type Nothing = Record<string, never>

type ReadArgs<P, Q> = {
  db: Db
  actor: Actor
  params: P
  query: Q
  now: string
  request: Request
  reply: Reply
}
type WriteArgs<P, I> = {
  db: Trx
  actor: Actor
  params: P
  input: I
  now: string
  request: Request
  reply: Reply
}
type UploadArgs<P, F> = {
  db: Trx
  actor: Actor
  params: P
  file: Received
  /** Null where none came along. */
  beside: Received | null
  fields: F
  now: string
}
export type Download = {
  body: Uint8Array | ReadableStream<Uint8Array>
  type: string
  fileName?: string
  inline?: boolean
}

export function read<P = Nothing, Q = Nothing, R = unknown>(
  spec: Common<P> & { query?: z.ZodType<Q>; handler: (args: ReadArgs<P, Q>) => Promise<R> | R },
): Route {
  return declare('read', spec.permission, async (request, context, actor, reply) => {
    const params = await parseParams(spec.params, context?.params)
    const query = parseQuery(spec.query, new URL(request.url))
    const result = await spec.handler({
      db,
      actor,
      params,
      query,
      now: new Date().toISOString(),
      request,
      reply,
    })
    return answerJson(reply, JSON.stringify(result ?? null))
  })
}

export function write<P = Nothing, I = Nothing, R = unknown>(
  spec: Common<P> & {
    input?: z.ZodType<I>
    /** What the trail says about why. */
    reason?: (input: I) => string | undefined
    handler: (args: WriteArgs<P, I>) => Promise<R> | R
  },
): Route {
  return declare('write', spec.permission, async (request, context, actor, reply) => {
    const key = spec.permission === 'public' ? null : readKey(request)
    const params = await parseParams(spec.params, context?.params)
    const text = await readBody(request)
    const input = parseBody(spec.input, text)
    return once(request, actor, reply, key, hashBody(text), spec.reason?.(input), (trx, now) =>
      spec.handler({ db: trx, actor, params, input, now, request, reply }),
    )
  })
}

/** The file is whole, checked and hashed on disk before the transaction opens; the handler moves it away. */
export function upload<P = Nothing, F = Nothing, R = unknown>(
  spec: Common<P> &
    Accepted & {
      /** A second file that may come along, in a field of its own; a repeat need not bring the same one. */
      beside?: Accepted & { field: string }
      fields?: z.ZodType<F>
      handler: (args: UploadArgs<P, F>) => Promise<R> | R
    },
): Route {
  return declare('upload', spec.permission, async (request, context, actor, reply) => {
    const key = readKey(request)
    const params = await parseParams(spec.params, context?.params)
    const { file, beside, texts } = await receive(request, spec, spec.beside)
    try {
      const fields = parseWith(spec.fields, texts)
      const bodyHash = hashBody(file.sha256 + JSON.stringify(texts))
      return await once(request, actor, reply, key, bodyHash, undefined, (trx, now) =>
        spec.handler({ db: trx, actor, params, file, beside, fields, now }),
      )
    } finally {
      await discard(file.path)
      if (beside) await discard(beside.path)
    }
  })
}

export function download<P = Nothing, Q = Nothing>(
  spec: Common<P> & { query?: z.ZodType<Q>; handler: (args: ReadArgs<P, Q>) => Promise<Download> | Download },
): Route {
  return declare('download', spec.permission, async (request, context, actor, reply) => {
    const params = await parseParams(spec.params, context?.params)
    const query = parseQuery(spec.query, new URL(request.url))
    const now = new Date().toISOString()
    const { body, type, fileName, inline } = await spec.handler({
      db,
      actor,
      params,
      query,
      now,
      request,
      reply,
    })
    reply.headers.set('content-type', type)
    const name = fileName ? `; filename*=UTF-8''${encodeURIComponent(fileName)}` : ''
    reply.headers.set('content-disposition', `${inline ? 'inline' : 'attachment'}${name}`)
    return new Response(body as BodyInit, { status: reply.status, headers: reply.headers })
  })
}

type Handle = (
  request: Request,
  context: Context | undefined,
  actor: Actor,
  reply: Reply,
) => Promise<Response>

function declare(kind: Route['kind'], permission: Permission, handle: Handle): Route {
  const route = async (request: Request, context?: Context): Promise<Response> => {
    const requestId = newId()
    const reply = newReply(requestId)
    let actor: Actor | null = null
    try {
      actor = await authenticate(request, permission, requestId)
      if (kind === 'write' || kind === 'upload') assertSameOrigin(request)
      authorize(actor, permission)
      return await handle(request, context, actor, reply)
    } catch (thrown) {
      if (kind !== 'read') await keepRefusal(db, actor, requestId, request, permission, thrown)
      return answerError(newReply(requestId), thrown)
    }
  }
  return Object.assign(route, { permission, kind })
}

async function once(
  request: Request,
  actor: Actor,
  reply: Reply,
  key: string | null,
  bodyHash: string,
  reason: string | undefined,
  act: (trx: Trx, now: string) => unknown,
): Promise<Response> {
  const route = `${request.method} ${new URL(request.url).pathname}`
  const claim = key ? { actorId: actor.personId, key, route, bodyHash } : null
  const answer = await transact(db, actor, { reason, requestId: actor.requestId }, async (trx, now) => {
    const first = claim && (await claimKey(trx, claim))
    if (first) return first
    const result = { json: JSON.stringify((await act(trx, now)) ?? null), status: reply.status }
    if (claim) await keepAnswer(trx, claim, result)
    return result
  })
  reply.status = answer.status
  return answerJson(reply, answer.json)
}
