import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { mkdtemp } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import pg from 'pg'
import { POST as acceptInvitation } from '@/app/api/invitations/route'
import { GET as getMails } from '@/app/api/mails/route'
import { POST as inviteAgain } from '@/app/api/people/[id]/invitation/route'
import { GET as getPerson, PATCH as patchPerson } from '@/app/api/people/[id]/route'
import { GET as listPeople, POST as invite } from '@/app/api/people/route'
import { POST as setUp } from '@/app/api/setup/route'
import { systemActor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { runJobs } from '@/lib/jobs/run'
import { makeFirstCode } from '@/lib/lab/commands'
import { startMailFake } from '@/lib/mail/fake'
import { listMails } from '@/lib/mail/inbox'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let manager: Signed

const answers = {
  labName: 'New lab',
  timeZone: 'Europe/Berlin',
  name: 'Mara Quist',
  initials: 'MQ',
  email: 'Mara@Lab.Example',
  password: 'seven quiet jars on a shelf',
}

beforeAll(async () => {
  t = await testDatabase()
})
afterAll(() => t.close())

describe('the first manager', () => {
  it('needs the code from the console, which works once, and only in an empty lab', async () => {
    const old = await makeFirstCode(t.db)
    const code = await makeFirstCode(t.db)
    expect(code).toMatch(/^([A-Z2-9]{5}-){3}[A-Z2-9]{5}$/)
    const attempt = (given: string, more = {}) => call(setUp, { body: { ...answers, ...more, code: given } })
    expect((await attempt('WRONG-WRONG-WRONG-WRONG')).status).toBe(422)
    expect((await attempt(old!)).status).toBe(422)
    expect((await attempt(code!, { timeZone: 'Mars/Olympus' })).status).toBe(422)
    expect((await attempt(code!, { password: 'password1234' })).status).toBe(422)
    expect((await attempt(code!, { roles: ['client'] })).status).toBe(422)
    // Copied by hand: small letters and missing dashes are taken.
    const typed = code!.toLowerCase().replaceAll('-', ' ')
    const [first, second] = await Promise.all(
      [1, 2].map(() => attempt(typed, { roles: ['formulator', 'formulator'] })),
    )
    expect([first!.status, second!.status].sort()).toEqual([200, 409])
    expect(await makeFirstCode(t.db)).toBeNull()
    const people = await t.owner
      .selectFrom('person')
      .select(['email', 'roles'])
      .where('isSystem', '=', false)
      .execute()
    expect(people).toEqual([{ email: 'mara@lab.example', roles: ['formulator', 'manager'] }])
    manager = await t.person('manager')
  })
})

describe('people', () => {
  const body = (more = {}) => ({
    id: newId(),
    email: 'kai@lab.example',
    name: 'Kai',
    initials: 'K',
    roles: ['qa'],
    ...more,
  })
  const change = (cookie: string, id: string, more = {}) =>
    call(patchPerson, {
      cookie,
      method: 'PATCH',
      params: { id },
      body: {
        version: 1,
        name: 'Kai',
        initials: 'K',
        roles: ['qa'],
        isActive: true,
        reason: 'as agreed',
        ...more,
      },
    })

  it('are invited by a job that carries no link', async () => {
    const person = body()
    expect((await call(invite, { cookie: manager.cookie, body: person })).status).toBe(200)
    const client = new pg.Client({ connectionString: t.url('stillstand_owner') })
    await client.connect()
    const { rows } = await client.query("select data from pgboss.job where name = 'person.mail-invitation'")
    await client.end()
    expect(rows).toEqual([{ data: { personId: person.id, invitedBy: manager.actor.name } }])
    expect((await call(inviteAgain, { cookie: manager.cookie, params: { id: person.id } })).status).toBe(200)
    const listed = await call(listPeople, { cookie: manager.cookie })
    expect(listed.body.rows.map((row: { email: string }) => row.email)).toContain('kai@lab.example')
  })

  it('S05: an address names one person for ever', async () => {
    const person = body({ email: 'once@lab.example', name: 'Ida Once' })
    await call(invite, { cookie: manager.cookie, body: person })
    const taken = await call(invite, { cookie: manager.cookie, body: body({ email: 'ONCE@lab.example' }) })
    expect(taken.status).toBe(409)
    await change(manager.cookie, person.id, { name: 'Ida Once', isActive: false })
    const reused = await call(invite, { cookie: manager.cookie, body: body({ email: 'once@lab.example' }) })
    expect(reused.status).toBe(409)
    expect(reused.body.error.sentence).toContain('Ida Once')
  })

  it('nobody changes their own roles or closes their own account', async () => {
    const { personId, name, initials } = manager.actor
    const roles = await change(manager.cookie, personId, { name, initials, roles: ['manager', 'qa'] })
    const closed = await change(manager.cookie, personId, {
      name,
      initials,
      roles: ['manager'],
      isActive: false,
    })
    expect([roles.status, closed.status]).toEqual([403, 403])
    const kept = await call(getPerson, { cookie: manager.cookie, params: { id: personId } })
    expect(kept.body).toMatchObject({ roles: ['manager'], isActive: true, version: 1 })
    const renamed = await change(manager.cookie, personId, { name: 'New name', initials, roles: ['manager'] })
    expect(renamed.status).toBe(200)
  })

  it('a change needs a reason', async () => {
    const person = await t.person('technician')
    for (const reason of [undefined, '', '   '])
      expect((await change(manager.cookie, person.actor.personId, { reason })).status).toBe(422)
  })

  it('somebody of a client holds that role alone and names the client', async () => {
    const none = await call(invite, {
      cookie: manager.cookie,
      body: body({ email: 'a@x.example', roles: ['client'] }),
    })
    const both = body({ email: 'b@x.example', roles: ['client', 'qa'], clientId: newId() })
    const unknown = body({ email: 'c@x.example', roles: ['client'], clientId: newId() })
    expect(none.body.error.fields).toHaveProperty('clientId')
    expect((await call(invite, { cookie: manager.cookie, body: both })).body.error.fields).toHaveProperty(
      'roles',
    )
    expect((await call(invite, { cookie: manager.cookie, body: unknown })).status).toBe(422)
  })

  it('lose what a changed role no longer allows at once', async () => {
    const person = await t.person('manager')
    const { personId, name, initials } = person.actor
    await change(manager.cookie, personId, { name, initials, roles: ['technician'] })
    expect((await call(listPeople, { cookie: person.cookie })).status).toBe(401)
  })

  it('there is no mail page outside the demo', async () => {
    expect((await call(getMails, { cookie: manager.cookie })).status).toBe(404)
  })
})

describe('mail', () => {
  it('carries a link that the worker makes when it sends, and only its hash is kept', async () => {
    process.env['STILLSTAND_FILES'] = path.join(await mkdtemp(path.join(tmpdir(), 'stillstand-')), 'files')
    process.env['STILLSTAND_DEMO'] = 'on'
    await transact(t.owner, systemActor(), {}, (trx) =>
      trx.updateTable('lab').set({ demoFilledAt: new Date().toISOString() }).execute(),
    )
    const fake = await startMailFake()
    const jobs = await runJobs()
    try {
      const id = newId()
      const person = { id, email: 'zoe@lab.example', name: 'Zoë Ünver', initials: 'ZÜ', roles: ['qa'] }
      expect((await call(invite, { cookie: manager.cookie, body: person })).status).toBe(200)
      const mail = await expect
        .poll(async () => (await listMails(t.db)).find((kept) => kept.to.includes(person.email)), {
          timeout: 20_000,
        })
        .toBeTruthy()
        .then(async () => (await listMails(t.db)).find((kept) => kept.to.includes(person.email))!)
      expect(mail.subject).toContain('New lab')
      expect(mail.text).toContain('Zoë Ünver')
      const secret = /\/invitation\/([\w-]+)/.exec(mail.text)![1]!
      const kept = await t.owner.selectFrom('token').select('hash').where('personId', '=', id).execute()
      expect(kept).toHaveLength(1)
      expect(kept[0]!.hash).not.toContain(secret)
      const entered = await call(acceptInvitation, { body: { token: secret, password: answers.password } })
      expect(entered.status).toBe(200)
      expect((await call(getMails, { cookie: manager.cookie })).body[0].text).toContain(secret)
    } finally {
      await jobs.stop()
      await fake.close()
    }
  })
})
