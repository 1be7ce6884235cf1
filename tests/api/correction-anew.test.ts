import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { GET as history } from '@/app/api/readings/[id]/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { POST as voidIt } from '@/app/api/readings/[id]/void/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { freshAttribute } from '@/lib/protocol/rules/fresh-attribute'
import { POST as undo } from '@/app/api/pulls/[id]/undo/route'
import {
  askedJars,
  benchStudy,
  jarAt,
  layered,
  measured,
  planOfTest,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

// What a correction or a void must compute anew, as the first entry did.
let t: TestDatabase
let mada: Signed
let formulator: Signed
let study: BenchStudy

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  mada = await t.person('technician')
  formulator = await t.person('formulator')
})
afterAll(() => t.close())
beforeEach(async () => {
  study = await benchStudy(t.db, formulator.actor, 12)
})

const jarOf = async (temperatureC: number, week: number, asks = 'measuring') =>
  jarAt(await askedJars(t.db, study.studyId), temperatureC, week, asks)
const keep = (jar: { pullJarId: string }, body: object) =>
  call(log, { cookie: mada.cookie, params: { id: jar.pullJarId }, body })
const mend = (id: string, more: object, who = mada) =>
  call(correct, { cookie: who.cookie, params: { id }, body: { id: newId(), reason: 'misread', ...more } })
const take = (id: string, who = mada) =>
  call(voidIt, { cookie: who.cookie, params: { id }, body: { id: newId(), reason: 'another jar' } })
const lastOf = async (id: string) =>
  (await call(history, { cookie: mada.cookie, params: { id } })).body.at(-1)
const openFlags = () =>
  t.db
    .selectFrom('flag')
    .select(['rule', 'attribute'])
    .where('studyId', '=', study.studyId)
    .where('state', '=', 'open')
    .execute()

/** pH and viscosity of week 1 at 25 °C, the viscosity under what is said of it. */
async function readUnder(detail: object, instrument: object = {}) {
  const jar = await jarOf(25, 1)
  const body = measured(study, jar, { torque: null })
  const viscosity = {
    ...{ id: newId(), attribute: 'viscosity', typed: '65', instrumentId: study.viscometerId },
    detail: { torquePercent: 65, ...detail },
    isConfirmed: true,
    ...instrument,
  }
  const answer = await keep(jar, { ...body, readings: [...body.readings, viscosity] })
  expect(answer.status).toBe(200)
  return answer.body.readings.find((one: { attribute: string }) => one.attribute === 'viscosity')
}

it('an instrument that cannot have read it is refused, at the jar and in a correction, and nothing is kept', async () => {
  const jar = await jarOf(25, 1)
  const body = measured(study, jar, { torque: null })
  const viscosity = {
    ...{ id: newId(), attribute: 'viscosity', typed: '65', instrumentId: study.meterId },
    detail: { torquePercent: 65 },
    isConfirmed: true,
  }
  const refused = await keep(jar, { ...body, readings: [...body.readings, viscosity] })
  expect(refused.status).toBe(422)
  expect(refused.body.error.fields[`readings.${body.readings.length}.instrumentId`]).toMatch(
    /^Viscosity is read with a viscometer, and .+ is a pH meter\. Choose another\.$/,
  )

  const right = { ...viscosity, instrumentId: study.viscometerId }
  const kept = await keep(jar, { ...body, readings: [...body.readings, right] })
  expect(kept.status).toBe(200)
  const { id } = kept.body.readings.find((one: { attribute: string }) => one.attribute === 'viscosity')
  const change = {
    typed: '65',
    detail: { torquePercent: 65 },
    isConfirmed: true,
    instrumentId: study.meterId,
  }
  expect((await mend(id, change)).status).toBe(422)
  expect((await lastOf(id)).id).toBe(id)
})

describe('doubts of a corrected reading', () => {
  it('a speed typed wrong is corrected: the doubt on the conditions goes with it, and the flag', async () => {
    const reading = await readUnder({ rpm: 10 })
    expect(reading.doubts).toContainEqual(expect.objectContaining({ reason: 'conditions' }))
    expect(await openFlags()).toContainEqual({ rule: 'conditions', attribute: 'viscosity' })
    expect((await mend(reading.id, { typed: '65', detail: { torquePercent: 65, rpm: 20 } })).status).toBe(200)
    expect(await lastOf(reading.id)).toMatchObject({ value: 6500, doubts: [] })
    expect(await openFlags()).not.toContainEqual({ rule: 'conditions', attribute: 'viscosity' })
  })

  it('conditions that the correction tells differ from the initial’s are doubted as at the first entry', async () => {
    const reading = await readUnder({})
    expect(reading.doubts).toEqual([])
    await mend(reading.id, { typed: '32.5', detail: { torquePercent: 32.5, rpm: 10 } })
    expect(await lastOf(reading.id)).toMatchObject({ value: 6500, doubts: [{ reason: 'conditions' }] })
  })

  it('a correction of the torque alone stays at the spindle and speed of its entry', async () => {
    const reading = await readUnder({ torquePercent: 32.5, rpm: 10 }, { typed: '32.5' })
    await mend(reading.id, { typed: '33', detail: { torquePercent: 33 } })
    const last = await lastOf(reading.id)
    expect([last.value, last.detail.rpm]).toEqual([6600, 10])
  })

  it('another instrument: the doubt on the one that was not calibrated goes, that on one that is not comes', async () => {
    const instrumentId = newId()
    await transact(t.db, formulator.actor, {}, (trx) =>
      trx
        .insertInto('instrument')
        .values({ id: instrumentId, code: `V-${instrumentId.slice(-8)}`, kind: 'viscometer', name: 'Old' })
        .execute(),
    )
    const reading = await readUnder({}, { instrumentId })
    expect(reading.doubts).toMatchObject([{ reason: 'calibration' }])
    const same = { typed: '65', detail: { torquePercent: 65 } }
    const mended = await mend(reading.id, { ...same, instrumentId: study.viscometerId })
    expect(await lastOf(reading.id)).toMatchObject({ doubts: [] })
    await mend(mended.body.id, { ...same, instrumentId })
    expect(await lastOf(reading.id)).toMatchObject({ doubts: [{ reason: 'calibration' }] })
  })

  it('what a torque is uncertain by is held against the band again', async () => {
    const reading = await readUnder({})
    const low = { typed: '12', detail: { torquePercent: 12, rpm: 3.7 } }
    expect((await mend(reading.id, low)).body.error.code).toBe('confirm')
    expect((await mend(reading.id, { ...low, isConfirmed: true })).status).toBe(200)
    expect((await lastOf(reading.id)).doubts).toContainEqual(expect.objectContaining({ reason: 'torque' }))
  })
})

it('a correction keeps that it was written on paper, outside its window', async () => {
  const jar = await jarOf(25, 1)
  const at = new Date(Date.parse(study.startedAt) + 2 * 604_800_000).toISOString()
  const answer = await keep(jar, measured(study, jar, { at, more: { isFromPaper: true } }))
  expect(answer.status).toBe(200)
  const [ph] = answer.body.readings
  const before = (await lastOf(ph.id)).detail
  expect(before).toMatchObject({ isFromPaper: true, window: {} })
  await mend(ph.id, { typed: '5.49' })
  expect((await lastOf(ph.id)).detail).toMatchObject({ isFromPaper: true, window: before.window })
})

describe('an initial', () => {
  const initial = (attribute: string) =>
    t.db
      .selectFrom('reading')
      .select('id')
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', attribute)
      .where('studyStationId', 'is', null)
      .executeTakeFirstOrThrow()

  it('that is the only one is not voided: every series of it would stand on nothing', async () => {
    const jar = await jarOf(45, 1)
    await keep(jar, measured(study, jar, { ph: '4.50', more: { isPartial: false } })).then(async (asked) => {
      expect(asked.body.error.code).toBe('confirm')
      const body = measured(study, jar, { ph: '4.50' })
      expect(
        (await keep(jar, { ...body, readings: body.readings.map((one) => ({ ...one, isConfirmed: true })) }))
          .status,
      ).toBe(200)
    })
    const flags = await openFlags()
    expect(flags).toContainEqual({ rule: 'out', attribute: 'ph' })
    const { id } = await initial('ph')
    const refused = await take(id, formulator)
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/only initial.*Correct it instead/i)
    expect(await openFlags()).toEqual(flags)
    expect((await mend(id, { typed: '5.40' }, formulator)).status).toBe(200)
  })
})

it('a spare jar that a slip called for is at rest again once the slip is corrected or voided', async () => {
  for (const week of [1, 2]) {
    const jar = await jarOf(45, week, 'watch')
    const kept = await keep(jar, layered(study, jar, 3, 5))
    expect(kept.body.repeats).toHaveLength(1)
    const [{ pullJarId }] = kept.body.repeats
    const [reading] = kept.body.readings
    const none = { typed: '0 and 0', detail: { topMm: 0, bottomMm: 0, totalMm: 60 } }
    expect((week === 1 ? await mend(reading.id, none) : await take(reading.id)).status).toBe(200)
    const asked = await t.db.selectFrom('pullJar').select('id').where('id', '=', pullJarId).execute()
    expect(asked, `week ${week}`).toEqual([])
  }
  // Where the corrected value is beyond the band too, the repeat is still wanted.
  const jar = await jarOf(25, 1, 'watch')
  const kept = await keep(jar, layered(study, jar, 3, 5))
  const still = { typed: '4 and 5', detail: { topMm: 4, bottomMm: 5, totalMm: 60 }, isConfirmed: true }
  expect((await mend(kept.body.readings[0].id, still)).status).toBe(200)
  const asked = await t.db.selectFrom('pullJar').select('id').where('repeatOf', '=', jar.pullJarId).execute()
  expect(asked).toEqual([{ id: kept.body.repeats[0].pullJarId }])
})

it('of two who read a jar the one that counts counts alone, also where the other has more replicates', async () => {
  const attributes = planOfTest.attributes.map((one) =>
    one.attribute === 'ph' ? { ...one, replicates: 2 } : one,
  )
  study = await benchStudy(t.db, formulator.actor, 12, { ...planOfTest, attributes })
  const jar = await jarOf(25, 1)
  const body = measured(study, jar)
  const second = { ...body.readings[0]!, id: newId(), replicate: 2, typed: '5.44' }
  expect((await keep(jar, { ...body, readings: [...body.readings, second] })).status).toBe(200)
  const other = await t.person('technician')
  const mine = measured(study, jar, { ph: '5.52', torque: null })
  const send = (more: object) =>
    call(log, { cookie: other.cookie, params: { id: jar.pullJarId }, body: { ...mine, ...more } })
  const asked = await send({})
  expect(asked.body.error.code).toBe('already read')
  const { version } = asked.body.error.detail
  const resolution = { count: 'mine', reason: 'the first electrode was dirty' }
  const kept = await send({ version, resolution })
  expect(kept.status).toBe(200)
  expect(kept.body.series).toContainEqual(
    expect.objectContaining({ attribute: 'ph', latest: 5.52, latestWeeks: expect.closeTo(1, 1) }),
  )
  expect(await lastOf(second.id)).toMatchObject({ isVoid: true, reason: resolution.reason })
  // What mine did not read stays theirs.
  expect(await lastOf(body.readings[1]!.id)).toMatchObject({ isVoid: false, value: 6500 })
})

it('a series whose only reading is undone is none again', async () => {
  const density = {
    ...freshAttribute('density'),
    tolerance: { kind: 'range' as const, lower: 0.9, upper: 1.1 },
  }
  const attributes = [...planOfTest.attributes, density]
  study = await benchStudy(t.db, formulator.actor, 12, { ...planOfTest, attributes })
  const jar = await jarOf(25, 1)
  const body = measured(study, jar, { ph: null, torque: null })
  const readings = [{ id: newId(), attribute: 'density', typed: '0.98' }]
  const seriesOf = () =>
    t.db
      .selectFrom('series')
      .select('latestValue')
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'density')
      .execute()
  const before = await seriesOf()
  expect((await keep(jar, { ...body, readings, isPartial: true })).status).toBe(200)
  expect(await seriesOf()).not.toEqual(before)
  const undone = await call(undo, {
    cookie: mada.cookie,
    params: { id: jar.pullJarId },
    body: { readings: readings.map(({ id }) => id) },
  })
  expect(undone.status).toBe(200)
  expect(await seriesOf()).toEqual(before)
})

it('lines on a photo of another jar are refused in a correction as at the first entry', async () => {
  const [jar, other] = [await jarOf(25, 1, 'watch'), await jarOf(45, 1, 'watch')]
  const photoId = newId()
  const { jarId } = await t.db
    .selectFrom('pullJar')
    .select('jarId')
    .where('id', '=', other.pullJarId)
    .executeTakeFirstOrThrow()
  await transact(t.db, mada.actor, {}, (trx) =>
    trx
      .insertInto('photo')
      .values({
        ...{ id: photoId, studyId: study.studyId, jarId, pullJarId: other.pullJarId, shows: 'jar' },
        ...{ sha256: 'a'.repeat(64), bytes: 1, type: 'image/jpeg', width: 100, height: 100 },
        ...{ originalName: '', takenBy: mada.actor.personId, takenAt: new Date().toISOString() },
      })
      .execute(),
  )
  const kept = await keep(jar, layered(study, jar, 0, 0))
  const lines = { fillTop: 0, topEdge: 0, bottomEdge: 100, base: 100 }
  const photoLines = { photoId, width: 100, height: 100, lines, axisX: 50, tiltDegrees: 0, proposal: null }
  const detail = { topMm: 0, bottomMm: 0, totalMm: 60, photoLines }
  const refused = await mend(kept.body.readings[0].id, { typed: 'none, on the photo', detail })
  expect(refused.status).toBe(422)
  expect(refused.body.error.fields).toEqual({ 'detail.photoLines': 'A photo of another jar.' })
})

it('what is void is asked for again on its day, and read anew; the rest of the jar stays as it was read', async () => {
  const jar = await jarOf(25, 1)
  const kept = await keep(jar, measured(study, jar))
  const [ph, viscosity] = kept.body.readings
  const lineOf = () =>
    t.db
      .selectFrom('pullJar as pj')
      .innerJoin('jar', 'jar.id', 'pj.jarId')
      .select(['pj.state', 'jar.state as jarState', 'pj.version'])
      .where('pj.id', '=', jar.pullJarId)
      .executeTakeFirstOrThrow()
  expect((await take(ph.id)).status).toBe(200)
  const open = await lineOf()
  expect(open).toMatchObject({ state: 'due', jarState: 'stored' })
  const anew = measured(study, { ...jar, version: open.version }, { ph: '5.47', torque: null })
  const again = await keep(jar, anew)
  expect(again.body).toMatchObject({ state: 'done', missing: [] })
  expect(await lineOf()).toMatchObject({ state: 'done', jarState: 'spent' })
  expect(await lastOf(viscosity.id)).toMatchObject({ isVoid: false, value: 6500 })

  // On a later day there is nothing left to measure in it: it stays as it is, with the void and its reason.
  await t.owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${mada.actor.personId}, true)`.execute(trx)
    await sql`update pull_jar set closed_at = closed_at - interval '3 days' where id = ${jar.pullJarId}`.execute(
      trx,
    )
  })
  expect((await take(viscosity.id, formulator)).status).toBe(200)
  expect(await lineOf()).toMatchObject({ state: 'done', jarState: 'spent' })
})

it('D05: an entry that is sent again with another speed is told so, not taken for the same', async () => {
  const jar = await jarOf(25, 1)
  const body = measured(study, jar)
  expect((await keep(jar, body)).status).toBe(200)
  expect((await keep(jar, body)).status, 'the same under another key').toBe(200)
  const [ph, viscosity] = body.readings
  const changed = { ...viscosity!, detail: { torquePercent: 65, rpm: 10 } }
  const refused = await keep(jar, { ...body, readings: [ph, changed] })
  expect(refused.status).toBe(409)
  expect(refused.body.error.sentence).toMatch(
    /on record as "65", with another instrument or under other conditions/,
  )
})
