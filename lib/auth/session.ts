import { createHash, randomBytes } from 'node:crypto'
import { NodePostgresAdapter } from '@lucia-auth/adapter-postgresql'
import { CompiledQuery } from 'kysely'
import { Lucia, TimeSpan } from 'lucia'
import pg from 'pg'
import { appPool, type Trx } from '@/lib/db/client'
import { env } from '@/lib/env'
import { roles, type Actor, type Role } from './actor'

const idleHours = 8
const absoluteHours = 24
// A request moves the idle limit at most this often, so that most requests write nothing.
const renewEveryMs = 5 * 60_000

type PersonRow = {
  email: string
  name: string
  initials: string
  roles: string[]
  client_id: string | null
  is_active: boolean
  is_system: boolean
}
type SessionRow = { created_at?: Date; is_demo: boolean }

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<SessionRow, PersonRow>
    DatabaseUserAttributes: PersonRow
    DatabaseSessionAttributes: SessionRow
  }
}

type Executor = { query: (text: string, values?: unknown[]) => Promise<{ rows: unknown[] }> }

function adapterOn(executor: Executor): NodePostgresAdapter {
  return new NodePostgresAdapter(executor as unknown as pg.Pool, { user: 'person', session: 'session' })
}

function luciaOn(adapter: NodePostgresAdapter) {
  return new Lucia<SessionRow, PersonRow>(adapter, {
    sessionExpiresIn: new TimeSpan(idleHours, 'h'),
    getSessionAttributes: (row) => row,
    getUserAttributes: (row) => row,
  })
}

// lucia wants dates where the pool's own parsers give text.
const pooled: Executor = {
  query: (text, values) => appPool().query({ text, values: values ?? [], types: pg.types }),
}
const pooledAdapter = adapterOn(pooled)
const lucia = luciaOn(pooledAdapter)

const within = (trx: Trx) =>
  luciaOn(adapterOn({ query: (text, values) => trx.executeQuery(CompiledQuery.raw(text, values ?? [])) }))

/** Two statements; none without a cookie. */
export async function findActor(cookieHeader: string | null, requestId: string): Promise<Actor | null> {
  const secret = readSessionCookie(cookieHeader)
  if (!secret) return null
  const { session, user } = await lucia.validateSession(idOf(secret))
  if (!session || !user || !user.is_active || user.is_system) return null
  const now = Date.now()
  if (now - session.created_at!.getTime() > absoluteHours * 3_600_000) {
    await lucia.invalidateSession(session.id)
    return null
  }
  if (session.expiresAt.getTime() - now < idleHours * 3_600_000 - renewEveryMs)
    await pooledAdapter.updateSessionExpiration(session.id, new Date(now + idleHours * 3_600_000))
  return {
    personId: user.id,
    name: user.name,
    initials: user.initials,
    email: user.email,
    roles: user.roles.filter((role): role is Role => (roles as readonly string[]).includes(role)),
    clientId: user.client_id,
    sessionId: session.id,
    requestId,
    isDemo: session.is_demo,
  }
}

/** Returns the cookie's secret; the database keeps only its hash. */
export async function openSession(trx: Trx, personId: string, isDemo: boolean): Promise<string> {
  const secret = randomBytes(20).toString('base64url')
  await within(trx).createSession(personId, { is_demo: isDemo }, { sessionId: idOf(secret) })
  return secret
}

export async function endSession(trx: Trx, sessionId: string): Promise<void> {
  await within(trx).invalidateSession(sessionId)
}

export async function endSessionsOf(trx: Trx, personId: string): Promise<void> {
  await within(trx).invalidateUserSessions(personId)
}

export function idOfCookie(cookieHeader: string | null): string | null {
  const secret = readSessionCookie(cookieHeader)
  return secret ? idOf(secret) : null
}

const isSecure = () => env().publicUrl.startsWith('https:')
const cookieName = () => (isSecure() ? '__Host-stillstand' : 'stillstand')

export function sessionCookie(secret: string): string {
  return cookie(secret, absoluteHours * 3600)
}

export function blankSessionCookie(): string {
  return cookie('', 0)
}

function cookie(value: string, maxAge: number): string {
  const secure = isSecure() ? '; Secure' : ''
  return `${cookieName()}=${value}; Path=/; HttpOnly; SameSite=Lax; Max-Age=${maxAge}${secure}`
}

function readSessionCookie(header: string | null): string | null {
  for (const part of (header ?? '').split(';')) {
    const [name, value] = part.trim().split('=')
    if (name === cookieName() && value && /^[\w-]{20,64}$/.test(value)) return value
  }
  return null
}

function idOf(secret: string): string {
  return createHash('sha256').update(secret).digest('hex')
}
