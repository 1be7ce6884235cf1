import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { GET as boardRoute } from '@/app/api/cycles/board/route'
import { POST as pressRoute } from '@/app/api/cycles/presses/route'
import { POST as stepRoute } from '@/app/api/cycles/route'
import { POST as readRoute } from '@/app/api/pulls/[id]/readings/route'
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

  it('a short half typed after the jar was read doubts it, and correcting or taking it back frees it again', async () => {
    const id = await readAt(jarAt(await askedJars(t.db, study.studyId), 5, 1, 'watch'))
    expect(await doubtsOn(id)).toEqual([])
    // The jar was read in week 1, three weeks ago; the half ended before that after 4 of 16 hours.
    const short = { id: newId(), studyStationId: placeId, cycle: 1, half: 'cold', ...whole }
    const times = { begunAt: hoursAgo(3.5 * week), endedAt: hoursAgo(3.5 * week - 4) }
    expect((await call(stepRoute, { cookie: mada.cookie, body: { ...short, ...times } })).status).toBe(200)
    expect((await doubtsOn(id))[0]!.sentence).toMatch(/^Cycle 1 fell short/)
    const instead = { ...whole, id: newId(), ...times, endedAt: hoursAgo(3.5 * week - 16) }
    const fix = (stepId: string, body: object, who = mada) =>
      call(correctRoute, { cookie: who.cookie, params: { id: stepId }, body })
    expect((await fix(short.id, { ...instead, reason: ' ' })).status).toBe(422)
    expect((await fix(short.id, { ...instead, reason: 'mine' }, jos)).status).toBe(403)
    const again = { ...instead, reason: 'misread the sheet' }
    expect((await fix(short.id, again)).status).toBe(200)
    expect((await fix(short.id, again)).status).toBe(200)
    expect(await doubtsOn(id)).toEqual([])
    const trail = await t.db.selectFrom('trail').select('reason').where('rowId', '=', again.id).execute()
    expect(trail).toMatchObject([{ reason: 'misread the sheet' }])
    expect((await place()).steps).toMatchObject([{ id: again.id }])
    const gone = { ...again, id: newId(), isVoid: true, reason: 'another study' }
    expect((await fix(again.id, gone)).status).toBe(200)
    expect((await place()).steps).toEqual([])
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
