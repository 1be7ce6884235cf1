import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sql } from 'kysely'
import pg from 'pg'
import { POST as postClient } from '@/app/api/clients/route'
import { PATCH as patchPerson } from '@/app/api/people/[id]/route'
import { POST as postPerson } from '@/app/api/people/route'
import { GET as getTrail } from '@/app/api/trail/route'
import { systemActor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { trailRows } from '@/lib/cli/checks/trail-rows'
import { trailSeal } from '@/lib/cli/checks/trail-seal'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let manager: Signed
beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  manager = await t.person('manager')
})
afterAll(() => t.close())

const trailOf = (table: string, id: string) =>
  t.owner
    .selectFrom('trail')
    .selectAll()
    .where('tableName', '=', table)
    .where('rowId', '=', id)
    .orderBy('id')
    .execute()

describe('R01: every changed row leaves one trail row', () => {
  it('with who, when, before, after, reason and request', async () => {
    const id = newId()
    const base = { email: 'lena@lab.example', name: 'Lena Ost', initials: 'LO', roles: ['technician'] }
    const made = await call(postPerson, { cookie: manager.cookie, body: { id, ...base } })
    const { email: _, ...rest } = base
    const change = { ...rest, name: 'Lena West', version: 1, isActive: true, reason: 'married' }
    const changed = await call(patchPerson, {
      cookie: manager.cookie,
      method: 'PATCH',
      params: { id },
      body: change,
    })
    expect([made.status, changed.status]).toEqual([200, 200])
    const [first, second, ...more] = await trailOf('person', id)
    expect(more).toEqual([])
    expect(first).toMatchObject({
      operation: 'insert',
      before: null,
      actorId: manager.actor.personId,
      reason: null,
    })
    expect(second).toMatchObject({
      operation: 'update',
      before: { name: 'Lena Ost', version: 1 },
      after: { name: 'Lena West', version: 2 },
      reason: 'married',
      requestId: changed.headers.get('x-request-id'),
      isShifted: false,
    })
    const ofRequest = await t.owner
      .selectFrom('trail')
      .select('id')
      .where('requestId', '=', changed.headers.get('x-request-id'))
      .execute()
    expect(ofRequest).toHaveLength(1)
  })

  it('and a write without an actor fails', async () => {
    const without = t.db.insertInto('client').values({ id: newId(), name: 'Nobody’s' }).execute()
    await expect(without).rejects.toThrow(/needs an actor/)
    // An ended transaction's setting comes back empty on the pooled connection, and is no actor either.
    await transact(t.db, systemActor(), {}, async () => undefined)
    await expect(t.db.insertInto('client').values({ id: newId(), name: 'X' }).execute()).rejects.toThrow(
      /actor/,
    )
  })
})

describe('R04: readings and trail are append-only for the application’s role', () => {
  it.each([
    'update trail set reason = null',
    'delete from trail',
    'truncate trail',
    'truncate reading cascade',
    'update reading set value = 1',
    'delete from reading',
    'update signature set comment = null',
    'delete from signature',
    'alter table trail add column x int',
    'alter table reading disable trigger all',
    'drop trigger trail on reading',
    'drop table reading',
    'create or replace function app_now() returns timestamptz language sql as $$ select now() $$',
    "insert into trail (actor_id, operation, event) select id, 'event', 'made up' from person limit 1",
    'insert into trail_seal values (1, 1, null)',
    "insert into trail_exemption values ('reading', 'because')",
    "set session_replication_role = 'replica'",
    'set role stillstand_owner',
    'create table mine (x int)',
  ])('%s', async (statement) => {
    for (const role of ['stillstand_app', 'stillstand_seed'] as const) {
      const client = new pg.Client({ connectionString: t.url(role) })
      await client.connect()
      try {
        await expect(client.query(statement)).rejects.toMatchObject({ code: '42501' })
      } finally {
        await client.end()
      }
    }
  })

  it('and even the server’s administrator is stopped by the trigger', async () => {
    const admin = new pg.Client({ connectionString: t.url('stillstand_admin') })
    await admin.connect()
    try {
      await expect(admin.query('update trail set reason = null')).rejects.toThrow(/append-only/)
      await expect(admin.query('truncate trail')).rejects.toThrow(/append-only/)
    } finally {
      await admin.end()
    }
  })
})

describe('R06: one clock', () => {
  it('the application cannot shift it', async () => {
    const shifted = transact(
      t.db,
      systemActor(),
      { shiftedTo: new Date('2026-01-05T08:00:00Z') },
      async () => 1,
    )
    await expect(shifted).rejects.toThrow(/Only the seeding role/)
  })

  it('the seeding role can, and the trail says so', async () => {
    const id = newId()
    const at = '2026-01-05T08:00:00.000Z'
    const now = await transact(t.seed, systemActor(), { shiftedTo: new Date(at) }, async (trx, now) => {
      await trx.insertInto('client').values({ id, name: 'Of January' }).execute()
      return now
    })
    expect(now).toBe(at)
    const row = await t.owner
      .selectFrom('client')
      .select('createdAt')
      .where('id', '=', id)
      .executeTakeFirstOrThrow()
    expect(row.createdAt).toBe(at)
    expect(await trailOf('client', id)).toMatchObject([{ at, isShifted: true }])
    const unshifted = await transact(t.seed, systemActor(), {}, async (_, now) => now)
    expect(Math.abs(Date.parse(unshifted) - Date.now())).toBeLessThan(60_000)
  })
})

it('every table has its trail or is named as exempt', async () => {
  const { rows } = await sql<{ name: string; hasTrail: boolean; why: string | null }>`
    select c.relname as name, e.why,
      exists (select from pg_trigger g where g.tgrelid = c.oid and g.tgname = 'trail' and g.tgenabled = 'O') as has_trail
    from pg_class c left join trail_exemption e on e.table_name = c.relname
    where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p')
  `.execute(t.owner)
  expect(rows.length).toBeGreaterThan(30)
  expect(rows.filter((row) => row.hasTrail === (row.why !== null)).map((row) => row.name)).toEqual([])
  expect(
    rows
      .filter((row) => row.why !== null)
      .map((row) => row.name)
      .sort(),
  ).toEqual([
    'formula_figure',
    'idempotency_answer',
    'kysely_migration',
    'kysely_migration_lock',
    'password',
    'rate_limit',
    'series',
    'session',
    'token',
    'trail',
    'trail_exemption',
    'trail_seal',
  ])
})

it('the application’s roles own nothing and hold no right beyond their tables', async () => {
  const { rows } = await sql<{ name: string }>`
    select relname as name from pg_class where pg_get_userbyid(relowner) in ('stillstand_app', 'stillstand_seed')
    union select proname from pg_proc where pg_get_userbyid(proowner) in ('stillstand_app', 'stillstand_seed')
  `.execute(t.owner)
  expect(rows).toEqual([])
})

describe('who reads the trail', () => {
  it('technicians their own entries, QA all, clients none', async () => {
    const technician = await t.person('technician')
    const qa = await t.person('qa')
    const client = await t.person('client')
    await call(postClient, { cookie: manager.cookie, body: { id: newId(), name: 'Somebody’s' } })
    await transact(t.db, technician.actor, {}, (trx) =>
      trx.insertInto('client').values({ id: newId(), name: 'By the technician' }).execute(),
    )
    const own = await call(getTrail, { cookie: technician.cookie })
    expect(own.body.rows.map((entry: { actorId: string }) => entry.actorId)).toEqual([
      technician.actor.personId,
    ])
    const all = await call(getTrail, { cookie: qa.cookie })
    expect(new Set(all.body.rows.map((entry: { actorId: string }) => entry.actorId)).size).toBeGreaterThan(2)
    expect((await call(getTrail, { cookie: client.cookie })).status).toBe(403)
  })
})

describe('R05: alteration below the application is found', () => {
  const seal = () => sql`select seal_trail()`.execute(t.db)
  const findings = async () => [...(await trailSeal.run(t.db)), ...(await trailRows.run(t.db))]
  /** As the server's administrator with the triggers off: whoever can do this can do anything but stay unseen. */
  const below = async (statement: string, ...values: unknown[]) => {
    const admin = new pg.Client({ connectionString: t.url('stillstand_admin') })
    await admin.connect()
    try {
      await admin.query("set session_replication_role = 'replica'")
      await admin.query(statement, values)
    } finally {
      await admin.end()
    }
  }

  it('nothing is found in a record that was left alone', async () => {
    await seal()
    expect(await findings()).toEqual([])
  })

  it('sealing again adds only what is new', async () => {
    const { rows } = await sql<{ sealed: number }>`select seal_trail() as sealed`.execute(t.db)
    expect(rows[0]!.sealed).toBe(0)
    await call(postClient, { cookie: manager.cookie, body: { id: newId(), name: 'One more' } })
    const next = await sql<{ sealed: number }>`select seal_trail() as sealed`.execute(t.db)
    expect(next.rows[0]!.sealed).toBe(1)
    expect(await findings()).toEqual([])
  })

  it('a row altered, deleted or put in without the trail is named', async () => {
    const ids = [newId(), newId(), newId()]
    for (const id of ids.slice(0, 2))
      await call(postClient, { cookie: manager.cookie, body: { id, name: `Client ${id}` } })
    await below('update client set name = $1 where id = $2', 'Altered', ids[0])
    await below('delete from client where id = $1', ids[1])
    await below('insert into client (id, name) values ($1, $2)', ids[2], 'Smuggled')
    expect((await findings()).sort()).toEqual(
      [
        `Row ${ids[0]} of client was changed without the trail knowing.`,
        `Row ${ids[1]} of client was deleted without the trail knowing.`,
        `Row ${ids[2]} of client was put in without the trail knowing.`,
      ].sort(),
    )
  })

  it('a trail row altered, deleted, swapped or put in between is named, and only it', async () => {
    for (const name of ['a', 'b', 'c', 'd', 'e', 'f'])
      await call(postClient, { cookie: manager.cookie, body: { id: newId(), name: `Trail ${name}` } })
    await seal()
    const rows = await t.owner.selectFrom('trail').select('id').orderBy('id', 'desc').limit(6).execute()
    const [gone, altered, one, other] = rows.map((row) => row.id) as [number, number, number, number]
    await below("update trail set reason = 'made up' where id = $1", altered)
    await below('delete from trail where id = $1', gone)
    await below(
      `update trail as here set after = there.after, row_id = there.row_id from trail as there
        where (here.id, there.id) in (($1, $2), ($2, $1))`,
      one,
      other,
    )
    const found = await trailSeal.run(t.db)
    expect(
      found
        .filter((sentence) => sentence.includes('changed'))
        .map(numberIn)
        .sort(),
    ).toEqual([altered, one, other].sort())
    expect(found.filter((sentence) => sentence.includes('deleted')).map(numberIn)).toEqual([gone])
    expect(found).toHaveLength(4)
    await below(
      `insert into trail overriding system value
        select $1::bigint as id, at, actor_id, table_name, row_id, operation, event, before, after, reason, request_id, is_shifted
        from trail where id = $2`,
      -5,
      altered,
    )
    expect(await trailSeal.run(t.db)).toContain('Trail row -5 was put in after its place had been sealed.')
  })

  const numberIn = (sentence: string) => Number(/row (-?\d+)/.exec(sentence)![1])
})
