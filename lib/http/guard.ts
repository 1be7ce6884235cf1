import type { Actor } from '@/lib/auth/actor'
import { systemActor } from '@/lib/auth/actor'
import { may, type Permission } from '@/lib/auth/permissions'
import { findActor } from '@/lib/auth/session'
import { env } from '@/lib/env'
import { refuse } from './errors'

/** Public addresses act as the system, which holds no role. */
export async function authenticate(
  request: Request,
  permission: Permission,
  requestId: string,
): Promise<Actor> {
  if (permission === 'public') return systemActor(requestId)
  const actor = await findActor(request.headers.get('cookie'), requestId)
  if (!actor) throw refuse.signIn()
  // A page left open by one person must not write under another who has signed in on the same device since.
  const meant = request.headers.get('stillstand-person')
  if (meant && meant !== actor.personId)
    throw refuse.signIn(
      `${actor.name} is signed in on this device now. What you typed is kept; sign in again to send it.`,
    )
  return actor
}

export function authorize(actor: Actor, permission: Permission): void {
  if (!may(actor, permission))
    throw refuse.forbidden('Your role does not allow this. Ask the manager if it should.')
}

/** A browser always names the page's origin on a write; another site's page cannot hide it. */
export function assertSameOrigin(request: Request): void {
  const origin = request.headers.get('origin')
  const own = [request.headers.get('host'), hostOf(env().publicUrl)]
  const from = hostOf(origin)
  if (!from || !own.includes(from))
    throw refuse.forbidden('This was sent from another site’s page. Open Stillstand itself and do it there.')
}

export function readKey(request: Request): string {
  const key = request.headers.get('idempotency-key') ?? ''
  if (!/^[\w-]{8,100}$/.test(key))
    throw refuse.unreadable(
      'The request carries no Idempotency-Key of 8 to 100 letters, digits or dashes. Send one with it.',
    )
  return key
}

function hostOf(url: string | null): string | null {
  try {
    return url ? new URL(url).host : null
  } catch {
    return null
  }
}
