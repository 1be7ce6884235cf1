import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { GET as boardRoute } from '@/app/api/cycles/board/route'
import { POST as pressRoute } from '@/app/api/cycles/presses/route'
import { POST as stepRoute } from '@/app/api/cycles/route'
import { POST as readRoute } from '@/app/api/pulls/[id]/readings/route'
import { POST as correctBeginRoute } from '@/app/api/cycles/presses/[id]/correct/route'
import { POST as correctRoute } from '@/app/api/cycles/[id]/correct/route'
import { systemActor } from '@/lib/auth/actor'
import { jobs } from '@/lib/cycle/jobs'
import { startMailFake } from '@/lib/mail/fake'
import { doubtsOf } from '@/lib/reading/queries/doubts'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, layered, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let mada: Signed
let jos: Signed
let qa: Signed
let formulator: Signed
let study: BenchStudy
let placeId = ''

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  mada = await t.person('technician', { name: 'Mada Orr' })
  jos = await t.person('technician', { name: 'Jos Vael' })
  qa = await t.person('qa')
  formulator = await t.person('formulator')
})
afterAll(() => t.close())

// A study of its own each: presses are append-only. The fridge becomes a freeze-thaw station of 16 and 8 hours.
beforeEach(async () => {
  study = await benchStudy(t.db, formulator.actor, 4)
  const place = await t.db
    .selectFrom('studyStation')
    .select(['id', 'stationId', 'position'])
    .where('studyId', '=', study.studyId)
    .where('temperatureC', '=', 5)
    .executeTakeFirstOrThrow()
  placeId = place.id
  const cycle = { coldC: -10, coldHours: 16, warmC: 25, warmHours: 8, isFrozenThrough: true }
  await t.owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${formulator.actor.personId}, true)`.execute(trx)
    await trx.updateTable('studyStation').set({ isFreezeThaw: true }).where('id', '=', placeId).execute()
    await trx
      .updateTable('station')
      .set({ cycleLowC: -10, cycleHighC: 25 })
      .where('id', '=', place.stationId)
      .execute()
    await sql`update study set plan = jsonb_set(plan, array['stations', ${place.position}::text, 'cycle'],
      ${JSON.stringify(cycle)}::jsonb) where id = ${study.studyId}`.execute(trx)
  })
})

const hoursAgo = (hours: number) => new Date(Date.now() - hours * 3_600_000).toISOString()
const press = (kind: string, more: Record<string, unknown> = {}) => ({
  id: newId(),
  press: kind,
  studyStationId: placeId,
  cycle: 1,
  half: 'cold',
  ...more,
})
const send = (body: object, who = mada) => call(pressRoute, { cookie: who.cookie, body })
const whole = { reachedC: -10.5, isFrozenThrough: true }

async function place() {
  const { body } = await call(boardRoute, { cookie: qa.cookie })
  return body.places.find((one: { id: string }) => one.id === placeId)
}

describe('the freeze-thaw board', () => {
  it('takes begin and end as two presses of two people: the server says when, an earlier time is kept as claimed', async () => {
    const begunAt = hoursAgo(17)
    const begin = await send(press('begin', { claimedAt: begunAt, deviceNow: new Date().toISOString() }))
    expect(begin.status).toBe(200)
    const ended = await send(press('end', whole), jos)
    expect(ended.body).toMatchObject({ shortfalls: [] })
    expect(Math.abs(Date.parse(ended.body.at) - Date.now())).toBeLessThan(5000)
    const { steps, presses } = await place()
    expect(steps).toMatchObject([{ cycle: 1, half: 'cold', reachedC: -10.5, by: 'Jos Vael' }])
    expect(Math.abs(Date.parse(steps[0].begunAt) - Date.parse(begunAt))).toBeLessThan(2000)
    expect(presses).toMatchObject([{ press: 'begin', by: 'Mada Orr' }])
    const kept = await t.db
      .selectFrom('cycleStep')
      .selectAll()
      .where('studyStationId', '=', placeId)
      .execute()
    expect(kept).toMatchObject([{ claimedAt: null, heldHours: 0 }])
  })

  it('R06: a tablet that runs three days ahead begins nothing in the future, and its claim is kept', async () => {
    const ahead = new Date(Date.now() + 3 * 86_400_000).toISOString()
    const id = newId()
    const begin = await send(press('begin', { id, claimedAt: ahead, deviceNow: ahead }))
    expect(Math.abs(Date.parse(begin.body.at) - Date.now())).toBeLessThan(5000)
    const row = await t.db.selectFrom('cyclePress').selectAll().where('id', '=', id).executeTakeFirstOrThrow()
    expect(row.claimedAt).toBe(ahead)
  })

  it('D05: a press sent five times at once is kept once; of two people one begins and the other is told', async () => {
    const begin = press('begin', { claimedAt: hoursAgo(20), deviceNow: new Date().toISOString() })
    const same = await Promise.all(Array.from({ length: 5 }, () => send(begin)))
    expect(same.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    const second = await send(press('begin'), jos)
    expect(second.status).toBe(409)
    expect(second.body.error.sentence).toContain('Mada Orr has begun the cold half of cycle 1')
    const ends = await Promise.all([send(press('end', whole)), send(press('end', whole), jos)])
    expect(ends.map((one) => one.status).toSorted()).toEqual([200, 409])
    const steps = await t.db
      .selectFrom('cycleStep')
      .select('id')
      .where('studyStationId', '=', placeId)
      .execute()
    expect(steps).toHaveLength(1)
  })

  it.each([
    ['an end before its begin', 'end', { reachedC: -10, isFrozenThrough: true }, 409],
    ['a hold of what does not run', 'hold', { reason: 'weekend' }, 409],
    ['the warm half first', 'begin', { half: 'warm' }, 409],
    ['the second cycle first', 'begin', { cycle: 2 }, 409],
    ['a hold without a reason', 'hold', { reason: ' ' }, 422],
    ['a press that is none', 'stop', {}, 422],
    ['a station that is not there', 'begin', { studyStationId: newId() }, 404],
  ])('refuses %s', async (_name, kind, more, status) => {
    expect((await send(press(kind, more))).status).toBe(status)
  })

  it('refuses a half that ends before it began, QA, and a paper half of what was begun at the board', async () => {
    expect((await send(press('begin'), qa)).status).toBe(403)
    await send(press('begin'))
    const early = await send(press('end', { ...whole, claimedAt: hoursAgo(2) }))
    expect(early.status).toBe(422)
    expect(early.body.error.fields.claimedAt).toBe('The half began after that.')
    const paper = await call(stepRoute, {
      cookie: mada.cookie,
      body: {
        id: newId(),
        studyStationId: placeId,
        cycle: 1,
        half: 'cold',
        begunAt: hoursAgo(20),
        endedAt: hoursAgo(4),
      },
    })
    expect(paper.status).toBe(409)
  })

  it('a half cut short asks first, then doubts the readings after it', async () => {
    await send(press('begin', { claimedAt: hoursAgo(9), deviceNow: new Date().toISOString() }))
    const end = press('end', { ...whole, isFrozenThrough: false })
    const asked = await send(end)
    expect(asked.status).toBe(409)
    expect(asked.body.error).toMatchObject({
      code: 'confirm',
      detail: { shortfalls: ['It lasted 9.0 of 16 h.', 'The jars were not frozen through.'] },
    })
    expect((await send({ ...end, isConfirmed: true })).status).toBe(200)
    const jar = jarAt(await askedJars(t.db, study.studyId), 5, 3, 'watch')
    const kept = await call(readRoute, {
      cookie: mada.cookie,
      params: { id: jar.pullJarId },
      body: { ...layered(study, jar, 0, 0), claimedAt: new Date().toISOString() },
    })
    expect(kept.body.readings[0].doubts).toMatchObject([{ reason: 'cycle' }])
  })

  it('a weekend hold is on record with its reason, and its hours with the half', async () => {
    const at = (hours: number) => ({ claimedAt: hoursAgo(hours), deviceNow: new Date().toISOString() })
    await send(press('begin', at(70)))
    await send(press('hold', { reason: 'weekend', ...at(68) }))
    expect((await send(press('hold', { reason: 'again', ...at(60) }), jos)).status).toBe(409)
    await send(press('go on', at(1)), jos)
    expect((await send(press('end', whole))).body.shortfalls).toEqual([])
    const { steps, presses } = await place()
    expect(presses.map((one: { press: string }) => one.press)).toEqual(['begin', 'hold', 'go on'])
    expect(presses[1]).toMatchObject({ reason: 'weekend', by: 'Mada Orr' })
    expect(steps[0].heldHours).toBeCloseTo(67, 1)
  })

  it('R04: the application may not change or delete a press', async () => {
    const begin = press('begin')
    await send(begin)
    const { transact } = await import('@/lib/db/transact')
    const change = transact(t.db, mada.actor, {}, (trx) =>
      trx.updateTable('cyclePress').set({ cycle: 2 }).where('id', '=', begin.id).execute(),
    )
    await expect(change).rejects.toMatchObject({ code: '42501' })
  })

  it('takes as many statements for many studies as for few', async () => {
    const few = await countStatements(() => call(boardRoute, { cookie: qa.cookie }))
    await benchStudy(t.db, formulator.actor, 4)
    const more = await countStatements(() => call(boardRoute, { cookie: qa.cookie }))
    expect(more.count).toBe(few.count)
    expect(more.count).toBeLessThanOrEqual(8)
  })
})

describe('what is told later', () => {
  const readAt = async (jar: Parameters<typeof layered>[1]) => {
    const body = layered(study, jar, 0.4, 0)
    const answer = await call(readRoute, { cookie: mada.cookie, params: { id: jar.pullJarId }, body })
    expect(answer.status).toBe(200)
    return body.readings[0]!.id
  }
  const doubtsOn = async (id: string) => {
    const { rows } = await sql<{ doubts: { reason: string; sentence: string }[] }>`
      select ${doubtsOf('r')} as doubts from reading r where r.id = ${id}`.execute(t.db)
    return rows[0]!.doubts.filter((doubt) => doubt.reason === 'cycle')
  }
  const week = 7 * 24
  const fix = (stepId: string, body: object, who = mada) =>
    call(correctRoute, { cookie: who.cookie, params: { id: stepId }, body })
  const fixBegin = (pressId: string, body: object, who = mada) =>
    call(correctBeginRoute, { cookie: who.cookie, params: { id: pressId }, body })

  it('a short half typed after the jar was read doubts it, and correcting or taking it back frees it again', async () => {
    const id = await readAt(jarAt(await askedJars(t.db, study.studyId), 5, 1, 'watch'))
    expect(await doubtsOn(id)).toEqual([])
    // The jar was read in week 1, three weeks ago; the half ended before that after 4 of 16 hours.
    const short = { id: newId(), studyStationId: placeId, cycle: 1, half: 'cold', ...whole }
    const times = { begunAt: hoursAgo(3.5 * week), endedAt: hoursAgo(3.5 * week - 4) }
    const type = (body: object) => call(stepRoute, { cookie: mada.cookie, body })
    const asked = await type({ ...short, ...times })
    expect(asked.body.error).toMatchObject({
      ...{ code: 'confirm', detail: { doubted: 1, freed: 0, shortfalls: ['It lasted 4.0 of 16 h.'] } },
      sentence: expect.stringContaining('One reading taken after it carries a doubt then'),
    })
    expect((await place()).steps).toEqual([])
    const told = await type({ ...short, ...times, isConfirmed: true })
    expect(told.body).toMatchObject({ doubted: 1, freed: 0 })
    expect((await doubtsOn(id))[0]!.sentence).toMatch(/^Cycle 1 fell short/)

    const instead = { ...whole, id: newId(), change: 'correct', version: 1, ...times }
    const longer = { ...instead, endedAt: hoursAgo(3.5 * week - 16) }
    expect((await fix(short.id, { ...longer, reason: ' ' })).status).toBe(422)
    expect((await fix(short.id, { ...longer, reason: 'mine' }, jos)).status).toBe(403)
    expect((await fix(short.id, { ...longer, reason: 'mine' }, qa)).status).toBe(403)
    const again = { ...longer, reason: 'misread the sheet', isConfirmed: true }
    const frees = await fix(short.id, { ...again, isConfirmed: false })
    expect(frees.body.error).toMatchObject({
      ...{ code: 'confirm', detail: { doubted: 0, freed: 1 } },
      sentence: 'One reading taken after it carries no doubt because of it any longer. Is it so?',
    })
    expect(await doubtsOn(id)).toHaveLength(1)
    const five = await Promise.all(Array.from({ length: 5 }, () => fix(short.id, again)))
    expect(five.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect(await doubtsOn(id)).toEqual([])
    const trail = await t.db.selectFrom('trail').select('reason').where('rowId', '=', again.id).execute()
    expect(trail).toMatchObject([{ reason: 'misread the sheet' }])
    expect(await place()).toMatchObject({
      steps: [{ id: again.id, by: 'Mada Orr', correctionReason: 'misread the sheet' }],
      past: [{ id: short.id, correctionReason: null }],
    })
    const gone = { id: newId(), change: 'take back', version: 2, reason: 'another study' }
    expect((await fix(again.id, gone)).status).toBe(200)
    expect((await place()).steps).toEqual([])
    // Typed once more, and short: the reading is doubted anew.
    expect((await type({ ...short, ...times, id: newId(), isConfirmed: true })).body.doubted).toBe(1)
  })

  it('of two who change the same half one is told what stands there now, and a formulator changes what is anyone’s', async () => {
    const first = { id: newId(), studyStationId: placeId, cycle: 1, half: 'cold', ...whole }
    const times = { begunAt: hoursAgo(40), endedAt: hoursAgo(24) }
    await call(stepRoute, { cookie: mada.cookie, body: { ...first, ...times } })
    const change = (more: object) => ({
      ...{ id: newId(), change: 'correct', version: 1, ...whole, ...times, reason: 'misread', ...more },
    })
    const answers = await Promise.all([
      fix(first.id, change({ reachedC: -11 })),
      fix(first.id, change({ reachedC: -12 }), formulator),
    ])
    expect(answers.map((one) => one.status).toSorted()).toEqual([200, 412])
    const { detail } = answers.find((one) => one.status === 412)!.body.error
    expect(detail).toMatchObject({
      lines: [expect.any(String), expect.stringMatching(/reached −1[12] °C/)],
    })
    // At the version that stands, a formulator's counts.
    const now = await fix(
      first.id,
      change({ version: 2, reachedC: -12.5, heldHours: 2, heldReason: 'weekend' }),
      formulator,
    )
    expect(now.status).toBe(200)
    const { steps, past } = await place()
    expect(steps).toMatchObject([
      { reachedC: -12.5, heldHours: 2, heldReason: 'weekend', by: formulator.actor.name },
    ])
    expect(past).toHaveLength(2)
    // It is the formulator's entry now, so a technician leaves it, and is told what stands there.
    const late = await fix(first.id, change({ version: 2 }))
    expect(late.body.error).toMatchObject({
      ...{ status: 412, detail: { by: formulator.actor.name } },
      sentence: expect.stringContaining('Ask them, or a formulator'),
    })
    expect(late.body.error.detail.version).toBeUndefined()
    expect((await fix(first.id, change({ version: 3 }), jos)).status).toBe(403)
  })

  it.each([
    ['an end before its begin', { endedAt: hoursAgo(60) }, 'endedAt'],
    ['an end that lies ahead', { endedAt: hoursAgo(-2) }, 'endedAt'],
    ['a begin before the cold half ended', { begunAt: hoursAgo(30) }, 'begunAt'],
    ['a hold longer than the half', { heldHours: 50, heldReason: 'weekend' }, 'heldHours'],
    ['a hold without a reason', { heldHours: 2 }, 'heldReason'],
    ['a temperature that is none', { reachedC: 'warm' }, 'reachedC'],
    ['no version', { version: undefined }, 'version'],
    ['a time of no calendar', { begunAt: '2026-02-31T08:00' }, 'begunAt'],
  ])('a correction with %s is refused in a sentence at its field', async (_name, more, field) => {
    const typed = { studyStationId: placeId, cycle: 1, ...whole }
    const cold = { ...typed, id: newId(), half: 'cold', begunAt: hoursAgo(42), endedAt: hoursAgo(26) }
    const warm = {
      ...typed,
      id: newId(),
      half: 'warm',
      reachedC: 25,
      begunAt: hoursAgo(25),
      endedAt: hoursAgo(17),
    }
    for (const body of [cold, warm]) await call(stepRoute, { cookie: mada.cookie, body })
    const { begunAt, endedAt, reachedC } = warm
    const change = {
      id: newId(),
      change: 'correct',
      version: 1,
      reason: 'misread',
      begunAt,
      endedAt,
      reachedC,
    }
    const answer = await fix(warm.id, { ...change, ...more })
    expect([answer.status, Object.keys(answer.body.error.fields)]).toEqual([422, [field]])
    // Another half's id is no way to write over it.
    expect((await fix(warm.id, { ...change, id: cold.id })).status).toBe(409)
  })

  it('a begin is corrected, taken back and begun anew, by its author on the day or a formulator', async () => {
    const device = { deviceNow: new Date().toISOString() }
    const begin = press('begin', { claimedAt: hoursAgo(20), ...device })
    await send(begin)
    const change = (more: object) => ({
      id: newId(),
      change: 'correct',
      version: 1,
      reason: 'pressed too late',
      ...more,
    })
    expect((await fixBegin(begin.id, change({ begunAt: hoursAgo(30) }), jos)).status).toBe(403)
    expect((await fixBegin(begin.id, change({ begunAt: hoursAgo(-1) }))).status).toBe(422)
    expect((await fixBegin(newId(), change({ begunAt: hoursAgo(30) }))).status).toBe(404)
    const begunAt = hoursAgo(30)
    const earlier = change({ begunAt })
    const five = await Promise.all(Array.from({ length: 5 }, () => fixBegin(begin.id, earlier)))
    expect(five.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect(await place()).toMatchObject({
      presses: [{ id: earlier.id, at: expect.stringMatching(new RegExp(`^${begunAt.slice(0, 19)}`)) }],
      pastBegins: [{ id: begin.id }],
    })
    const held = press('hold', { reason: 'weekend', claimedAt: hoursAgo(10), ...device })
    expect((await send(held)).status).toBe(200)
    expect(
      (await fixBegin(earlier.id, change({ version: 2, begunAt: hoursAgo(9) }))).body.error.fields.begunAt,
    ).toBe('By then Mada Orr held the cold half of cycle 1. Correct the time.')
    const gone = change({ change: 'take back', version: 2 })
    expect((await fixBegin(earlier.id, gone, formulator)).status).toBe(200)
    expect((await place()).presses).toEqual([])
    expect((await fixBegin(earlier.id, change({ version: 3, begunAt: hoursAgo(9) }))).status).toBe(412)
    // Begun anew its hold before is none of it, and it ends as a whole half.
    expect((await send(press('begin', { claimedAt: hoursAgo(17), ...device }))).status).toBe(200)
    expect((await send(press('begin'), jos)).status).toBe(409)
    expect((await send(press('end', whole))).body.shortfalls).toEqual([])
    expect((await place()).steps).toMatchObject([{ heldHours: 0 }])
  })

  it('an end pressed too early runs on where nothing came after it; else the half is taken back with its begin', async () => {
    const device = { deviceNow: new Date().toISOString() }
    await send(press('begin', { claimedAt: hoursAgo(30), ...device }))
    const end = press('end', { ...whole, claimedAt: hoursAgo(13), ...device })
    await send(end)
    const change = (what: string, version: number) => ({
      id: newId(),
      change: what,
      version,
      reason: 'pressed by mistake',
    })
    expect((await fix(end.id, change('run on', 1))).status).toBe(200)
    expect(await place()).toMatchObject({ steps: [], presses: [{ press: 'begin' }] })
    const again = press('end', { ...whole, claimedAt: hoursAgo(12), ...device })
    await send(again)
    await send(press('begin', { half: 'warm', claimedAt: hoursAgo(11), ...device }))
    expect((await fix(again.id, change('run on', 3))).body.error.sentence).toContain('has begun since')
    expect((await fix(again.id, change('take back', 3))).status).toBe(200)
    const { steps, presses, past } = await place()
    expect([steps, presses.map((one: { half: string }) => one.half), past.length]).toEqual([[], ['warm'], 4])
    // The gap is typed from paper, although the warm half runs.
    const paper = { id: newId(), studyStationId: placeId, cycle: 1, half: 'cold', ...whole }
    const late = { ...paper, begunAt: hoursAgo(30), endedAt: hoursAgo(10) }
    const overlaps = await call(stepRoute, { cookie: mada.cookie, body: late })
    expect(overlaps.body.error.fields.endedAt).toBe(
      'Before that the warm half of cycle 1 had begun. Correct the time.',
    )
    const fits = await call(stepRoute, { cookie: mada.cookie, body: { ...late, endedAt: hoursAgo(12) } })
    expect(fits.status).toBe(200)
  })

  it('D03: an overdue half is mailed once to whoever began it and the technicians, and not once it is ended', async () => {
    const folder = await mkdtemp(path.join(tmpdir(), 'stillstand-mail-'))
    process.env['STILLSTAND_FILES'] = path.join(folder, 'files')
    const fake = await startMailFake()
    try {
      await send(press('begin', { claimedAt: hoursAgo(20), deviceNow: new Date().toISOString() }))
      const context = { db: t.db, actor: systemActor(), jobId: newId() }
      const [watch, mail] = jobs
      await watch!.handle(context, {})
      await watch!.handle(context, {})
      const { rows: waiting } = await sql<{ data: { alarmId: string; personId: string } }>`
        select data from pgboss.job where name = 'cycle.mail' and data ->> 'alarmId' in (select a.id::text
          from cycle_alarm a join cycle_press p on p.id = a.begin_press_id where p.study_station_id = ${placeId})
      `.execute(t.owner)
      expect(waiting.map(({ data }) => data.personId).toSorted()).toEqual(
        [mada.actor.personId, jos.actor.personId].toSorted(),
      )
      // Told once for each half, also where its begin is corrected since.
      const { id: begun } = (await place()).presses[0]
      const change = { id: newId(), change: 'correct', version: 1, begunAt: hoursAgo(19), reason: 'misread' }
      expect((await fixBegin(begun, change)).status).toBe(200)
      await watch!.handle(context, {})
      const alarms = await t.db
        .selectFrom('cycleAlarm')
        .innerJoin('cyclePress', 'cyclePress.id', 'cycleAlarm.beginPressId')
        .select('cycleAlarm.id')
        .where('cyclePress.studyStationId', '=', placeId)
        .execute()
      expect(alarms).toHaveLength(1)
      await mail!.handle(context, waiting[0]!.data)
      await mail!.handle(context, waiting[0]!.data)
      const told = async () => {
        const files = await readdir(path.join(folder, 'mail'))
        return Promise.all(files.map((file) => readFile(path.join(folder, 'mail', file), 'utf8')))
      }
      expect(await told()).toHaveLength(1)
      expect(JSON.parse((await told())[0]!).text).toContain('the cold half of cycle 1')
      await send(press('end', whole))
      await mail!.handle(context, waiting[1]!.data)
      expect(await told()).toHaveLength(1)
    } finally {
      await fake.close()
      await rm(folder, { recursive: true, force: true })
    }
  })
})
