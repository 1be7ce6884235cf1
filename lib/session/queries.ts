import type { Actor } from '@/lib/auth/actor'
import { findTokenPerson } from '@/lib/auth/token'
import type { Db } from '@/lib/db/client'

/** What the page's frame needs to know of who is signed in. */
export function profileOf(actor: Actor) {
  const { personId, name, initials, email, roles, isDemo } = actor
  return { personId, name, initials, email, roles, isDemo }
}

export type Profile = ReturnType<typeof profileOf>

/** Who is greeted on the page behind the link; null where the link is used up or too old. */
export function findInvitation(db: Db, token: string) {
  return findTokenPerson(db, 'invitation', token)
}

export function findReset(db: Db, token: string) {
  return findTokenPerson(db, 'reset', token)
}
