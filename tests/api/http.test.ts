import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sql } from 'kysely'
import { PATCH as patchClient } from '@/app/api/clients/[id]/route'
import { POST as postClient } from '@/app/api/clients/route'
import { GET as getProfile } from '@/app/api/session/route'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { read, upload, write } from '@/lib/http/route'
import * as z from '@/lib/http/zod'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let manager: Signed
beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  manager = await t.person('manager', { name: 'Mara Quist' })
})
afterAll(() => t.close())

const named = async (name: string) =>
  (await t.owner.selectFrom('client').select('id').where('name', '=', name).execute()).length
const client = (name: string) => ({ id: newId(), name })

describe('repeats', () => {
  it('D05: five at once with one key make one row and get one answer', async () => {
    const [key, body] = [newId(), client('Five at once')]
    const send = () => call(postClient, { cookie: manager.cookie, key, body, path: '/api/clients' })
    const answers = await Promise.all(Array.from({ length: 5 }, send))
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(answers.map((answer) => JSON.stringify(answer.body))).size).toBe(1)
    expect(await named('Five at once')).toBe(1)
  })

  it('D05: a repeat after others changed the row still gets the first answer', async () => {
    const [key, body] = [newId(), client('Before')]
    const first = await call(postClient, { cookie: manager.cookie, key, body })
    await call(patchClient, {
      cookie: manager.cookie,
      method: 'PATCH',
      params: { id: body.id },
      body: { version: 1, name: 'After' },
    })
    const again = await call(postClient, { cookie: manager.cookie, key, body })
    expect(again.body).toEqual(first.body)
    expect(again.body.name).toBe('Before')
  })

  it('D05: the same key with a changed body is refused and changes nothing', async () => {
    const key = newId()
    await call(postClient, { cookie: manager.cookie, key, body: client('First body') })
    const changed = await call(postClient, { cookie: manager.cookie, key, body: client('Second body') })
    expect(changed.status).toBe(422)
    expect(await named('Second body')).toBe(0)
  })

  it('D05: a key belongs to its person; a refused act may be sent again with it', async () => {
    const key = newId()
    const other = await t.person('manager')
    expect((await call(postClient, { cookie: manager.cookie, key, body: client('Mine') })).status).toBe(200)
    expect((await call(postClient, { cookie: other.cookie, key, body: client('Theirs') })).status).toBe(200)
    const second = newId()
    expect(
      (await call(postClient, { cookie: manager.cookie, key: second, body: client('Mine') })).status,
    ).toBe(409)
    expect(
      (await call(postClient, { cookie: manager.cookie, key: second, body: client('New') })).status,
    ).toBe(200)
  })

  it('a write without a key is refused', async () => {
    const without = await call(postClient, {
      cookie: manager.cookie,
      headers: { 'idempotency-key': undefined },
      body: client('No key'),
    })
    expect(without.status).toBe(400)
  })
})

describe('two editors', () => {
  it('D06: the second gets 412 with who changed what, and nothing is lost', async () => {
    const body = client('Shared name')
    await call(postClient, { cookie: manager.cookie, body })
    const other = await t.person('manager', { name: 'Otto Vance' })
    const change = (cookie: string, name: string) =>
      call(patchClient, { cookie, method: 'PATCH', params: { id: body.id }, body: { version: 1, name } })
    expect((await change(other.cookie, 'By Otto')).status).toBe(200)
    const late = await change(manager.cookie, 'By Mara')
    expect(late.status).toBe(412)
    expect(late.body.error.sentence).toContain('Otto Vance')
    expect(late.body.error.detail.changes).toEqual([{ field: 'name', from: 'Shared name', to: 'By Otto' }])
    expect([await named('By Otto'), await named('By Mara')]).toEqual([1, 0])
  })

  it('D06: what is not there is 404, not stale', async () => {
    const missing = await call(patchClient, {
      cookie: manager.cookie,
      method: 'PATCH',
      params: { id: newId() },
      body: { version: 1, name: 'Nobody' },
    })
    expect(missing.status).toBe(404)
  })
})

describe('other sites', () => {
  it.each(['https://elsewhere.example', 'null', undefined])(
    'A06: a write from origin %s is refused',
    async (origin) => {
      const answer = await call(postClient, {
        cookie: manager.cookie,
        headers: { origin },
        body: client('Foreign'),
      })
      expect(answer.status).toBe(403)
      expect(await named('Foreign')).toBe(0)
    },
  )

  it('A06: a form post is refused even from our own origin', async () => {
    const answer = await call(postClient, {
      cookie: manager.cookie,
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
      body: 'name=Form',
    })
    expect(answer.status).toBe(415)
  })

  it('A06: a read is not given a transaction that writes', async () => {
    const sneaky = read({
      permission: 'profile.own',
      handler: ({ db }) => db.insertInto('client').values(client('By GET')).execute(),
    })
    expect((await call(sneaky, { cookie: manager.cookie })).status).toBe(500)
    expect(await named('By GET')).toBe(0)
  })
})

const failing = (error: () => unknown) =>
  write({
    permission: 'profile.own',
    input: z.object({ count: z.number().optional() }),
    handler: () => {
      throw error()
    },
  })

describe('answers', () => {
  const wanted = {
    'cache-control': 'no-store',
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'same-origin',
    'x-frame-options': 'DENY',
  }
  it.each([
    ['data', () => call(getProfile, { cookie: manager.cookie }), 200],
    ['not signed in', () => call(getProfile), 401],
    [
      'refused',
      () =>
        call(
          failing(() => refuse.conflict('No.')),
          { cookie: manager.cookie },
        ),
      409,
    ],
    [
      'broken',
      () =>
        call(
          failing(() => new Error('secret detail')),
          { cookie: manager.cookie },
        ),
      500,
    ],
  ])('A07: %s carries the headers', async (_, act, status) => {
    const answer = await act()
    expect(answer.status).toBe(status)
    for (const [name, value] of Object.entries(wanted)) expect(answer.headers.get(name)).toBe(value)
    expect(answer.headers.get('content-security-policy')).toContain("frame-ancestors 'none'")
    expect(answer.headers.get('content-security-policy')).toContain("default-src 'none'")
  })

  it('A10: a fault tells an incident number and nothing of its inside', async () => {
    const answer = await call(
      failing(() => new Error('secret detail')),
      { cookie: manager.cookie },
    )
    expect(answer.body.error.incident).toMatch(/^[0-9a-f-]{36}$/)
    expect(JSON.stringify(answer.body)).not.toContain('secret')
  })

  it.each([
    ['not JSON', '{', 400],
    ['a number as text', '{"count":"1"}', 422],
    ['a list', '[]', 422],
    ['null', 'null', 422],
    ['a NUL', '{"count":1,"x":"\\u0000"}', 422],
    ['more than 1 MB', JSON.stringify({ x: 'x'.repeat(1_000_001) }), 413],
  ])('%s is refused with a sentence', async (_, body, status) => {
    const answer = await call(
      failing(() => refuse.conflict('Reached.')),
      { cookie: manager.cookie, body },
    )
    expect(answer.status).toBe(status)
    expect(answer.body.error.sentence.length).toBeGreaterThan(10)
  })

  it('names each field that cannot be taken', async () => {
    const answer = await call(postClient, { cookie: manager.cookie, body: { id: 'x', name: ' ' } })
    expect(Object.keys(answer.body.error.fields)).toEqual(['id', 'name'])
    expect(answer.body.error.fields.name).toBe('Name the client.')
  })

  it.each([
    ['a bad cookie', { cookie: 'stillstand=%%%' }],
    ['a cookie of nobody', { cookie: `stillstand=${'a'.repeat(27)}` }],
  ])('%s is no session', async (_, options) => {
    expect((await call(getProfile, options)).status).toBe(401)
  })

  it('a database that refuses becomes a sentence, never a 500', async () => {
    const codes = ['23505', '23503', '23514', '22P02', '40P01', 'ECONNREFUSED']
    const statuses = []
    for (const code of codes) {
      const route = failing(() => Object.assign(new Error('raw'), { code }))
      statuses.push((await call(route, { cookie: manager.cookie })).status)
    }
    expect(statuses).toEqual([409, 422, 422, 422, 503, 503])
  })
})

describe('uploads', () => {
  const png = Uint8Array.from(
    Buffer.from(
      'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mNk+M9QDwADhgGAWjR9awAAAABJRU5ErkJggg==',
      'base64',
    ),
  )
  const take = upload({
    permission: 'profile.own',
    maxBytes: 1000,
    types: ['image/png'],
    fields: z.object({ note: z.string().min(1) }),
    handler: ({ file: { path: _, ...file }, fields }) => ({ ...file, ...fields }),
  })
  const form = (content: Uint8Array<ArrayBuffer>, name: string, note = 'x') => {
    const body = new FormData()
    body.append('note', note)
    body.append('file', new Blob([content], { type: 'image/png' }), name)
    return body
  }

  it('are hashed, typed by content and named by us', async () => {
    const answer = await call(take, { cookie: manager.cookie, body: form(png, 'plain.png') })
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({
      bytes: png.length,
      type: 'image/png',
      originalName: 'plain.png',
      note: 'x',
    })
    const digest = await crypto.subtle.digest('SHA-256', png)
    expect(answer.body.sha256).toBe(Buffer.from(digest).toString('hex'))
  })

  it.each([
    ['a script named png', form(new TextEncoder().encode('<svg onload=alert(1)>'), 'a.png'), 415],
    ['too much', form(new Uint8Array(2000), 'a.png'), 413],
    ['nothing', form(new Uint8Array(0), 'a.png'), 422],
    ['a missing field', form(png, 'a.png', ''), 422],
    ['a name that is a path', form(png, '../../etc/evil.png'), 422],
    ['JSON', { file: 'x' }, 415],
  ])('%s is refused', async (_, body, status) => {
    expect((await call(take, { cookie: manager.cookie, body })).status).toBe(status)
  })
})

it('R10: what is refused changes nothing and leaves the attempt on the trail', async () => {
  const route = write({
    permission: 'profile.own',
    handler: async ({ db }) => {
      await db.insertInto('client').values(client('Half done')).execute()
      throw refuse.conflict('The case is not put forward yet. Put it forward first.').onTrail({
        event: 'signature refused',
        table: 'shelf_case',
        id: 'some case',
      })
    },
  })
  expect((await call(route, { cookie: manager.cookie })).status).toBe(409)
  expect(await named('Half done')).toBe(0)
  const last = await t.owner
    .selectFrom('trail')
    .selectAll()
    .orderBy('id', 'desc')
    .limit(1)
    .executeTakeFirstOrThrow()
  expect(last).toMatchObject({
    event: 'signature refused',
    rowId: 'some case',
    actorId: manager.actor.personId,
  })
})

it('R06: the time of a row is the database’s, whatever the caller’s clock says', async () => {
  const before = await sql<{ now: string }>`select now() as now`.execute(t.owner)
  const body = { ...client('Timed'), createdAt: '2020-01-01T00:00:00Z', created_at: '2020-01-01T00:00:00Z' }
  await call(postClient, { cookie: manager.cookie, body })
  const row = await t.owner
    .selectFrom('client')
    .select('createdAt')
    .where('id', '=', body.id)
    .executeTakeFirstOrThrow()
  expect(Date.parse(row.createdAt)).toBeGreaterThanOrEqual(Date.parse(before.rows[0]!.now) - 1)
})
