import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as mishap } from '@/app/api/jars/[code]/mishaps/route'
import { POST as open } from '@/app/api/pulls/[id]/open/route'
import { POST as takeOut } from '@/app/api/pulls/[id]/take-out/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { logJar } from '@/lib/pull/commands/log-jar'
import { jarToLog } from '@/lib/reading/schema/entry'
import {
  askedJars,
  benchStudy,
  jarAt,
  layered,
  measured,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let technician: Signed
let second: Signed
let formulator: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  second = await t.person('technician')
  formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 12)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

const send = (jar: { pullJarId: string }, body: unknown, cookie = technician.cookie, key?: string) =>
  call(log, { cookie, params: { id: jar.pullJarId }, body, ...(key ? { key } : {}) })
const countOf = async (table: 'reading' | 'flag' | 'trail') =>
  (
    await t.db
      .selectFrom(table)
      .select(({ fn }) => fn.countAll<number>().as('n'))
      .executeTakeFirstOrThrow()
  ).n
const mailJobs = async () =>
  (await sql<{ n: number }>`select count(*)::int as n from pgboss.job where name = 'flag.mail'`.execute(t.db))
    .rows[0]!.n
const seriesOf = (attribute: string, temperatureC: number) =>
  t.db
    .selectFrom('series')
    .innerJoin('studyStation as ss', 'ss.id', 'series.studyStationId')
    .selectAll('series')
    .where('series.studyId', '=', study.studyId)
    .where('ss.temperatureC', '=', temperatureC)
    .where('attribute', '=', attribute)
    .executeTakeFirstOrThrow()

describe('opening, taking out, missing', () => {
  it('tells the second who has a jar open, and lets him go on with it', async () => {
    const jar = jarAt(jars, 5, 1)
    const body = { version: 1 }
    const first = await call(open, { cookie: technician.cookie, params: { id: jar.pullJarId }, body })
    expect(first.body).toMatchObject({ version: 2, isOthers: false })
    const other = await call(open, {
      cookie: second.cookie,
      params: { id: jar.pullJarId },
      body: { version: 2 },
    })
    expect(other.body).toMatchObject({
      version: 2,
      isOthers: true,
      openedBy: { name: technician.actor.name },
    })
    const over = await call(open, {
      cookie: second.cookie,
      params: { id: jar.pullJarId },
      body: { version: 2, takeOver: true },
    })
    expect(over.body).toMatchObject({ version: 3, isOthers: false })
  })

  it('D06: who saves on an older version gets 412 with who and what, and nothing is kept', async () => {
    const jar = jarAt(jars, 5, 1)
    const before = await countOf('reading')
    const answer = await send(jar, { ...measured(study, jar), version: 2 })
    expect(answer.status).toBe(412)
    expect(answer.body.error.sentence).toContain(second.actor.name)
    expect(answer.body.error.detail).toMatchObject({ version: 3 })
    expect(await countOf('reading')).toBe(before)
  })

  it('lets a measuring jar rest for the hours of the protocol, and spends it when it is read', async () => {
    const jar = jarAt(jars, 5, 2)
    const out = await call(takeOut, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: { version: 1 },
    })
    expect(out.body).toMatchObject({ state: 'resting', version: 2 })
    expect((Date.parse(out.body.restUntil) - Date.now()) / 3_600_000).toBeCloseTo(24, 1)
    const again = await call(takeOut, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: { version: 2 },
    })
    expect(again.status).toBe(409)
    expect((await send(jar, { ...measured(study, jar), version: 2 })).status).toBe(200)
    const { state } = await t.db
      .selectFrom('jar')
      .select('state')
      .where('code', '=', jar.code)
      .executeTakeFirstOrThrow()
    expect(state).toBe('spent')
  })

  it('a watch jar is not taken out', async () => {
    const jar = jarAt(jars, 5, 2, 'watch')
    const answer = await call(takeOut, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: { version: 1 },
    })
    expect(answer.status).toBe(409)
  })

  it('a missed jar takes no readings after, and says why', async () => {
    const jar = jarAt(jars, 45, 12, 'watch')
    const now = new Date().toISOString()
    const kept = await call(mishap, {
      cookie: technician.cookie,
      params: { code: jar.code },
      body: {
        ...{ id: newId(), kind: 'missed', reason: 'lid cracked', claimedAt: now, deviceNow: now },
        pull: { pullJarId: jar.pullJarId, version: 1 },
      },
    })
    expect(kept.status).toBe(200)
    const late = await send(jar, layered(study, jar, 0, 0))
    expect(late.status).toBe(409)
    expect(late.body.error.sentence).toContain('lid cracked')
  })

  it('says 404 where there is no such jar', async () => {
    const answer = await send({ pullJarId: newId() }, measured(study, jars[0]!))
    expect(answer.status).toBe(404)
  })
})

describe('two people, one jar', () => {
  it('the second is told, both stay on record, and "mine" supersedes with the reason', async () => {
    const jar = jarAt(jars, 25, 1)
    await send(jar, measured(study, jar, { ph: '5.44' }))
    const mine = measured(study, jar, { ph: '5.38' })
    const told = await send(jar, mine, second.cookie)
    expect(told.status).toBe(409)
    expect(told.body.error.code).toBe('already read')
    const { detail } = told.body.error
    expect(detail.by.name).toBe(technician.actor.name)
    expect(detail.readings.map((r: { typed: string }) => r.typed)).toContain('5.44')
    const compared = detail.comparisons.find((c: { attribute: string }) => c.attribute === 'ph')
    expect(compared.difference).toBeCloseTo(0.06)
    expect(compared.agree).toBe(true)

    const blank = { ...mine, version: detail.version, resolution: { count: 'mine', reason: ' ' } }
    expect((await send(jar, blank, second.cookie)).status).toBe(422)
    const counted = {
      ...blank,
      resolution: { count: 'mine', reason: 'the first meter was due for its buffers' },
    }
    expect((await send(jar, counted, second.cookie)).status).toBe(200)
    const rows = await readings(jar)
    expect(rows.filter((row) => row.attribute === 'ph')).toMatchObject([
      { typed: '5.44', supersedesId: null },
      { typed: '5.38', supersedesId: expect.any(String), reason: 'the first meter was due for its buffers' },
    ])
    expect((await seriesOf('ph', 25)).latestValue).toBeCloseTo(5.38)
  })

  it('"theirs" keeps mine and voids it with the reason', async () => {
    const jar = jarAt(jars, 25, 2)
    await send(jar, measured(study, jar, { ph: '5.46' }))
    const mine = measured(study, jar, { ph: '5.30' })
    const { body } = await send(jar, mine, second.cookie)
    const resolution = { count: 'theirs', reason: 'I stirred the jar' }
    const kept = await send(jar, { ...mine, version: body.error.detail.version, resolution }, second.cookie)
    expect(kept.status).toBe(200)
    const rows = (await readings(jar)).filter((row) => row.attribute === 'ph')
    expect(rows).toHaveLength(3)
    const voided = rows.find((row) => row.isVoid)!
    expect(voided).toMatchObject({ supersedesId: mine.readings[0]!.id, reason: 'I stirred the jar' })
    expect((await seriesOf('ph', 25)).latestValue).toBeCloseTo(5.46)
  })

  const readings = (jar: AskedJar) =>
    t.db
      .selectFrom('reading')
      .select(['id', 'attribute', 'typed', 'supersedesId', 'isVoid', 'reason'])
      .where('pullJarId', '=', jar.pullJarId)
      .orderBy('recordedAt')
      .orderBy('id')
      .execute()
})

describe('all or nothing', () => {
  it('R01: one save leaves one trail row per changed row, under one request and by its actor', async () => {
    const jar = jarAt(jars, 5, 3)
    const before = await countOf('trail')
    const answer = await send(jar, measured(study, jar))
    const requestId = answer.headers.get('x-request-id')
    const rows = await t.db
      .selectFrom('trail')
      .select(['tableName', 'rowId', 'operation', 'actorId', 'at', 'after'])
      .where('requestId', '=', requestId)
      .execute()
    expect(rows).toHaveLength((await countOf('trail')) - before)
    expect(rows.map((row) => `${row.operation} ${row.tableName}`).toSorted()).toEqual([
      'insert reading',
      'insert reading',
      'update jar',
      'update pull_jar',
    ])
    expect(new Set(rows.map((row) => row.rowId)).size).toBe(4)
    expect(rows.every((row) => row.actorId === technician.actor.personId && row.after !== null)).toBe(true)
  })

  it('D03: a save that breaks midway leaves no reading, trail, flag or mail job', async () => {
    const jar = jarAt(jars, 45, 1)
    const body = measured(study, jar, { ph: '4.60', more: {} })
    const input = jarToLog.parse({
      ...body,
      pullJarId: jar.pullJarId,
      readings: body.readings.map((reading) => ({ ...reading, isConfirmed: true })),
    })
    const before = [await countOf('reading'), await countOf('trail'), await countOf('flag'), await mailJobs()]
    await expect(
      transact(t.db, technician.actor, {}, async (trx) => {
        const kept = await logJar(trx, technician.actor, input)
        expect(kept.raised.length).toBeGreaterThan(0)
        throw new Error('the power went')
      }),
    ).rejects.toThrow('the power went')
    expect([
      await countOf('reading'),
      await countOf('trail'),
      await countOf('flag'),
      await mailJobs(),
    ]).toEqual(before)

    await transact(t.db, technician.actor, {}, (trx) => logJar(trx, technician.actor, input))
    const after = [await countOf('reading'), await countOf('trail'), await countOf('flag'), await mailJobs()]
    after.forEach((count, index) => expect(count).toBeGreaterThan(before[index]!))
  })

  it('D05: the same request five times at once keeps one and answers the same; a changed body is refused', async () => {
    const jar = jarAt(jars, 45, 2)
    const body = measured(study, jar)
    const key = newId()
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => send(jar, body, technician.cookie, key)),
    )
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(answers.map((answer) => JSON.stringify(answer.body))).size).toBe(1)
    const kept = await t.db
      .selectFrom('reading')
      .select('id')
      .where('pullJarId', '=', jar.pullJarId)
      .execute()
    expect(kept).toHaveLength(2)
    expect((await send(jar, { ...body, note: 'other' }, technician.cookie, key)).status).toBe(422)
    const later = await send(jar, body, technician.cookie)
    expect(later.status).toBe(200)
    expect(later.body.readings).toHaveLength(2)
    expect(
      await t.db.selectFrom('reading').select('id').where('pullJarId', '=', jar.pullJarId).execute(),
    ).toHaveLength(2)
  })

  it('jars of one study saved at the same moment miss nothing of each other', async () => {
    const asked = [4, 6].flatMap((week) => [5, 25, 45].map((temperature) => jarAt(jars, temperature, week)))
    const answers = await Promise.all(asked.map((jar) => send(jar, measured(study, jar))))
    expect(answers.map((answer) => answer.status)).toEqual(asked.map(() => 200))
    for (const temperature of [5, 25, 45]) {
      const finding = (await seriesOf('ph', temperature)).finding as { points: { readingIds: string[] }[] }
      const inSeries = finding.points.flatMap((point) => point.readingIds)
      for (const [index, jar] of asked.entries()) {
        if (jar.temperatureC !== temperature) continue
        expect(inSeries).toContain(answers[index]!.body.readings[0].id)
      }
    }
  })
})

describe('statements', () => {
  it('saving one jar takes at most 15, also when it raises a flag and calls for a spare', async () => {
    const plain = jarAt(jars, 5, 6, 'watch')
    const calm = await countStatements(async () => {
      expect((await send(plain, layered(study, plain, 0, 0))).status).toBe(200)
    })
    expect(calm.count).toBeLessThanOrEqual(15)
    const jar = jarAt(jars, 45, 6, 'watch')
    let body: { raised: unknown[]; repeats: unknown[] } | undefined
    const busy = await countStatements(async () => {
      body = (await send(jar, layered(study, jar, 3, 5))).body
    })
    expect(body?.raised.length).toBeGreaterThan(0)
    expect(body?.repeats).toHaveLength(1)
    expect(busy.count, busy.texts.join('\n')).toBeLessThanOrEqual(15)
  })
})
