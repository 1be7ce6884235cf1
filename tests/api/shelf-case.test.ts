import { createHash } from 'node:crypto'
import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as listOfReports } from '@/app/api/reports/route'
import { GET as oneCase } from '@/app/api/cases/[code]/route'
import { POST as putForward } from '@/app/api/cases/[code]/put-forward/route'
import { GET as report } from '@/app/api/cases/[code]/report/route'
import { POST as sign } from '@/app/api/cases/[code]/sign/route'
import { POST as draft } from '@/app/api/cases/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { newId } from '@/lib/db/id'
import { shelfLife } from '@/lib/science/shelf-life'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { caseMail } from '@/lib/shelf-case/mail'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { shelfStudy } from '../support/shelf-study'

const password = 'four words make one'
let t: TestDatabase
let people: Record<'technician' | 'formulator' | 'qa' | 'logger' | 'manager' | 'client' | 'stranger', Signed>
let studyId: string
let code: string

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  const client = await t.person('client')
  people = {
    technician: await t.person('technician'),
    formulator: await t.person(['formulator', 'qa'], { password }),
    qa: await t.person('qa', { password, name: 'Quinn Arbor' }),
    // QA who also logged a reading: separation goes by what a person did.
    logger: await t.person(['technician', 'qa'], { password }),
    manager: await t.person('manager', { password }),
    client,
    stranger: await t.person('client'),
  }
  studyId = (await shelfStudy(t, people.logger.actor, client.actor.clientId!)).study
})
afterAll(() => t.close())

const proposal = {
  kind: 'real time',
  proposedMonths: 12,
  storageStatement: 'closed, at or below 25 °C',
}

const get = (who: Signed, of = code) => call(oneCase, { cookie: who.cookie, params: { code: of } })
const signAs = async (who: Signed, change: object = {}) => {
  const { body } = await get(people.qa)
  return call(sign, {
    cookie: who.cookie,
    params: { code },
    body: {
      id: newId(),
      version: body.version,
      contentSha256: body.contentSha256 ?? '0'.repeat(64),
      meaning: 'approve',
      password,
      ...change,
    },
  })
}
const refusals = () =>
  t.owner.selectFrom('trail').select('after').where('event', '=', 'signature refused').execute()

describe('a case, step by step', () => {
  it('proposes at most what the evidence supports', async () => {
    const answer = await call(draft, {
      cookie: people.formulator.cookie,
      body: { id: newId(), studyId, ...proposal, proposedMonths: 36 },
    })
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields.proposedMonths).toMatch(/At most 12/)
  })

  it('is begun and cannot be signed before it is put forward (R10)', async () => {
    const made = await call(draft, {
      cookie: people.formulator.cookie,
      body: { id: newId(), studyId, ...proposal },
    })
    expect(made.status).toBe(200)
    code = made.body.code
    const early = await signAs(people.qa)
    expect(early.status).toBe(409)
    expect(early.body.error.sentence).toMatch(/drafting/)
    expect((await get(people.qa)).body.state).toBe('drafting')
    expect(await refusals()).toHaveLength(1)
  })

  it('is frozen when put forward: canonical content under its SHA-256', async () => {
    const { body } = await get(people.formulator)
    const done = await call(putForward, {
      cookie: people.formulator.cookie,
      params: { code },
      body: { version: body.version },
    })
    expect(done.status).toBe(200)
    const row = await t.owner
      .selectFrom('shelfCase')
      .select(['content', 'contentSha256'])
      .where('code', '=', code)
      .executeTakeFirstOrThrow()
    expect(createHash('sha256').update(row.content!, 'utf8').digest('hex')).toBe(row.contentSha256)
    const jobs = await sql<{ count: number }>`
      select count(*)::int from pgboss.job where name = 'shelf-case.mail'
    `.execute(t.owner)
    expect(jobs.rows[0]!.count).toBe(1)
  })

  it('holds the inputs of its figures: the same function gives every digit again', async () => {
    const content = (await get(people.qa)).body.content as CaseContent
    const calculated = content.attributes.filter((a) => a.calc)
    expect(calculated).toHaveLength(1)
    for (const a of calculated) expect(shelfLife(a.calc!.input)).toEqual(a.calc!.output)
  })

  it('the application’s role cannot change frozen content', async () => {
    await expect(
      t.db.transaction().execute(async (trx) => {
        await sql`select set_config('app.actor_id', ${people.qa.actor.personId}, true)`.execute(trx)
        await trx.updateTable('shelfCase').set({ content: '{}' }).where('code', '=', code).execute()
      }),
    ).rejects.toThrow(/frozen/)
  })

  it('S03: the session alone does not sign, nor does a wrong password; both are on the trail', async () => {
    const before = (await refusals()).length
    expect((await signAs(people.qa, { password: undefined })).status).toBe(422)
    const wrong = await signAs(people.qa, { password: 'not the one at all' })
    expect(wrong.status).toBe(422)
    expect(wrong.body.error.fields.password).toMatch(/not your password/)
    expect((await call(sign, { params: { code }, body: {} })).status).toBe(401)
    const after = await refusals()
    expect(after).toHaveLength(before + 1)
    expect(JSON.stringify(after)).not.toContain('not the one at all')
    expect((await get(people.qa)).body.signatures).toEqual([])
  })

  it('S04: not the one who put it forward, not the one who logged, not the manager', async () => {
    expect((await signAs(people.formulator)).status).toBe(409)
    expect((await signAs(people.logger)).body.error.sentence).toMatch(/logged or voided/)
    expect((await signAs(people.manager)).status).toBe(403)
    expect((await get(people.qa)).body.state).toBe('put forward')
  })

  it('another content than the one seen is not signed', async () => {
    expect((await signAs(people.qa, { contentSha256: 'a'.repeat(64) })).status).toBe(412)
    expect((await signAs(people.qa, { version: 1 })).status).toBe(412)
  })

  it('whoever signs is told what changed since it was put forward, and the content stays as it was', async () => {
    const before = (await get(people.qa)).body
    expect(before.since).toEqual({ changed: 0, added: 0 })
    const reading = await t.owner
      .selectFrom('reading')
      .select(['id', 'typed'])
      .where('studyId', '=', studyId)
      .where('attribute', '=', 'ph')
      .where('studyStationId', 'is not', null)
      .orderBy('measuredAt', 'desc')
      .executeTakeFirstOrThrow()
    const corrected = await call(correct, {
      cookie: people.formulator.cookie,
      params: { id: reading.id },
      body: {
        id: newId(),
        typed: reading.typed,
        reason: 'read again from the paper sheet',
        isConfirmed: true,
      },
    })
    expect(corrected.status).toBe(200)
    const after = (await get(people.qa)).body
    expect(after.since).toEqual({ changed: 1, added: 0 })
    expect([after.contentSha256, after.state]).toEqual([before.contentSha256, 'put forward'])
  })

  it('no report is made before it is signed', async () => {
    expect((await call(report, { cookie: people.qa.cookie, params: { code } })).status).toBe(409)
  })

  it('S01: signing shows name, time with offset and meaning in API, report list and mail', async () => {
    const signed = await signAs(people.qa)
    expect(signed.status).toBe(200)
    const { body } = await get(people.qa)
    expect(body.state).toBe('signed')
    expect(body.signatures[0]).toMatchObject({ personName: 'Quinn Arbor', meaning: 'approve', belongs: true })
    expect(body.signatures[0].signedAt).toMatch(/Z$/)
    const listed = await call(listOfReports, { cookie: people.client.cookie })
    expect(listed.body.rows[0].signature).toMatchObject({
      personName: 'Quinn Arbor',
      meaning: 'approve',
      zone: 'Europe/Berlin',
    })
    const mail = caseMail(
      { name: 'A', email: 'a@lab.example' },
      'signed',
      { ...body, studyCode: 'S-901', studyTitle: 'T', putForwardByName: 'B' },
      { ...body.signatures[0] },
      'http://lab.example/cases/C-001',
    )
    expect(mail.text).toMatch(/Quinn Arbor, \d+ \w{3} \d{4}, \d\d:\d\d:\d\d [+-]\d\d:\d\d, meaning: approve/)
  })

  it('R10: it is not signed twice', async () => {
    expect((await signAs(people.qa)).status).toBe(409)
    expect((await get(people.qa)).body.signatures).toHaveLength(1)
  })

  it('the report is made from the frozen content alone, byte-identical each time', async () => {
    const make = async () => {
      const { response } = await call(report, { cookie: people.client.cookie, params: { code } })
      expect(response.headers.get('content-type')).toBe('application/pdf')
      return Buffer.from(await response.arrayBuffer())
    }
    const first = await make()
    // A reading that comes later changes nothing in it.
    await t.owner.transaction().execute(async (trx) => {
      await sql`select set_config('app.actor_id', ${people.technician.actor.personId}, true)`.execute(trx)
      await trx.updateTable('study').set({ title: 'renamed since' }).where('id', '=', studyId).execute()
    })
    expect(first.subarray(0, 5).toString()).toBe('%PDF-')
    expect((await make()).equals(first)).toBe(true)
  }, 60_000)

  it('a client sees its own report and no case; another client sees nothing', async () => {
    expect((await get(people.client)).status).toBe(403)
    const own = await call(listOfReports, { cookie: people.client.cookie })
    expect(own.body.rows).toHaveLength(1)
    const other = await call(listOfReports, { cookie: people.stranger.cookie })
    expect(other.body.rows).toEqual([])
    expect((await call(report, { cookie: people.stranger.cookie, params: { code } })).status).toBe(404)
  })

  it('S02: a signature that was moved or altered below the application no longer belongs', async () => {
    const as = async (statement: (trx: typeof t.owner) => Promise<unknown>) =>
      t.owner.transaction().execute(async (trx) => {
        await sql`select set_config('app.actor_id', ${people.qa.actor.personId}, true)`.execute(trx)
        await statement(trx as typeof t.owner)
      })
    const belongs = async () => (await get(people.qa)).body.signatures[0].belongs as boolean
    await as((trx) => trx.updateTable('signature').set({ personName: 'Somebody Else' }).execute())
    expect(await belongs()).toBe(false)
    expect((await call(report, { cookie: people.qa.cookie, params: { code } })).status).toBe(409)
    await as((trx) => trx.updateTable('signature').set({ personName: 'Quinn Arbor' }).execute())
    expect(await belongs()).toBe(true)
    await as(async (trx) => {
      await sql`alter table shelf_case disable trigger keep_frozen`.execute(trx)
      await sql`update shelf_case set content = replace(content, '"months":12', '"months":36')`.execute(trx)
      await sql`alter table shelf_case enable trigger keep_frozen`.execute(trx)
    })
    const { body } = await get(people.qa)
    expect(body.isContentWhole).toBe(false)
    expect(body.signatures[0].belongs).toBe(false)
  })
})
