import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { DELETE as removeRoute } from '@/app/api/holidays/[id]/route'
import { GET as holidaysRoute, POST as addRoute } from '@/app/api/holidays/route'
import { GET as labRoute, PATCH as changeRoute } from '@/app/api/lab/route'
import { GET as closedRoute, POST as moveRoute } from '@/app/api/pulls/moves/route'
import { POST as amendRoute } from '@/app/api/studies/[code]/amendments/route'
import { GET as labelsRoute } from '@/app/api/studies/[code]/labels/route'
import { GET as workloadRoute } from '@/app/api/workload/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { genericGrids } from '@/lib/label/rules/grid'
import { addDays } from '@/lib/study/rules/calendar'
import { weekdayOf } from '@/lib/study/rules/working-days'
import { workloadOf } from '@/lib/study/rules/workload'
import { benchStudy, planOfTest, type BenchStudy } from '@/tests/support/bench-study'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { drawnSquares } from '@/tests/support/drawn-squares'
import { pdfContents } from '@/tests/support/pdf-text'
import { readQr } from '@/tests/support/qr'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let manager: Signed
let formulator: Signed
let technician: Signed

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'UTC')
  manager = await t.person('manager', { name: 'Hanna Moor' })
  formulator = await t.person('formulator')
  technician = await t.person('technician')
})
beforeEach(async () => {
  await transact(t.db, manager.actor, {}, (trx) => trx.deleteFrom('holiday').execute())
  await change({ workingDays: [1, 2, 3, 4, 5, 6, 7] })
})
afterAll(() => t.close())

async function change(body: Record<string, unknown>, by = manager) {
  const { version } = (await call(labRoute, { cookie: manager.cookie })).body
  return call(changeRoute, { method: 'PATCH', cookie: by.cookie, body: { version, ...body } })
}

function add(days: string[], by = manager, name = 'Company day') {
  const holidays = days.map((day) => ({ id: newId(), day, name }))
  return call(addRoute, { cookie: by.cookie, body: { holidays } })
}

const closed = async () => (await call(closedRoute, { cookie: manager.cookie })).body
const move = (body: Record<string, unknown>, by = manager) => call(moveRoute, { cookie: by.cookie, body })

function pullsOfStudy(study: BenchStudy) {
  return t.db
    .selectFrom('pull')
    .innerJoin('studyStation', 'studyStation.id', 'pull.studyStationId')
    .select(['pull.id', 'pull.timeWeeks', 'pull.dueOn', 'pull.windowFrom', 'pull.windowTo'])
    .select('studyStation.temperatureC')
    .where('pull.studyId', '=', study.studyId)
    .orderBy('pull.timeWeeks')
    .orderBy('studyStation.temperatureC')
    .execute()
}

const nominal = (pull: { windowFrom: string }, windowDays = 2) => addDays(pull.windowFrom, windowDays)
/** Ended, so that the next test counts its own study alone. */
const end = (study: BenchStudy) =>
  transact(t.db, formulator.actor, {}, (trx) =>
    trx.updateTable('study').set({ state: 'closed' }).where('id', '=', study.studyId).execute(),
  )

describe('what the lab says of its days', () => {
  it('is the manager’s to change, versioned and on the trail', async () => {
    expect((await change({ workingDays: [5, 1, 2, 3, 4] })).status).toBe(200)
    const lab = (await call(labRoute, { cookie: technician.cookie })).body
    expect(lab.workingDays).toEqual([1, 2, 3, 4, 5])
    expect(lab.name).toBe('Test lab')
    const last = await t.owner
      .selectFrom('trail')
      .select(['after', 'actorId'])
      .where('tableName', '=', 'lab')
      .orderBy('id', 'desc')
      .limit(1)
      .executeTakeFirstOrThrow()
    expect(last).toMatchObject({ actorId: manager.actor.personId, after: { working_days: [1, 2, 3, 4, 5] } })
    const stale = await call(changeRoute, {
      method: 'PATCH',
      cookie: manager.cookie,
      body: { version: lab.version - 1, workingDays: [1] },
    })
    expect(stale.status).toBe(412)
    expect(stale.body.error.sentence).toMatch(/Hanna Moor changed the lab/)
    for (const by of [formulator, technician])
      expect((await change({ workingDays: [1] }, by)).status).toBe(403)
  })

  it.each([[[]], [[0]], [[8]], [[1, 1]], [['Monday']]])('no week of %j', async (workingDays) => {
    const refused = await change({ workingDays })
    expect(refused.status).toBe(422)
    expect(Object.values(refused.body.error.fields)[0]).toMatch(/[.]$/)
  })

  it('a holiday is added once, named where it is there already, and removed', async () => {
    const holiday = { id: newId(), day: '2027-05-03', name: 'Stocktaking' }
    const send = () => call(addRoute, { cookie: manager.cookie, body: { holidays: [holiday] } })
    expect((await send()).body).toEqual({ added: 1 })
    expect((await send()).body).toEqual({ added: 0 })
    const twice = await add(['2027-05-02', '2027-05-03'])
    expect(twice.status).toBe(422)
    expect(twice.body.error.sentence).toBe(
      '3 May 2027 is a holiday already: Stocktaking. Take it out of the list, or remove that one first.',
    )
    expect((await call(holidaysRoute, { cookie: technician.cookie })).body).toMatchObject([
      { day: '2027-05-03' },
    ])
    const remove = (by: Signed) =>
      call(removeRoute, { method: 'DELETE', cookie: by.cookie, params: { id: holiday.id } })
    expect((await remove(formulator)).status).toBe(403)
    expect((await remove(manager)).status).toBe(200)
    expect((await remove(manager)).status).toBe(404)
    const rows = await t.owner
      .selectFrom('trail')
      .select('operation')
      .where('rowId', '=', holiday.id)
      .orderBy('id')
      .execute()
    expect(rows.map((row) => row.operation)).toEqual(['insert', 'delete'])
  })

  it.each([
    [{ holidays: [] }],
    [{ holidays: [{ id: newId(), day: '2027-02-30', name: 'never' }] }],
    [{ holidays: [{ id: newId(), day: '2027-02-01', name: '  ' }] }],
    [{ holidays: [{ id: newId(), day: '1027-02-01', name: 'long ago' }] }],
    [{ holidays: ['2027-01-01', '2027-01-01'].map((day) => ({ id: newId(), day, name: 'twice' })) }],
    [{ holidays: 'Christmas' }],
  ])('is refused: %j', async (body) => {
    expect((await call(addRoute, { cookie: manager.cookie, body })).status).toBe(422)
  })
})

describe('a study that starts is laid on working days', () => {
  it('each pull in its window; one without a working day keeps its own', async () => {
    const today = new Date().toISOString().slice(0, 10)
    await change({ workingDays: [1, 2, 3, 4, 5] })
    // The whole window of week 4, and the day of week 6 alone.
    const [four, six] = [addDays(today, 28), addDays(today, 42)]
    await add([...[-2, -1, 0, 1, 2].map((away) => addDays(four, away)), six])
    const study = await benchStudy(t.db, formulator.actor, 0)
    const startedOn = (
      await t.db
        .selectFrom('study')
        .select('startedOn')
        .where('id', '=', study.studyId)
        .executeTakeFirstOrThrow()
    ).startedOn
    const pulls = await pullsOfStudy(study)
    expect(pulls).toHaveLength(24)
    for (const pull of pulls) {
      expect(nominal(pull)).toBe(addDays(startedOn, pull.timeWeeks * 7))
      expect(pull.dueOn >= pull.windowFrom && pull.dueOn <= pull.windowTo).toBe(true)
      if (startedOn === today && pull.timeWeeks === 4) expect(pull.dueOn).toBe(nominal(pull))
      else expect(weekdayOf(pull.dueOn)).toBeLessThan(6)
      if (startedOn === today && pull.timeWeeks === 6) expect(pull.dueOn).not.toBe(six)
    }
    await end(study)
  })

  it('and so is a time point that is added later', async () => {
    const study = await benchStudy(t.db, formulator.actor, 4)
    const { id, startedOn } = await t.db
      .selectFrom('studyStation')
      .innerJoin('study', 'study.id', 'studyStation.studyId')
      .select(['studyStation.id', 'study.startedOn'])
      .where('studyStation.studyId', '=', study.studyId)
      .where('studyStation.temperatureC', '=', 25)
      .executeTakeFirstOrThrow()
    const day = addDays(startedOn, 49)
    await add([day], manager, 'Oven service')
    const body = {
      kind: 'time point',
      id: newId(),
      version: 1,
      reason: 'Asked for.',
      studyStationId: id,
      week: 7,
    }
    const answer = await call(amendRoute, { cookie: formulator.cookie, params: { code: study.code }, body })
    expect(answer.status).toBe(200)
    expect(answer.body.sentence).toContain('(Oven service)')
    const pull = (await pullsOfStudy(study)).find((one) => one.timeWeeks === 7)!
    expect(pull).toMatchObject({
      dueOn: addDays(day, 1),
      windowFrom: addDays(day, -2),
      windowTo: addDays(day, 2),
    })
    await end(study)
  })
})

describe('a holiday that is added later', () => {
  let study: BenchStudy
  beforeEach(async () => {
    study = await benchStudy(t.db, formulator.actor, 4)
  })

  it('moves nothing by itself; the pulls on it are shown and moved with a reason', async () => {
    const six = (await pullsOfStudy(study)).filter((pull) => pull.timeWeeks === 6)
    const day = six[0]!.dueOn
    expect(await closed()).toEqual([])
    await add([day], manager, 'Stocktaking')
    const shown = await closed()
    expect(shown).toHaveLength(3)
    expect(shown[0]).toMatchObject({
      studyCode: study.code,
      label: 'week 6',
      dueOn: day,
      because: 'Stocktaking',
      to: addDays(day, 1),
    })
    expect((await pullsOfStudy(study)).filter((pull) => pull.dueOn === day)).toHaveLength(3)

    const moves = shown.map((pull: { pullId: string; to: string }) => ({
      pullId: pull.pullId,
      from: day,
      to: pull.to,
    }))
    expect((await move({ moves, reason: 'Stocktaking' }, formulator)).status).toBe(403)
    expect((await move({ moves, reason: '  ' })).status).toBe(422)
    expect((await move({ moves: [{ ...moves[0], to: addDays(day, 2) }], reason: 'x' })).status).toBe(409)
    const moved = await move({ moves, reason: 'Stocktaking, nobody is here.' })
    expect(moved.body).toEqual({ moved: 3 })
    const after = (await pullsOfStudy(study)).filter((pull) => pull.timeWeeks === 6)
    expect(after.map((pull) => pull.dueOn)).toEqual([1, 1, 1].map((away) => addDays(day, away)))
    expect(after.map((pull) => pull.windowFrom)).toEqual(six.map((pull) => pull.windowFrom))
    expect(await closed()).toEqual([])
    const row = await t.owner
      .selectFrom('trail')
      .select(['before', 'after', 'reason', 'actorId'])
      .where('rowId', '=', six[0]!.id)
      .where('operation', '=', 'update')
      .executeTakeFirstOrThrow()
    expect(row).toMatchObject({
      before: { due_on: day },
      after: { due_on: addDays(day, 1) },
      reason: 'Stocktaking, nobody is here.',
      actorId: manager.actor.personId,
    })
    const again = await move({ moves, reason: 'Once more.' })
    expect(again.status).toBe(409)
    expect(again.body.error.sentence).toMatch(/begun or moved meanwhile/)
    await end(study)
  })

  it('offers no pull that is begun, and no day outside the window', async () => {
    const pulls = await pullsOfStudy(study)
    const six = pulls.filter((pull) => pull.timeWeeks === 6)
    const eight = pulls.find((pull) => pull.timeWeeks === 8)!
    await transact(t.db, technician.actor, {}, (trx) =>
      trx
        .updateTable('pullJar')
        .set({ state: 'missed', missedReason: 'broken', closedAt: new Date().toISOString() })
        .where('pullId', '=', six[0]!.id)
        .where('asks', '=', 'measuring')
        .execute(),
    )
    await add([six[0]!.dueOn, ...[-2, -1, 0, 1, 2].map((away) => addDays(nominal(eight), away))])
    const shown: { pullId: string; label: string; to: string | null }[] = await closed()
    expect(shown.map((pull) => pull.pullId)).not.toContain(six[0]!.id)
    expect(shown.filter((pull) => pull.label === 'week 6')).toHaveLength(2)
    expect(shown.filter((pull) => pull.label === 'week 8').map((pull) => pull.to)).toEqual([null, null, null])
    const stuck = shown.find((pull) => pull.to === null)!
    const refused = await move({
      moves: [{ pullId: stuck.pullId, from: eight.dueOn, to: addDays(eight.dueOn, 3) }],
      reason: 'x',
    })
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/no working day inside its window/)
    await end(study)
    expect(await closed()).toEqual([])
  })
})

describe('the weeks ahead', () => {
  it('count the jars still to be measured, and those that are late', async () => {
    const study = await benchStudy(t.db, formulator.actor, 4)
    const { due, calendar, today, late } = (await call(workloadRoute, { cookie: technician.cookie })).body
    const load = workloadOf(due, calendar, today)
    // Three stations, a watch and a measuring jar at each: weeks 1 to 3 are behind, week 4 was today or yesterday.
    const behind = (await pullsOfStudy(study)).filter((pull) => pull.dueOn < today).length
    expect(load.late).toBe(behind * 2)
    expect(late).toMatchObject([{ code: study.code, jars: behind * 2 }])
    const ahead = load.weeks.filter((week) => week.jars > 0)
    expect(ahead.every((week) => week.jars === 6 && week.watch === 3 && week.measuring === 3)).toBe(true)
    expect(load.weeks.reduce((sum, week) => sum + week.jars, 0)).toBe((24 - behind) * 2)
    await end(study)
  })

  it('cost as many statements for many studies as for one', async () => {
    const counted = async () =>
      (await countStatements(() => call(workloadRoute, { cookie: technician.cookie }))).count
    const studies = [await benchStudy(t.db, formulator.actor, 1)]
    const one = await counted()
    for (let more = 0; more < 4; more++) studies.push(await benchStudy(t.db, formulator.actor, more))
    expect(await counted()).toBe(one)
    // Session, calendar, due, late.
    expect(one).toBeLessThanOrEqual(5)
    await Promise.all(studies.map(end))
  })
})

describe('labels', () => {
  const pdf = (study: BenchStudy, query: Record<string, string>, by = technician) =>
    call(labelsRoute, { cookie: by.cookie, params: { code: study.code }, query })

  it('come as a PDF of the chosen sheet, each square its jar; the lab’s own sheet is kept in its settings', async () => {
    const study = await benchStudy(t.db, formulator.actor, 0, {
      ...planOfTest,
      ownPack: 'airless pump',
      stations: planOfTest.stations.map((one) => ({
        ...one,
        isOwnPack: true as const,
        orientation: 'inverted' as const,
      })),
    })
    const answer = await pdf(study, { sheet: 'letter-3x10', first: '29' })
    expect(answer.status).toBe(200)
    expect(answer.headers.get('content-type')).toBe('application/pdf')
    expect(answer.headers.get('content-disposition')).toContain('attachment')
    const bytes = new Uint8Array(await answer.response.arrayBuffer())
    const pages = pdfContents(bytes).map((page) => drawnSquares(page).map(({ dark }) => readQr(dark)))
    const jars = await t.db
      .selectFrom('jar')
      .select('code')
      .where('studyId', '=', study.studyId)
      .where('state', '!=', 'spent')
      .execute()
    // 3 stations of 1 + 8 + 2 jars and a retain; two labels were left on the first sheet.
    expect(pages.map((page) => page.length)).toEqual([2, 30, 2])
    expect(pages.flat().toSorted()).toEqual(jars.map((jar) => jar.code).toSorted())

    expect((await pdf(study, { sheet: 'own' })).status).toBe(422)
    const own = { ...genericGrids[0]!.grid, rows: 3 }
    expect((await change({ labelGrid: { ...own, widthMm: 90 } })).body.error.fields).toMatchObject({
      'labelGrid.widthMm': expect.stringMatching(/A4 is 210 mm wide/),
    })
    expect((await change({ labelGrid: own }, technician)).status).toBe(403)
    expect((await change({ labelGrid: own })).status).toBe(200)
    const code = jars[0]!.code
    const one = await pdf(study, { sheet: 'own', of: 'jars', jars: code })
    expect(
      pdfContents(new Uint8Array(await one.response.arrayBuffer())).map((page) => drawnSquares(page).length),
    ).toEqual([1])
    expect((await change({ labelGrid: null })).status).toBe(200)
    await end(study)
  })

  it('are refused in sentences, and are not for clients', async () => {
    const study = await benchStudy(t.db, formulator.actor, 0)
    const sentence = async (query: Record<string, string>) => {
      const { status, body } = await pdf(study, query)
      expect(status).toBe(422)
      return Object.values(body.error.fields ?? {})[0]
    }
    expect(await sentence({ first: '22' })).toMatch(/has 21 labels/)
    expect(await sentence({ first: '0' })).toMatch(/counted from 1/)
    expect(await sentence({ sheet: 'a5' })).toMatch(/[.]$/)
    expect(await sentence({ of: 'jars', jars: 'HELLO' })).toMatch(/is no jar code/)
    expect(await sentence({ of: 'moved' })).toMatch(/No jar is chosen/)
    expect(await sentence({ of: newId() })).toMatch(/No jar is chosen/)
    const client = await t.person('client')
    expect((await pdf(study, {}, client)).status).toBe(403)
    await end(study)
  })

  it('name the jars that were moved, so that they alone are printed again', async () => {
    const study = await benchStudy(t.db, formulator.actor, 0)
    const [jar] = await t.db
      .selectFrom('jar')
      .select(['id', 'code', 'studyStationId', 'stationId', 'shelf', 'place'])
      .where('studyId', '=', study.studyId)
      .where('shelf', 'is not', null)
      .limit(1)
      .execute()
    const other = Object.values(study.stationIds).find((id) => id !== jar!.stationId)!
    await transact(t.db, technician.actor, {}, async (trx) => {
      const stationMoveId = newId()
      await sql`insert into station_move (id, from_station_id, to_station_id, reason, moved_by)
        values (${stationMoveId}, ${jar!.stationId}, ${other}, 'The oven failed.', ${technician.actor.personId})`.execute(
        trx,
      )
      await sql`insert into jar_move (id, station_move_id, jar_id, study_station_id, from_shelf, from_place, to_shelf, to_place)
        values (${newId()}, ${stationMoveId}, ${jar!.id}, ${jar!.studyStationId}, ${jar!.shelf}, ${jar!.place}, 1, 90)`.execute(
        trx,
      )
    })
    const answer = await pdf(study, { of: 'moved' })
    const [page] = pdfContents(new Uint8Array(await answer.response.arrayBuffer()))
    expect(drawnSquares(page!).map(({ dark }) => readQr(dark))).toEqual([jar!.code])
    await end(study)
  })
})
