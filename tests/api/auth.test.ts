import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as acceptInvitation } from '@/app/api/invitations/route'
import { POST as changePassword } from '@/app/api/me/password/route'
import { PATCH as patchPerson } from '@/app/api/people/[id]/route'
import { POST as askReset, PUT as finishReset } from '@/app/api/resets/route'
import { DELETE as signOut, GET as profile, POST as signIn } from '@/app/api/session/route'
import { systemActor } from '@/lib/auth/actor'
import { judgePassword } from '@/lib/auth/password'
import { createToken } from '@/lib/auth/token'
import { transact } from '@/lib/db/transact'
import { clientAddress, installAddress } from '@/lib/http/address'
import { call, type Answer } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

const password = 'seven quiet jars on a shelf'

let t: TestDatabase
let manager: Signed
beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  manager = await t.person('manager')
})
afterAll(() => t.close())

const cookieOf = (answer: Answer) => (answer.headers.get('set-cookie') ?? '').split(';')[0]!
const enter = (email: string, typed: string, address = '192.0.2.10', headers = {}) =>
  call(signIn, { body: { email, password: typed }, address, headers })
const isIn = async (cookie: string) => (await call(profile, { cookie })).status === 200
let serial = 0
const newcomer = (more = {}) =>
  t.person('technician', { email: `n${++serial}@lab.example`, password, ...more })

describe('A01: guessing is slowed without locking the owner out', () => {
  it('200 bad passwords on one account, while the owner elsewhere signs in', async () => {
    const owner = await newcomer()
    const statuses: number[] = []
    let retry: string | null = null
    for (let round = 0; round < 200; round++) {
      // Made-up forwarding changes nothing: nobody in front of us is trusted.
      const forwarded = { 'x-forwarded-for': `203.0.113.${round}` }
      const answer = await enter(owner.actor.email, `wrong ${round}`, '192.0.2.20', forwarded)
      statuses.push(answer.status)
      retry = answer.headers.get('retry-after') ?? retry
    }
    expect(statuses.filter((status) => status === 401)).toHaveLength(10)
    expect(statuses.filter((status) => status === 429)).toHaveLength(190)
    expect(Number(retry)).toBeGreaterThan(0)
    expect((await enter(owner.actor.email, password, '192.0.2.21')).status).toBe(200)
  })

  it('the address is the socket’s, whatever the caller writes', async () => {
    installAddress()
    const server = createServer((request, response) => {
      response.end(
        clientAddress(new Request('http://x', { headers: request.headers as Record<string, string> })),
      )
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    const { port } = server.address() as AddressInfo
    const forged = { 'x-forwarded-for': '203.0.113.7', 'x-stillstand-address': '203.0.113.7' }
    const seen = await fetch(`http://127.0.0.1:${port}/`, { headers: forged }).then((answer) => answer.text())
    server.close()
    expect(seen).toBe('127.0.0.1')
  })

  it('one address on 200 accounts', async () => {
    const statuses: number[] = []
    for (let round = 0; round < 200; round++)
      statuses.push((await enter(`nobody${round}@lab.example`, 'wrong', '192.0.2.30')).status)
    expect(statuses.filter((status) => status === 429).length).toBeGreaterThanOrEqual(140)
    expect(new Set(statuses)).toEqual(new Set([401, 429]))
  })

  it('tries at the same moment count each', async () => {
    const owner = await newcomer()
    const tries = Array.from({ length: 40 }, (_, n) => enter(owner.actor.email, `w${n}`, '192.0.2.40'))
    const statuses = (await Promise.all(tries)).map((answer) => answer.status)
    expect(statuses.filter((status) => status === 401)).toHaveLength(10)
    expect(statuses.filter((status) => status === 429)).toHaveLength(30)
  })

  it('an unknown address and a wrong password read the same, and both are on the trail', async () => {
    const owner = await newcomer()
    const wrong = await enter(owner.actor.email, 'wrong', '192.0.2.50')
    const unknown = await enter('nobody-at-all@lab.example', 'wrong', '192.0.2.50')
    expect(unknown.body).toEqual(wrong.body)
    const events = await t.owner
      .selectFrom('trail')
      .select('rowId')
      .where('event', '=', 'sign-in refused')
      .execute()
    expect(events.map((event) => event.rowId)).toContain(owner.actor.personId)
  })
})

describe('A02: passwords', () => {
  const about = { email: 'lena.ost@lab.example', name: 'Lena Ost' }
  it.each([
    ['eleven chars', 'kestrel-oat'],
    ['129 characters', 'ab3$'.repeat(32) + 'x'],
    ['a common one', 'password1234'],
    ['a common one, doubled', 'iloveyouiloveyou'],
    ['a keyboard row', 'qwertyuiopasdf'],
    ['spaced out', 'let me in now 123'],
    ['one letter', 'aaaaaaaaaaaaaaaa'],
    ['counting', '1234567890123'],
    ['the own address', 'lena.ost@lab.example'],
    ['the own name', 'Lena Ost 12'.padEnd(12, '!')],
  ])('refuses %s', (_, typed) => {
    expect(judgePassword(typed, about)).toMatch(/\.$/)
  })

  it.each([
    ['twelve characters', 'kestrel-oats'],
    ['words, no digits or signs', 'slow oil climbs the glass'],
    ['128 characters', 'ab3$'.repeat(32)],
    ['any script', 'тихая банка на полке'],
  ])('takes %s', (_, typed) => {
    expect(judgePassword(typed, about)).toBeNull()
  })

  it('is judged where it is set', async () => {
    const person = await newcomer()
    const answer = await call(changePassword, {
      cookie: person.cookie,
      body: { current: password, next: 'password1234' },
    })
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields.next).toMatch(/first that would be tried/)
  })

  it('is kept as argon2id only', async () => {
    const person = await newcomer()
    const row = await t.owner
      .selectFrom('password')
      .select('hash')
      .where('personId', '=', person.actor.personId)
      .executeTakeFirstOrThrow()
    expect(row.hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
  })
})

describe('A03: sessions', () => {
  it('are new at each sign-in, hold at least 128 bits, and are kept only as a hash', async () => {
    const person = await newcomer()
    const cookies = [
      await enter(person.actor.email, password),
      await enter(person.actor.email, password),
    ].map(cookieOf)
    expect(new Set(cookies).size).toBe(2)
    const secret = cookies[0]!.split('=')[1]!
    expect(Buffer.from(secret, 'base64url').length * 8).toBeGreaterThanOrEqual(128)
    const kept = await t.owner.selectFrom('session').select('id').where('id', '=', secret).execute()
    expect(kept).toEqual([])
  })

  it('cannot be fixed from outside: the one a browser brings ends at sign-in', async () => {
    const person = await newcomer()
    const brought = cookieOf(await enter(person.actor.email, password))
    const answer = await call(signIn, { cookie: brought, body: { email: person.actor.email, password } })
    expect(cookieOf(answer)).not.toBe(brought)
    expect(await isIn(brought)).toBe(false)
  })

  it('the cookie is closed to scripts and to other sites', async () => {
    const person = await newcomer()
    const header = (await enter(person.actor.email, password)).headers.get('set-cookie')!
    expect(header).toContain('HttpOnly')
    expect(header).toContain('SameSite=Lax')
    expect(header).toContain('Path=/')
  })

  it('are dead after sign-out', async () => {
    const person = await newcomer()
    expect((await call(signOut, { cookie: person.cookie, method: 'DELETE' })).status).toBe(200)
    expect(await isIn(person.cookie)).toBe(false)
  })

  it('are dead after deactivation', async () => {
    const person = await newcomer()
    const { name, initials, roles } = person.actor
    const body = { version: 1, name, initials, roles, isActive: false, reason: 'left the lab' }
    const params = { id: person.actor.personId }
    expect((await call(patchPerson, { cookie: manager.cookie, method: 'PATCH', params, body })).status).toBe(
      200,
    )
    expect(await isIn(person.cookie)).toBe(false)
    expect((await enter(person.actor.email, password, '192.0.2.60')).status).toBe(401)
  })

  it('are dead after a password change, all but the new one', async () => {
    const person = await newcomer()
    const elsewhere = cookieOf(await enter(person.actor.email, password))
    const next = 'nine louder jars below it'
    const answer = await call(changePassword, { cookie: person.cookie, body: { current: password, next } })
    expect(answer.status).toBe(200)
    expect([await isIn(person.cookie), await isIn(elsewhere), await isIn(cookieOf(answer))]).toEqual([
      false,
      false,
      true,
    ])
    expect((await enter(person.actor.email, password)).status).toBe(401)
    expect((await enter(person.actor.email, next)).status).toBe(200)
  })

  it('are dead after a reset', async () => {
    const person = await newcomer()
    const token = await transact(t.db, systemActor(), {}, (trx) =>
      createToken(trx, 'reset', person.actor.personId),
    )
    const next = 'eleven jars and one more'
    const answer = await call(finishReset, { method: 'PUT', body: { token, password: next } })
    expect(answer.status).toBe(200)
    expect([await isIn(person.cookie), await isIn(cookieOf(answer))]).toEqual([false, true])
    expect((await call(finishReset, { method: 'PUT', body: { token, password: next } })).status).toBe(409)
  })

  it('A04: end after 8 idle hours and after 24 hours at all; use moves the idle limit', async () => {
    const [idle, old, used] = [await newcomer(), await newcomer(), await newcomer()]
    const set = (person: Signed, values: { expiresAt?: string; createdAt?: string }) =>
      t.owner.updateTable('session').set(values).where('userId', '=', person.actor.personId).execute()
    const inHours = (hours: number) => new Date(Date.now() + hours * 3_600_000).toISOString()
    await set(idle, { expiresAt: inHours(-0.01) })
    await set(old, { createdAt: inHours(-24.01) })
    await set(used, { expiresAt: inHours(1) })
    expect([await isIn(idle.cookie), await isIn(old.cookie), await isIn(used.cookie)]).toEqual([
      false,
      false,
      true,
    ])
    const kept = await t.owner
      .selectFrom('session')
      .select('expiresAt')
      .where('userId', '=', used.actor.personId)
      .executeTakeFirstOrThrow()
    expect(Date.parse(kept.expiresAt) - Date.now()).toBeGreaterThan(7.9 * 3_600_000)
  })
})

describe('links', () => {
  it('an invitation lets in once and sets the password', async () => {
    const person = await t.person('qa', { email: 'invited@lab.example' })
    const token = await transact(t.db, systemActor(), {}, (trx) =>
      createToken(trx, 'invitation', person.actor.personId),
    )
    const body = { token, password }
    expect((await call(acceptInvitation, { body: { token, password: 'short' } })).status).toBe(422)
    expect((await call(acceptInvitation, { body })).status).toBe(200)
    expect((await call(acceptInvitation, { body })).status).toBe(409)
    expect((await enter('invited@lab.example', password)).status).toBe(200)
  })

  it('a link of one kind, an old one or one of a closed account opens nothing', async () => {
    const [one, two, three] = [await newcomer(), await newcomer(), await newcomer()]
    const make = (person: Signed) =>
      transact(t.db, systemActor(), {}, (trx) => createToken(trx, 'reset', person.actor.personId))
    const [other, old, closed] = [await make(one), await make(two), await make(three)]
    await t.owner
      .updateTable('token')
      .set({ expiresAt: new Date(Date.now() - 1000).toISOString() })
      .where('personId', '=', two.actor.personId)
      .execute()
    await transact(t.owner, systemActor(), {}, (trx) =>
      trx.updateTable('person').set({ isActive: false }).where('id', '=', three.actor.personId).execute(),
    )
    expect((await call(acceptInvitation, { body: { token: other, password } })).status).toBe(409)
    for (const token of [old, closed])
      expect((await call(finishReset, { method: 'PUT', body: { token, password } })).status).toBe(409)
  })

  it('asking for a reset answers the same for everybody, and sends work only for people there are', async () => {
    const person = await newcomer()
    const known = await call(askReset, { body: { email: person.actor.email } })
    const unknown = await call(askReset, { body: { email: 'nobody@lab.example' } })
    expect(known.body).toEqual(unknown.body)
    const client = new (await import('pg')).default.Client({ connectionString: t.url('stillstand_owner') })
    await client.connect()
    const { rows } = await client.query("select data from pgboss.job where name = 'person.mail-reset'")
    await client.end()
    expect(rows).toEqual([{ data: { personId: person.actor.personId } }])
  })
})

describe('demo', () => {
  it('one click lets in only while the database carries the mark', async () => {
    const demo = await t.person('technician', { isDemo: true })
    const real = await newcomer()
    process.env['STILLSTAND_DEMO'] = 'on'
    const click = (id: string) => call(signIn, { body: { demoPersonId: id } })
    expect((await click(demo.actor.personId)).status).toBe(401)
    await transact(t.owner, systemActor(), {}, (trx) =>
      trx.updateTable('lab').set({ demoFilledAt: new Date().toISOString() }).execute(),
    )
    expect((await click(real.actor.personId)).status).toBe(401)
    const answer = await click(demo.actor.personId)
    expect(answer.status).toBe(200)
    expect((await call(profile, { cookie: cookieOf(answer) })).body.isDemo).toBe(true)
  })

  it('the system itself can never be signed in', async () => {
    expect((await call(signIn, { body: { demoPersonId: systemActor().personId } })).status).toBe(401)
    expect((await enter('system@stillstand.invalid', password)).status).toBe(401)
  })
})
