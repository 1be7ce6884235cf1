import { randomBytes } from 'node:crypto'
import { hashPassword } from '@/lib/auth/password'
import { roles, systemActor, type Actor, type Role } from '@/lib/auth/actor'
import { openSession, sessionCookie } from '@/lib/auth/session'
import { appPool, createDb, createPool, db, type Db } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { ensureTemplate, urlAs, withAdmin } from './template'

export type Signed = { actor: Actor; cookie: string }

export type TestDatabase = {
  /** The application's own handle, as the routes use it. */
  db: Db
  /** Owns the tables: for looking behind the application's back. */
  owner: Db
  /** The seeding role, which may shift the clock. */
  seed: Db
  name: string
  url: (role: 'stillstand_app' | 'stillstand_owner' | 'stillstand_seed' | 'stillstand_admin') => string
  person: (role: Role | Role[], more?: PersonOptions) => Promise<Signed>
  lab: (name?: string, timeZone?: string) => Promise<string>
  close: () => Promise<void>
}

type PersonOptions = { name?: string; email?: string; clientId?: string; password?: string; isDemo?: boolean }

/** A clone of the migrated template. One per test file, because the routes' own pool points to it. */
export async function testDatabase(): Promise<TestDatabase> {
  const template = await ensureTemplate()
  const name = `stillstand_test_${process.pid}_${randomBytes(4).toString('hex')}`
  await withAdmin(async (admin) => {
    // Cloning needs the template to itself for a moment.
    await admin.query("select pg_advisory_lock(hashtext('stillstand clone'))")
    await admin.query(`create database ${name} template ${template} owner stillstand_owner`)
  })
  process.env['DATABASE_URL'] = urlAs('stillstand_app', name)
  const [ownerPool, seedPool] = ['stillstand_owner', 'stillstand_seed'].map((role) =>
    createPool(urlAs(role, name), 4),
  )
  const owner = createDb(() => ownerPool!)
  const seed = createDb(() => seedPool!)
  return {
    db,
    owner,
    seed,
    name,
    url: (role) => urlAs(role, name),
    person: (role, more = {}) => makePerson(Array.isArray(role) ? role : [role], more),
    lab: makeLab,
    close: async () => {
      await Promise.all([appPool().end(), ownerPool!.end(), seedPool!.end()])
      await withAdmin((admin) => admin.query(`drop database if exists ${name} with (force)`))
    },
  }
}

async function makeLab(name = 'Test lab', timeZone = 'Europe/Berlin'): Promise<string> {
  const id = newId()
  await transact(db, systemActor(), {}, (trx) =>
    trx.insertInto('lab').values({ id, name, timeZone }).execute(),
  )
  return id
}

let count = 0

async function makePerson(held: Role[], more: PersonOptions): Promise<Signed> {
  count += 1
  const id = newId()
  const name = more.name ?? `${held[0] ?? 'nobody'} ${roles.length + count}`
  const email = more.email ?? `person${count}@lab.example`
  const hash = more.password ? await hashPassword(more.password) : null
  const { cookie, clientId } = await transact(db, systemActor(), {}, async (trx) => {
    const clientId = held.includes('client') ? (more.clientId ?? newId()) : null
    if (clientId && !more.clientId)
      await trx
        .insertInto('client')
        .values({ id: clientId, name: `Client ${count}` })
        .execute()
    const initials = `P${count}`
    await trx
      .insertInto('person')
      .values({ id, email, name, initials, roles: held, clientId, isDemo: more.isDemo ?? false })
      .execute()
    if (hash) await trx.insertInto('password').values({ personId: id, hash }).execute()
    const secret = await openSession(trx, id, false)
    return { cookie: sessionCookie(secret).split(';')[0]!, clientId }
  })
  const { sessionId, requestId } = { sessionId: '', requestId: newId() }
  const actor: Actor = {
    personId: id,
    name,
    initials: `P${count}`,
    email,
    roles: held,
    clientId,
    sessionId,
    requestId,
    isDemo: false,
  }
  return { actor, cookie }
}
