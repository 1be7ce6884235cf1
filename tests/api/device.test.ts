import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as days } from '@/app/api/bench/days/route'
import { GET as jarPage } from '@/app/api/bench/[code]/route'
import { GET as revisionOf } from '@/app/api/bench/revision/route'
import { GET as bench } from '@/app/api/bench/route'
import { POST as open } from '@/app/api/pulls/[id]/open/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import type { BenchDays } from '@/lib/bench/queries/days'
import { newId } from '@/lib/db/id'
import {
  askedJars,
  benchStudy,
  jarAt,
  measured,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

// What a device takes along to where there is no network, how it hears of others' entries, and what it may send again.

let t: TestDatabase
let technician: Signed
let other: Signed
let formulator: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  other = await t.person('technician')
  formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 2)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

const as = (who: Signed) => ({ cookie: who.cookie })
const allDays = async (): Promise<BenchDays> => (await call(days, as(technician))).body
const revision = async (): Promise<string> => (await call(revisionOf, as(technician))).body.revision
const openIt = (jar: AskedJar, who: Signed) =>
  call(open, { ...as(who), params: { id: jar.pullJarId }, body: { version: jar.version } })

describe('what a device takes along', () => {
  it('holds the Bench and the page of each jar of the coming week, as each would be fetched alone', async () => {
    const known = await allDays()
    expect(known.bench.counts).toEqual((await call(bench, as(technician))).body.counts)
    const coming = jarAt(jars, 45, 3)
    expect(known.jars.map((jar) => jar.code)).toContain(coming.code)
    // Week 4 is two weeks ahead.
    expect(known.jars.map((jar) => jar.label)).not.toContain('week 4')
    const {
      now: _,
      instruments,
      ...alone
    } = (await call(jarPage, { ...as(technician), params: { code: coming.code } })).body
    const { now: __, ...taken } = known.jars.find((jar) => jar.code === coming.code)!
    expect(taken).toEqual(alone)
    expect(known.instruments).toEqual(instruments)
  })

  it('takes as many statements for three studies as for one', async () => {
    const one = await countStatements(allDays)
    await benchStudy(t.db, formulator.actor, 2)
    await benchStudy(t.db, formulator.actor, 1)
    const three = await countStatements(allDays)
    expect(three.count).toBe(one.count)
    expect(three.count).toBeLessThanOrEqual(16)
  })
})

describe('the revision number', () => {
  it('takes one statement, stands still while nothing happens, and moves when another opens a jar', async () => {
    const before = await revision()
    expect((await countStatements(revision)).count).toBe(1)
    expect(await revision()).toBe(before)
    expect((await openIt(jarAt(jars, 5, 1), other)).status).toBe(200)
    expect(await revision()).not.toBe(before)
  })

  it('does not move for what the Bench never shows', async () => {
    const before = await revision()
    await t.person('qa')
    expect(await revision()).toBe(before)
  })

  it('moves for a change that was begun first and committed last', async () => {
    const change = async (jar: AskedJar) => {
      const trx = await t.db.startTransaction().execute()
      await sql`select set_config('app.actor_id', ${other.actor.personId}, true)`.execute(trx)
      await trx.updateTable('pullJar').set({ note: 'seen' }).where('id', '=', jar.pullJarId).execute()
      return trx
    }
    const greatest = async () =>
      (
        await t.db
          .selectFrom('trail')
          .select(({ fn }) => fn.max('id').as('id'))
          .executeTakeFirstOrThrow()
      ).id
    const early = await change(jarAt(jars, 25, 1))
    const late = await change(jarAt(jars, 45, 1))
    await late.commit().execute()
    const [seen, greatestSeen] = [await revision(), await greatest()]
    await early.commit().execute()
    expect(await greatest(), 'so the greatest number alone would not have told').toBe(greatestSeen)
    expect(await revision()).not.toBe(seen)
  })
})

describe('D05: what a device sends again happens once', () => {
  const send = (jar: AskedJar, body: object, key: string, headers: Record<string, string> = {}) =>
    call(log, { ...as(technician), params: { id: jar.pullJarId }, body, key, headers })
  const rowsOf = (jar: AskedJar) =>
    t.db.selectFrom('reading').select('id').where('pullJarId', '=', jar.pullJarId).execute()

  it('five times at once, each with its own time of sending, under one key', async () => {
    const jar = jarAt(jars, 5, 2)
    const body = measured(study, jar)
    const key = newId()
    const answers = await Promise.all(
      [0, 1, 2, 3, 4].map((seconds) =>
        send(jar, { ...body, deviceNow: new Date(Date.now() + seconds * 1000).toISOString() }, key),
      ),
    )
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(answers.map((answer) => JSON.stringify(answer.body))).size).toBe(1)
    expect(await rowsOf(jar)).toHaveLength(2)
  })

  it('five times at once, each under a key of its own', async () => {
    const jar = jarAt(jars, 25, 2)
    const body = measured(study, jar)
    const answers = await Promise.all([0, 1, 2, 3, 4].map(() => send(jar, body, newId())))
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(await rowsOf(jar)).toHaveLength(2)
  })

  it('a changed value under the same key is refused', async () => {
    const jar = jarAt(jars, 45, 2)
    const key = newId()
    expect((await send(jar, measured(study, jar), key)).status).toBe(200)
    expect((await send(jar, measured(study, jar, { ph: '5.60' }), key)).status).toBe(422)
  })

  it('A12: what one person typed is not taken under another who has signed in on the device since', async () => {
    const jar = jarAt(jars, 25, 1)
    const before = await rowsOf(jar)
    const answer = await send(jar, measured(study, jar), newId(), {
      'stillstand-person': other.actor.personId,
    })
    expect(answer.status).toBe(401)
    expect(answer.body.error.sentence).toContain(technician.actor.name)
    expect(await rowsOf(jar)).toEqual(before)
  })
})
