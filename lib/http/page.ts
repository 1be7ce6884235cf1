import { headers } from 'next/headers'
import { notFound, redirect } from 'next/navigation'
import { connection } from 'next/server'
import { cache } from 'react'
import type { Actor } from '@/lib/auth/actor'
import { may, type Permission } from '@/lib/auth/permissions'
import { findActor } from '@/lib/auth/session'
import { db, type Db } from '@/lib/db/client'
import { newId } from '@/lib/db/id'

/** For a server component; the page exports the same permission, which the sweep reads. */
export async function page(
  permission: Exclude<Permission, 'public'>,
): Promise<{ actor: Actor; db: Db; now: string }> {
  const { actor, path } = await visit()
  if (!actor) redirect(path === '/' ? '/sign-in' : `/sign-in?to=${encodeURIComponent(path)}`)
  // What is not yours looks like what does not exist.
  if (!may(actor, permission)) notFound()
  return { actor, db, now: new Date().toISOString() }
}

/** For pages that need no session: sign-in, invitation, reset, set-up. */
export async function visitor(): Promise<{ actor: Actor | null; db: Db; now: string }> {
  const { actor } = await visit()
  return { actor, db, now: new Date().toISOString() }
}

// The layout and its page ask in the same request: the session is looked up once.
const visit = cache(async (): Promise<{ actor: Actor | null; path: string }> => {
  // Each page renders per request: its nonce is new each time.
  await connection()
  const given = await headers()
  return { actor: await findActor(given.get('cookie'), newId()), path: given.get('x-stillstand-path') ?? '/' }
})
