import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as takeOut } from '@/app/api/pulls/[id]/take-out/route'
import { POST as undo } from '@/app/api/pulls/[id]/undo/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, layered, measured, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let technician: Signed
let second: Signed
let study: BenchStudy

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  second = await t.person('technician')
  study = await benchStudy(t.db, (await t.person('formulator')).actor, 12)
})
afterAll(() => t.close())

type Jar = { pullJarId: string; version: number }
type Body = { readings: { id: string }[] }

const jarNow = async (temperatureC: number, weeks: number, asks: string) =>
  jarAt(await askedJars(t.db, study.studyId), temperatureC, weeks, asks)
const keep = (jar: Jar, body: Body) =>
  call(log, { cookie: technician.cookie, params: { id: jar.pullJarId }, body })
const takeBack = (jar: Jar, { readings }: Body, cookie = technician.cookie) =>
  call(undo, {
    cookie,
    params: { id: jar.pullJarId },
    body: { readings: readings.map((reading) => reading.id) },
  })
const stateOf = (jar: Jar) =>
  t.db
    .selectFrom('pullJar as pj')
    .innerJoin('jar', 'jar.id', 'pj.jarId')
    .select(['pj.state', 'jar.state as jarState', 'pj.closedBy'])
    .where('pj.id', '=', jar.pullJarId)
    .executeTakeFirstOrThrow()
const repeatsOf = (jar: Jar) =>
  t.db.selectFrom('pullJar').select(['id', 'state']).where('repeatOf', '=', jar.pullJarId).execute()
const voidsOf = (jar: Jar) =>
  t.db
    .selectFrom('reading')
    .select(['reason', 'supersedesId'])
    .where('pullJarId', '=', jar.pullJarId)
    .where('isVoid', '=', true)
    .execute()

/** As if it had been kept so long ago. */
const age = (seconds: number, { readings }: Body) =>
  t.owner.transaction().execute(async (trx) => {
    await sql`alter table reading disable trigger append_only`.execute(trx)
    await sql`select set_config('app.actor_id', ${technician.actor.personId}, true)`.execute(trx)
    await sql`update reading set recorded_at = recorded_at - ${seconds}::float8 * interval '1 second',
        measured_at = measured_at - ${seconds}::float8 * interval '1 second'
      where id = any(${readings.map((reading) => reading.id)}::uuid[])`.execute(trx)
    await sql`alter table reading enable trigger append_only`.execute(trx)
  })

describe('a save that is undone', () => {
  it('is voided with the fixed reason, the jar is due, its spare is at rest and the series as before; then it is read anew', async () => {
    const jar = await jarNow(45, 6, 'watch')
    const series = () =>
      t.db
        .selectFrom('series')
        .select(['standing', 'latestValue', 'finding'])
        .where('studyId', '=', study.studyId)
        .where('attribute', '=', 'separation')
        .orderBy('id')
        .execute()
    const calm = await jarNow(45, 4, 'watch')
    await keep(calm, layered(study, calm, 0, 0))
    const before = await series()
    const body = layered(study, jar, 3, 5)
    const kept = await keep(jar, body)
    expect(kept.body.repeats).toHaveLength(1)
    expect(await series()).not.toEqual(before)

    const answer = await takeBack(jar, body)
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({ state: 'due', takenBack: [kept.body.repeats[0].jarCode] })
    expect(await stateOf(jar)).toEqual({ state: 'due', jarState: 'stored', closedBy: null })
    expect(await repeatsOf(jar)).toEqual([])
    expect(await voidsOf(jar)).toEqual([
      { reason: 'undone by its author', supersedesId: body.readings[0]!.id },
    ])
    expect(await series()).toEqual(before)
    const flags = await t.db
      .selectFrom('flag')
      .select('state')
      .where('readingId', '=', body.readings[0]!.id)
      .execute()
    expect([...new Set(flags.map((flag) => flag.state))]).toEqual(['closed'])

    // D05: sent again, it is done once.
    expect((await takeBack(jar, body)).status).toBe(200)
    expect(await voidsOf(jar)).toHaveLength(1)
    const again = await jarNow(45, 6, 'watch')
    expect((await keep(again, layered(study, again, 3, 5))).body.repeats).toHaveLength(1)
  })

  it('a measuring jar that had rested is ready again and not spent', async () => {
    const jar = await jarNow(25, 6, 'measuring')
    const out = await call(takeOut, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: { version: jar.version },
    })
    const body = measured(study, { ...jar, version: out.body.version })
    expect((await keep(jar, body)).body).toMatchObject({ state: 'done' })
    expect(await stateOf(jar)).toMatchObject({ state: 'done', jarState: 'spent' })
    expect((await takeBack(jar, body)).body).toMatchObject({ state: 'resting' })
    expect(await stateOf(jar)).toMatchObject({ state: 'resting', jarState: 'resting' })
  })

  it('a part that is undone takes its own note along: the note that stood before stands again, one noted since stays', async () => {
    const jar = await jarNow(45, 2, 'measuring')
    const [ph, viscosity] = measured(study, jar).readings
    const note = async () =>
      (
        await t.db
          .selectFrom('pullJar')
          .select(['note', 'state'])
          .where('id', '=', jar.pullJarId)
          .executeTakeFirstOrThrow()
      ).note
    const part = (readings: unknown[], said: string) => ({
      ...measured(study, jar),
      ...{ readings: readings as Body['readings'], isPartial: true, note: said },
    })
    const first = part([ph], 'lid was loose')
    expect((await keep(jar, first)).body).toMatchObject({ state: 'due' })
    const second = part([viscosity], 'beads at the rim')
    expect((await keep(jar, second)).body).toMatchObject({ state: 'done' })
    expect(await note()).toBe('lid was loose\nbeads at the rim')

    expect((await takeBack(jar, second)).body).toMatchObject({ state: 'due' })
    expect(await note()).toBe('lid was loose')
    const again = part([{ ...viscosity, id: newId() }], 'beads at the rim')
    expect((await keep(jar, again)).body).toMatchObject({ state: 'done' })
    // The earlier part, after a later one was noted.
    expect((await takeBack(jar, first)).body).toMatchObject({ state: 'due' })
    expect(await note()).toBe('beads at the rim')
    // Its jar is still open, and what is left of the note goes with the last part.
    expect((await takeBack(jar, again)).body).toMatchObject({ state: 'due' })
    expect(await note()).toBe('')
    expect(await voidsOf(jar)).toHaveLength(3)
  })

  it('a spare of which something was read stays called for', async () => {
    const jar = await jarNow(5, 6, 'watch')
    const body = layered(study, jar, 3, 5)
    const kept = await keep(jar, body)
    const spare = { pullJarId: kept.body.repeats[0].pullJarId as string, version: 1 }
    const repeat = { ...layered(study, { ...jar, ...spare }, 3, 5) }
    expect((await keep(spare, repeat)).status).toBe(200)
    expect((await takeBack(jar, body)).body).toMatchObject({ takenBack: [] })
    expect(await repeatsOf(jar)).toContainEqual({ id: spare.pullJarId, state: 'done' })
  })

  it('is refused to others, after the seconds, after a correction, and for readings of another jar', async () => {
    const jar = await jarNow(25, 8, 'measuring')
    const body = measured(study, jar)
    expect((await keep(jar, body)).status).toBe(200)
    const others = await takeBack(jar, body, second.cookie)
    expect([others.status, others.body.error.sentence]).toEqual([
      403,
      expect.stringMatching(/Someone else kept/),
    ])
    const foreign = await takeBack(await jarNow(25, 10, 'measuring'), body)
    expect(foreign.status).toBe(404)

    await age(35, body)
    expect((await takeBack(jar, body)).status, 'travel is allowed for').toBe(200)

    const next = await jarNow(25, 10, 'measuring')
    const late = measured(study, next)
    await keep(next, late)
    await age(41, late)
    const refused = await takeBack(next, late)
    expect([refused.status, refused.body.error.sentence]).toEqual([
      409,
      expect.stringMatching(/30 seconds .* are over/),
    ])
    expect(await voidsOf(next)).toEqual([])

    const last = await jarNow(25, 12, 'measuring')
    const mended = measured(study, last)
    await keep(last, mended)
    await call(correct, {
      cookie: technician.cookie,
      params: { id: mended.readings[0]!.id },
      body: { id: newId(), typed: '5.51', reason: 'misread' },
    })
    expect((await takeBack(last, mended)).body.error.sentence).toMatch(/has changed a reading.*misread/)
  })
})
