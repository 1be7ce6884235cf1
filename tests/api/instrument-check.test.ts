import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { GET as benchJarRoute } from '@/app/api/bench/[code]/route'
import { POST as calibrateRoute } from '@/app/api/calibrations/route'
import { POST as checkRoute } from '@/app/api/instruments/[id]/checks/route'
import { GET as instrumentRoute, PUT as changeRoute } from '@/app/api/instruments/[id]/route'
import { PUT as lotChangeRoute } from '@/app/api/lots/[id]/route'
import { GET as lotsRoute, POST as lotRoute } from '@/app/api/lots/route'
import { POST as readRoute } from '@/app/api/pulls/[id]/readings/route'
import { GET as readingsRoute } from '@/app/api/readings/route'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, measured, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let mada: Signed
let manager: Signed
let formulator: Signed
let study: BenchStudy

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  mada = await t.person('technician', { name: 'Mada Orr' })
  manager = await t.person('manager')
  formulator = await t.person('formulator')
})
afterAll(() => t.close())
beforeEach(async () => {
  study = await benchStudy(t.db, formulator.actor, 4)
  // Calibrated before the study began; the daily checks tell of the weeks since.
  await t.owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${manager.actor.personId}, true)`.execute(trx)
    await trx
      .updateTable('calibration')
      .set({ calibratedAt: weeks(-1) })
      .where('instrumentId', '=', study.meterId)
      .execute()
  })
  await setCheck(study.meterId, { kind: 'meter', buffer: 'phosphate', allowedPh: 0.05 })
})

async function setCheck(id: string, dailyCheck: object) {
  const { body } = await call(instrumentRoute, { cookie: manager.cookie, params: { id } })
  const { version, code, kind, name, spindles } = body
  const change = { version, code, kind, name, spindles, isActive: true, dailyCheck }
  const answer = await call(changeRoute, {
    cookie: manager.cookie,
    method: 'PUT',
    params: { id },
    body: change,
  })
  expect(answer.status).toBe(200)
}

const weeks = (count: number) => new Date(Date.parse(study.startedAt) + count * 7 * 86_400_000).toISOString()
const check = (read: number, more: Record<string, unknown> = {}, who = mada) =>
  call(checkRoute, {
    cookie: who.cookie,
    params: { id: study.meterId },
    body: { id: newId(), read, temperatureC: 25, ...more },
  })
async function readPh(week: number, at?: string) {
  const jar = jarAt(await askedJars(t.db, study.studyId), 25, week)
  const answer = await call(readRoute, {
    cookie: mada.cookie,
    params: { id: jar.pullJarId },
    body: measured(study, jar, at ? { at } : {}),
  })
  expect(answer.status).toBe(200)
  return answer.body
}

describe('daily checks', () => {
  // pH of the phosphate buffer at 25 °C is 6.865, at 10 °C 6.923 (NBS: Durst, SP 260-53; fixtures/reference/ph.json).
  it.each([
    [6.88, 25, 'good'],
    [6.92, 25, 'doubtful'],
    [6.92, 10, 'good'],
  ])('the buffer reads %s at %s °C: %s', async (read, temperatureC, result) => {
    const answer = await check(read, { temperatureC, isConfirmed: true })
    expect(answer.body.result).toBe(result)
  })

  it('D05: sent five times at once it is kept once; formulators check nothing; a figure that is none is refused at its field', async () => {
    const body = { id: newId(), read: 6.87, temperatureC: 25 }
    const send = (cookie: string) => call(checkRoute, { cookie, params: { id: study.meterId }, body })
    const answers = await Promise.all(Array.from({ length: 5 }, () => send(mada.cookie)))
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    const { body: page } = await call(instrumentRoute, { cookie: mada.cookie, params: { id: study.meterId } })
    expect(page.checks).toHaveLength(1)
    expect((await send(formulator.cookie)).status).toBe(403)
    const empty = await check(null as unknown as number)
    expect(empty.status).toBe(422)
    expect(empty.body.error.fields.read).toBe('Type what the instrument shows.')
    expect((await check(6.87, { temperatureC: 80 })).status).toBe(422)
    const without = await call(checkRoute, {
      cookie: mada.cookie,
      params: { id: study.viscometerId },
      body: { id: newId(), read: 5000 },
    })
    expect(without.status).toBe(409)
  })

  it('a failed check in the morning is a doubt on what is read after it, until a good one', async () => {
    await check(7.2, { claimedAt: weeks(0.5), isConfirmed: true })
    const doubted = await readPh(1)
    const ph = doubted.readings.find((one: { attribute: string }) => one.attribute === 'ph')
    expect(ph.doubts).toMatchObject([{ reason: 'calibration', sentence: expect.stringContaining('failed') }])
    expect(doubted.raised).toMatchObject([{ rule: 'calibration', attribute: 'ph' }])
    await check(6.87, { claimedAt: weeks(1.5) })
    const good = await readPh(2)
    expect(good.readings.flatMap((one: { doubts: object[] }) => one.doubts)).toEqual([])
  })

  it('a failed one stands at the instrument on the Bench, until a good check or calibration comes after it', async () => {
    const { code } = jarAt(await askedJars(t.db, study.studyId), 25, 1)
    const hasFailed = async () => {
      const { body } = await call(benchJarRoute, { cookie: mada.cookie, params: { code } })
      const instruments = body.instruments as { id: string; hasFailedCheck: boolean }[]
      return instruments.find((one) => one.id === study.meterId)?.hasFailedCheck
    }
    expect(await hasFailed()).toBe(false)
    await check(7.2, { claimedAt: weeks(1), isConfirmed: true })
    expect(await hasFailed()).toBe(true)
    await check(6.87, { claimedAt: weeks(1.5) })
    expect(await hasFailed()).toBe(false)
    await check(7.2, { claimedAt: weeks(2), isConfirmed: true })
    expect(await hasFailed()).toBe(true)
    await t.owner.transaction().execute(async (trx) => {
      await sql`select set_config('app.actor_id', ${manager.actor.personId}, true)`.execute(trx)
      await trx
        .insertInto('calibration')
        .values({
          ...{ id: newId(), instrumentId: study.meterId, calibratedAt: weeks(2.5), dueOn: '2099-01-01' },
          ...{ result: 'good', recordedBy: manager.actor.personId },
        })
        .execute()
    })
    expect(await hasFailed()).toBe(false)
  })

  it('a bad check says first what it reaches, then doubts what was read since the last good one, as rows of their own', async () => {
    await readPh(1)
    await check(6.87, { claimedAt: weeks(1.5) })
    await readPh(2)
    await readPh(3)
    const asked = await check(7.3)
    expect(asked.status).toBe(409)
    expect(asked.body.error).toMatchObject({
      code: 'confirm',
      detail: { reached: { readings: 2, studies: [{ code: study.code, readings: 2 }] } },
    })
    expect(asked.body.error.sentence).toContain(`2 of ${study.code}`)
    const id = newId()
    const kept = await check(7.3, { id, isConfirmed: true })
    expect(kept.body.reached).toMatchObject({ readings: 2 })
    const rows = await t.db
      .selectFrom('readingDoubt')
      .innerJoin('reading', 'reading.id', 'readingDoubt.readingId')
      .select([
        'readingDoubt.reason',
        'readingDoubt.instrumentCheckId',
        'reading.attribute',
        'reading.doubts',
      ])
      .where('reading.studyId', '=', study.studyId)
      .execute()
    expect(rows).toEqual([
      { reason: 'later check', instrumentCheckId: id, attribute: 'ph', doubts: [] },
      { reason: 'later check', instrumentCheckId: id, attribute: 'ph', doubts: [] },
    ])
    const flags = await t.db
      .selectFrom('flag')
      .select(['rule', 'state', 'attribute'])
      .where('studyId', '=', study.studyId)
      .execute()
    expect(flags).toEqual([
      { rule: 'later check', state: 'open', attribute: 'ph' },
      { rule: 'later check', state: 'open', attribute: 'ph' },
    ])
    const again = await check(7.3, { id, isConfirmed: true })
    expect(again.status).toBe(200)
    const list = await call(readingsRoute, {
      cookie: mada.cookie,
      query: { study: study.code, attribute: 'ph' },
    })
    const doubted = list.body.filter((one: { doubts: object[] }) => one.doubts.length > 0)
    expect(doubted).toHaveLength(2)
  })

  it('what is typed later from paper is doubted by the bad check that came after it', async () => {
    await check(6.87, { claimedAt: weeks(0.5) })
    await check(7.3, { claimedAt: weeks(2.5), isConfirmed: true })
    await check(6.87, { claimedAt: weeks(2.6) })
    const late = await readPh(2)
    const ph = late.readings.find((one: { attribute: string }) => one.attribute === 'ph')
    expect(ph.doubts).toMatchObject([{ reason: 'later check' }])
    const fresh = await readPh(3)
    expect(fresh.raised).toEqual([])
  })

  it('a jar saved at the same moment as the bad check is doubted whichever comes first', async () => {
    await readPh(1)
    const [bad, read] = await Promise.all([check(7.3, { isConfirmed: true }), readPh(2)])
    expect(bad.status).toBe(200)
    const doubts = await t.db
      .selectFrom('reading')
      .leftJoin('readingDoubt', 'readingDoubt.readingId', 'reading.id')
      .select(['readingDoubt.id as later', 'reading.doubts'])
      .where('reading.id', '=', read.readings.find((one: { attribute: string }) => one.attribute === 'ph').id)
      .executeTakeFirstOrThrow()
    expect(doubts.later !== null || JSON.stringify(doubts.doubts).includes('later check')).toBe(true)
  })

  it('takes as many statements for many readings as for few', async () => {
    await readPh(1)
    const few = await countStatements(() => check(7.3, { claimedAt: weeks(1.2), isConfirmed: true }))
    await check(6.87, { claimedAt: weeks(1.3) })
    await readPh(2)
    await readPh(3)
    const more = await countStatements(() => check(7.3, { isConfirmed: true }))
    expect(more.count).toBeLessThanOrEqual(few.count)
  })

  it('R04: the application may not change a doubt or a check', async () => {
    const { transact } = await import('@/lib/db/transact')
    for (const table of ['reading_doubt', 'instrument_check', 'logger_file']) {
      const change = transact(t.db, mada.actor, {}, (trx) =>
        sql`update ${sql.table(table)} set recorded_by = recorded_by`.execute(trx),
      )
      await expect(change).rejects.toMatchObject({ code: '42501' })
    }
  })
})

describe('lots of buffers, and calibrations made with them', () => {
  const bottle = (more: Record<string, unknown> = {}) => ({
    id: newId(),
    kind: 'buffer',
    name: 'buffer 7.00',
    lot: newId().slice(-8),
    certificate: [
      { temperatureC: 20, value: 7.02 },
      { temperatureC: 30, value: 6.99 },
    ],
    expiresOn: '2099-01-01',
    ...more,
  })
  const calibrate = (points: object[], more: Record<string, unknown> = {}) =>
    call(calibrateRoute, {
      cookie: mada.cookie,
      body: {
        id: newId(),
        instrumentId: study.meterId,
        dueOn: '2099-01-01',
        isConfirmed: true,
        check: { kind: 'meter', temperatureC: 25, points },
        ...more,
      },
    })

  it("takes a buffer's pH from the table or from the bottle's certificate at the temperature", async () => {
    const lot = bottle()
    expect((await call(lotRoute, { cookie: mada.cookie, body: lot })).status).toBe(200)
    // 59.16 mV a pH at 25 °C (2.302585 RT/F): phthalate 4.005, the bottle between its lines 7.005.
    const made = await calibrate([
      { buffer: 'phthalate', mV: 59.16 * (7 - 4.005) },
      { lotId: lot.id, mV: 59.16 * (7 - 7.005) },
    ])
    expect(made.body.result).toBe('good')
    const { body } = await call(instrumentRoute, { cookie: mada.cookie, params: { id: study.meterId } })
    const { points, efficiencyPercent } = body.calibrations[0].detail
    expect(points.map((point: { bufferPh: number }) => point.bufferPh)).toEqual([
      4.005,
      expect.closeTo(7.005, 9),
    ])
    expect(efficiencyPercent).toBeCloseTo(100, 1)
  })

  it('an expired lot, or one open for too long, makes it doubtful and is said', async () => {
    const old = bottle({ expiresOn: '2020-01-01' })
    const open = bottle({ openedOn: '2020-01-01', keepsDays: 60 })
    for (const lot of [old, open]) await call(lotRoute, { cookie: mada.cookie, body: lot })
    const good = { buffer: 'phthalate', mV: 59.16 * (7 - 4.005) }
    const expired = await calibrate([good, { lotId: old.id, mV: 59.16 * (7 - 7.005) }])
    expect(expired.body).toMatchObject({
      result: 'doubtful',
      sentence: expect.stringContaining('expired on'),
    })
    const opened = await calibrate([good, { lotId: open.id, mV: 59.16 * (7 - 7.005) }])
    expect(opened.body.sentence).toContain('keeps 60 days')
  })

  it('what is told late is judged by the calibration that held when it was read, not by the newest', async () => {
    const at25 = (slope: number) => [
      { buffer: 'phthalate', mV: slope * (7 - 4.005) },
      { buffer: 'borax', mV: slope * (7 - 9.18) },
    ]
    const bad = await calibrate(at25(50), { calibratedAt: weeks(0.5) })
    expect(bad.body.result).toBe('doubtful')
    const short = { calibratedAt: weeks(1.5), dueOn: weeks(2.6).slice(0, 10) }
    expect((await calibrate(at25(59.16), short)).body.result).toBe('good')
    expect((await calibrate(at25(59.16), { calibratedAt: weeks(3.5) })).body.result).toBe('good')
    const doubtsIn = async (week: number) => {
      const { readings } = await readPh(week)
      return readings.find((one: { attribute: string }) => one.attribute === 'ph').doubts
    }
    expect(await doubtsIn(1)).toMatchObject([
      { reason: 'calibration', sentence: expect.stringMatching(/doubtful/) },
    ])
    expect(await doubtsIn(2)).toEqual([])
    expect(await doubtsIn(3)).toMatchObject([
      { reason: 'calibration', sentence: expect.stringMatching(/was due on/) },
    ])
  })

  it('a refusal names the field in words and stands at it', async () => {
    const refused = await calibrate([
      { buffer: 'phthalate', mV: null },
      { buffer: 'borax', mV: -130 },
    ])
    expect(refused.status).toBe(422)
    expect(refused.body.error.sentence).toBe('Point 1, mV: Type what the meter shows, in mV.')
    expect(refused.body.error.fields['check.points.0.mV']).toBe('Type what the meter shows, in mV.')
  })

  it('a lot is listed once; only who calibrates keeps it; the second of two edits gets 412', async () => {
    const lot = bottle()
    await call(lotRoute, { cookie: mada.cookie, body: lot })
    expect((await call(lotRoute, { cookie: mada.cookie, body: lot })).status).toBe(200)
    expect((await call(lotRoute, { cookie: mada.cookie, body: { ...lot, id: newId() } })).status).toBe(422)
    expect((await call(lotRoute, { cookie: formulator.cookie, body: bottle() })).status).toBe(403)
    const edit = () =>
      call(lotChangeRoute, {
        cookie: mada.cookie,
        method: 'PUT',
        params: { id: lot.id },
        body: { version: 1, openedOn: '2026-01-01', isUsedUp: false },
      })
    expect((await edit()).status).toBe(200)
    expect((await edit()).status).toBe(412)
    const { body } = await call(lotsRoute, { cookie: formulator.cookie })
    expect(body.filter((one: { lot: string }) => one.lot === lot.lot)).toMatchObject([{ version: 2 }])
  })
})
