import { systemActor, type Actor } from '@/lib/auth/actor'
import type { Permission } from '@/lib/auth/permissions'
import { idOfCookie } from '@/lib/auth/session'
import type { Db } from '@/lib/db/client'
import { transact } from '@/lib/db/transact'
import { recordEvent, type TrailEvent } from '@/lib/trail/commands'
import { AppError } from './errors'
import { log } from './log'

/** A refused act is undone whole, so what the trail shall keep of it is written in a transaction of its own. */
export async function keepRefusal(
  db: Db,
  actor: Actor | null,
  requestId: string,
  request: Request,
  permission: Permission,
  thrown: unknown,
): Promise<void> {
  if (!(thrown instanceof AppError)) return
  const event = eventFor(actor, request, permission, thrown)
  if (!event) return
  try {
    await transact(db, actor ?? systemActor(), { requestId }, (trx) => recordEvent(trx, event))
  } catch (error) {
    log.error({ err: error, requestId }, 'a refusal could not be put on the trail')
  }
}

function eventFor(
  actor: Actor | null,
  request: Request,
  permission: Permission,
  error: AppError,
): TrailEvent | null {
  if (error.trailEvent) return error.trailEvent
  const { pathname } = new URL(request.url)
  const detail = {
    method: request.method,
    path: pathname.slice(0, 200),
    status: error.status,
    sentence: error.sentence,
  }
  if (actor && actor.roles.length > 0 && (error.status === 403 || error.status === 409))
    return { event: 'refused', detail }
  // An expired session at a signature is worth knowing; anonymous knocking elsewhere is not.
  if (!actor && permission === 'case.sign' && idOfCookie(request.headers.get('cookie')))
    return { event: 'refused without a session', detail }
  return null
}
