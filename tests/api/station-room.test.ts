import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as logRoute } from '@/app/api/pulls/[id]/readings/route'
import { POST as cancelRoute } from '@/app/api/stations/[id]/downtimes/[downtimeId]/cancel/route'
import { POST as downtimeRoute } from '@/app/api/stations/[id]/downtimes/route'
import { GET as allReadingsRoute } from '@/app/api/readings/route'
import { GET as readingsRoute } from '@/app/api/studies/[code]/readings/route'
import { GET as fileRoute } from '@/app/api/studies/[code]/readings/export/route'
import { POST as moveRoute } from '@/app/api/stations/[id]/moves/route'
import { PUT as changeRoute } from '@/app/api/stations/[id]/route'
import { GET as sheetRoute } from '@/app/api/studies/[code]/sheet/route'
import { POST as startRoute } from '@/app/api/studies/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { loadStays } from '@/lib/shelf-case/queries/evidence'
import { temperatureRecord } from '@/lib/shelf-case/rules/temperature'
import { listStandingJars } from '@/lib/station/queries/places'
import { addDays } from '@/lib/study/rules/calendar'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '@/tests/support/running-study'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let formulator: Signed
let technician: Signed
let manager: Signed
let stations: Map<string, string>
let protocolVersionId: string
let count = 0
const today = new Date().toISOString().slice(0, 10)

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  formulator = await t.person('formulator')
  technician = await t.person('technician', { name: 'Mada Aarup' })
  manager = await t.person('manager')
  stations = await makeStations(formulator.actor)
  protocolVersionId = await makeProtocol(formulator.actor)
})
afterAll(() => t.close())

/** One more station of the lab, as roomy as it is said. */
async function station(name: string, temperatureC: number, places = 60, more: object = {}) {
  const id = newId()
  const { POST } = await import('@/app/api/stations/route')
  const limits = { lowC: temperatureC - 2, highC: temperatureC + 2, walkOrder: 20, shelves: 1 }
  const made = await call(POST, {
    cookie: manager.cookie,
    body: { id, name, kind: 'temperature', temperatureC, placesPerShelf: places, ...limits, ...more },
  })
  expect(made.status).toBe(200)
  return id
}

/** A running study whose jars of 45 °C stand in an oven of their own. */
async function study(oven: string) {
  count += 1
  const batchId = await makeBatch(formulator.actor, { code: `M${count}` })
  const answer = await call(startRoute, {
    cookie: formulator.cookie,
    body: {
      ...{ id: newId(), title: 'Screen', protocolVersionId, batchIds: [batchId] },
      stationChoices: [{ position: 3, stationId: oven }],
      initialReadings: initialOf(batchId),
    },
  })
  expect(answer.body.error).toBeUndefined()
  return answer.body.code as string
}

const at = (id: string) => listStandingJars(t.db, id)

function move(from: string, to: string, jarIds: string[], who = technician, body: object = {}) {
  return call(moveRoute, {
    cookie: who.cookie,
    params: { id: from },
    body: { id: newId(), toStationId: to, jarIds, reason: 'The fan failed.', ...body },
  })
}

describe('moving jars', () => {
  it('all of an oven that fails at once, each to a place of its own, in as many statements as a few', async () => {
    const [bad, good] = [await station('Bad oven', 45), await station('Good oven', 45)]
    const codes = [await study(bad), await study(bad)]
    const jars = await at(bad)
    expect(jars).toHaveLength(22)
    let all: Awaited<ReturnType<typeof move>> | undefined
    const { count: statements } = await countStatements(async () => {
      all = await move(
        bad,
        good,
        jars.map((jar) => jar.id),
      )
    })
    expect(all!.body.error).toBeUndefined()
    expect(all!.body).toMatchObject({ moved: 22 })
    expect(statements).toBeLessThanOrEqual(40)
    expect(await at(bad)).toEqual([])
    const moved = await at(good)
    expect(moved.map((jar) => jar.code).toSorted()).toEqual(jars.map((jar) => jar.code).toSorted())
    expect(new Set(moved.map(({ shelf, place }) => `${shelf}/${place}`)).size).toBe(22)
    // Their series is the one they had, and the sheet says where they are and why.
    expect(moved[0]!.temperatureC).toBe(45)
    const sheet = await call(sheetRoute, { cookie: formulator.cookie, params: { code: codes[0]! } })
    const shelf = sheet.body.shelves[0].rows.find(
      (row: { station: { temperatureC: number } }) => row.station.temperatureC === 45,
    )
    expect(shelf.station.name).toBe('Good oven')
    expect(sheet.body.study.moves).toMatchObject([
      { fromName: 'Bad oven', toName: 'Good oven', reason: 'The fan failed.', movedBy: 'Mada Aarup' },
    ])
    const trail = await t.owner
      .selectFrom('trail')
      .select('tableName')
      .where('reason', '=', 'The fan failed.')
      .where('tableName', '=', 'jar')
      .execute()
    expect(trail).toHaveLength(22)
    // The oven goes out of use once it is empty.
    const back = await move(good, bad, [moved[0]!.id])
    expect(back.status).toBe(200)
    expect((await at(bad)).map((jar) => jar.code)).toEqual([moved[0]!.code])
  })

  it('sent twice it moves once', async () => {
    const [a, b] = [await station('Twice', 45, 20), await station('Twice there', 45, 20)]
    await study(a)
    const ids = (await at(a)).map((jar) => jar.id)
    const id = newId()
    expect((await move(a, b, ids, technician, { id })).status).toBe(200)
    expect((await move(a, b, ids, technician, { id })).status).toBe(200)
    const moves = await t.db.selectFrom('jarMove').select('id').where('stationMoveId', '=', id).execute()
    expect(moves).toHaveLength(ids.length)
  })

  it('two people at once: one moves them, the other is told who did', async () => {
    const a = await station('Shared', 45, 20)
    const [b, c] = [await station('Left', 45, 20), await station('Right', 45, 20)]
    await study(a)
    const ids = (await at(a)).map((jar) => jar.id)
    const answers = await Promise.all([move(a, b, ids, technician), move(a, c, ids, manager)])
    expect(answers.map((one) => one.status).toSorted()).toEqual([200, 409])
    const refused = answers.find((one) => one.status === 409)!
    expect(refused.body.error.sentence).toMatch(
      /^Eleven jars of these no longer stand at Shared\. .+ moved .{5} to (Left|Right)\. Nothing was moved/,
    )
    expect((await at(b)).length + (await at(c)).length).toBe(11)
  })

  it('two people to the last places: only as many as there are', async () => {
    const [a, b] = [await station('First', 45, 20), await station('Second', 45, 20)]
    const narrow = await station('Narrow', 45, 12)
    await study(a)
    await study(b)
    const [ofA, ofB] = [(await at(a)).map((jar) => jar.id), (await at(b)).map((jar) => jar.id)]
    const answers = await Promise.all([move(a, narrow, ofA), move(b, narrow, ofB)])
    expect(answers.map((one) => one.status).toSorted()).toEqual([200, 409])
    expect(answers.find((one) => one.status === 409)!.body.error.sentence).toMatch(
      /^Narrow has one free place, 11 are needed\. What would fit: move one jar there and the rest elsewhere; /,
    )
    expect(await at(narrow)).toHaveLength(11)
  })

  it('refuses with a sentence what cannot be, and moves nothing', async () => {
    const a = await station('From here', 45, 20)
    const off = await station('Off', 45, 20)
    const down = await station('Down', 45, 20)
    await study(a)
    const jars = (await at(a)).map((jar) => jar.id)
    const list = await call((await import('@/app/api/stations/route')).GET, { cookie: manager.cookie })
    const row = list.body.rows.find((one: { id: string }) => one.id === off)
    const off1 = await call(changeRoute, {
      cookie: manager.cookie,
      params: { id: off },
      body: { ...row, isActive: false },
    })
    expect(off1.status).toBe(200)
    await call(downtimeRoute, {
      cookie: manager.cookie,
      params: { id: down },
      body: { id: newId(), fromOn: today, toOn: addDays(today, 2), reason: 'service' },
    })
    const sentence = async (to: string, ids = jars, body: object = {}) => {
      const answer = await move(a, to, ids, technician, body)
      expect([409, 422]).toContain(answer.status)
      return answer.body.error.sentence as string
    }
    expect(await sentence(a)).toBe('The jars stand at From here already. Choose another station.')
    expect(await sentence(newId())).toMatch(/no such station/)
    expect(await sentence(off)).toMatch(/^Off is out of use/)
    expect(await sentence(down)).toMatch(/^Down is out of use until .*: service\./)
    expect(await sentence(stations.get('45')!, [])).toBeTruthy()
    expect(await sentence(stations.get('45')!, [...jars, newId()])).toMatch(
      /^One jar of these no longer stands/,
    )
    expect(await sentence(stations.get('45')!, jars, { reason: '  ' })).toBeTruthy()
    expect(await at(a)).toHaveLength(11)
    expect((await call(moveRoute, { params: { id: a }, body: {} })).status).toBe(401)
    const qa = await t.person('qa')
    expect((await move(a, stations.get('45')!, jars, qa)).status).toBe(403)
  })

  it('a station with jars does not go out of use, nor does it lose their places', async () => {
    const a = await station('Full of jars', 45, 20)
    await study(a)
    const list = await call((await import('@/app/api/stations/route')).GET, { cookie: manager.cookie })
    const row = list.body.rows.find((one: { id: string }) => one.id === a)
    const change = (body: object) =>
      call(changeRoute, { cookie: manager.cookie, params: { id: a }, body: { ...row, ...body } })
    const off = await change({ isActive: false })
    expect(off.status).toBe(422)
    expect(off.body.error.sentence).toMatch(/^Eleven jars stand at Full of jars\. Move them/)
    const small = await change({ placesPerShelf: 10 })
    expect(small.body.error.sentence).toMatch(/^A jar stands on shelf 1, place 11 of Full of jars\./)
    expect((await change({ placesPerShelf: 11 })).status).toBe(200)
  })

  it('a reading after the move is doubted at another temperature and not at the same', async () => {
    const [a, same, cool] = [
      await station('Warm A', 45, 20),
      await station('Warm B', 45, 20),
      await station('Cool C', 40, 20),
    ]
    const code = await study(a)
    const jars = (await at(a)).filter((jar) => jar.kind === 'measuring')
    const [first, second, third] = jars as [(typeof jars)[0], (typeof jars)[0], (typeof jars)[0]]
    expect((await move(a, same, [first.id])).status).toBe(200)
    const away = await move(a, cool, [second.id])
    expect(away.body.effects).toMatchObject([{ isElsewhere: true, follows: false }])
    const doubtsOf = async (jarId: string) => {
      const asked = await t.db
        .selectFrom('pullJar')
        .select(['id', 'version', 'studyId'])
        .where('jarId', '=', jarId)
        .executeTakeFirstOrThrow()
      await transact(t.db, technician.actor, {}, (trx) =>
        trx
          .insertInto('jarMishap')
          .values({
            id: newId(),
            studyId: asked.studyId,
            jarId,
            pullJarId: asked.id,
            kind: 'pulled early',
            reason: 'a test on its first day',
            happenedAt: sql<string>`app_now()`,
            claimedAt: new Date().toISOString(),
            recordedBy: technician.actor.personId,
          })
          .execute(),
      )
      const answer = await call(logRoute, {
        cookie: technician.cookie,
        params: { id: asked.id },
        body: {
          version: asked.version,
          deviceNow: new Date().toISOString(),
          claimedAt: new Date().toISOString(),
          leaveOut: ['viscosity', 'odour', 'feel'],
          readings: [{ id: newId(), attribute: 'ph', typed: '5,60', isConfirmed: true }],
        },
      })
      expect(answer.body.error).toBeUndefined()
      return (answer.body.readings as { doubts: { reason: string; sentence: string }[] }[]).flatMap(
        (one) => one.doubts,
      )
    }
    expect((await doubtsOf(first.id)).map((one) => one.reason)).not.toContain('place')
    const found = (await doubtsOf(second.id)).find((one) => one.reason === 'place')
    expect(found!.sentence).toMatch(/^The jar stood at 40 °C instead of 45 °C from .* on\./)

    // Readings name the station where their jar stood, not the one where its series began.
    await doubtsOf(third.id)
    const stood = [
      [first.code, 'Warm B'],
      [second.code, 'Cool C'],
      [third.code, 'Warm A'],
    ] as const
    const { body } = await call(readingsRoute, { cookie: technician.cookie, params: { code } })
    const named = body.rows.map(({ current }: { current: { jarCode: string; stationName: string } }) => [
      current.jarCode,
      current.stationName,
    ])
    for (const one of stood) expect(named).toContainEqual(one)
    const there = await call(readingsRoute, {
      cookie: technician.cookie,
      params: { code },
      query: { station: 'Cool C' },
    })
    expect(there.body.rows).toHaveLength(1)
    const all = await call(allReadingsRoute, { cookie: technician.cookie, query: { study: code } })
    const entries = all.body as { jarCode: string; stationName: string }[]
    expect(entries.find((one) => one.jarCode === second.code)!.stationName).toBe('Cool C')
    const query = { columns: 'jar,station' }
    const file = await call(fileRoute, { cookie: technician.cookie, params: { code }, query })
    expect(file.body).toMatch(new RegExp(`${second.code}.*Cool C`))
  })

  it('the temperature record of the series goes from one station into the other', async () => {
    const [a, b] = [await station('Record A', 45, 20), await station('Record B', 45, 20)]
    const code = await study(a)
    const { POST: log } = await import('@/app/api/stations/[id]/temperatures/route')
    const read = (id: string, temperatureC: number) =>
      call(log, {
        cookie: technician.cookie,
        params: { id },
        body: { readings: [{ id: newId(), measuredAt: new Date().toISOString(), temperatureC }] },
      })
    await read(a, 45)
    await read(b, 60)
    await move(
      a,
      b,
      (await at(a)).map((jar) => jar.id),
    )
    await read(a, 20)
    await read(b, 46)
    const { id } = await t.db
      .selectFrom('studyStation')
      .innerJoin('study', 'study.id', 'studyStation.studyId')
      .select('studyStation.id')
      .where('study.code', '=', code)
      .where('studyStation.temperatureC', '=', 45)
      .executeTakeFirstOrThrow()
    const stays = await loadStays(t.db, id)
    expect(stays.map((stay) => [stay.name, stay.entries.map((one) => one.temperatureC)])).toEqual([
      ['Record A', [45]],
      ['Record B', [46]],
    ])
    const record = temperatureRecord(stays)!
    expect(record.station).toBe('Record A, then Record B')
    expect(record.excursions).toEqual([])
    expect(record.calc.output).toMatchObject({ minC: 45, maxC: 46 })
  })
})

describe('days out of use', () => {
  const plan = (id: string, fromOn: string, toOn: string, who = manager, body: object = {}) =>
    call(downtimeRoute, {
      cookie: who.cookie,
      params: { id },
      body: { id: newId(), fromOn, toOn, reason: 'The door is changed.', ...body },
    })

  it('are planned ahead by a manager, never twice on a day, and cancelled with a reason of their own', async () => {
    const a = await station('With days', 45)
    const [from, to] = [addDays(today, 10), addDays(today, 12)]
    const id = newId()
    expect((await plan(a, from, to, manager, { id })).status).toBe(200)
    const overlap = await plan(a, addDays(today, 12), addDays(today, 14))
    expect(overlap.status).toBe(422)
    expect(overlap.body.error.sentence).toMatch(
      /^With days is out of use from .* already: The door is changed\./,
    )
    expect(Object.keys(overlap.body.error.fields)).toEqual(['fromOn'])
    const past = await plan(a, addDays(today, -1), to)
    expect(past.body.error.fields.fromOn).toBeTruthy()
    const turned = await plan(a, to, from)
    expect(turned.body.error.fields.toOn).toBe('The last day lies before the first.')
    expect((await plan(a, from, to, technician)).status).toBe(403)
    expect((await plan(newId(), from, to)).status).toBe(404)
    const cancel = (reason: string) =>
      call(cancelRoute, {
        cookie: manager.cookie,
        params: { id: a, downtimeId: id },
        body: { id: newId(), reason },
      })
    expect((await cancel(' ')).status).toBe(422)
    expect((await cancel('The part has not come.')).status).toBe(200)
    const again = await cancel('Once more.')
    expect(again.status).toBe(409)
    expect(again.body.error.sentence).toMatch(/cancelled it already/)
    expect((await plan(a, from, to)).status).toBe(200)
  })

  it('two who plan the same days at once: one is told of the other', async () => {
    const a = await station('At once', 45)
    const [from, to] = [addDays(today, 20), addDays(today, 21)]
    const answers = await Promise.all([plan(a, from, to), plan(a, from, to)])
    expect(answers.map((one) => one.status).toSorted()).toEqual([200, 422])
  })

  it('stand on the sheet of a study whose jars stand there, with the pulls that fall in', async () => {
    const a = await station('On the sheet', 45)
    const code = await study(a)
    await plan(a, addDays(today, 6), addDays(today, 8))
    const sheet = await call(sheetRoute, { cookie: formulator.cookie, params: { code } })
    expect(sheet.body.study.downtimes).toMatchObject([
      { name: 'On the sheet', reason: 'The door is changed.', pulls: ['week 1'] },
    ])
  })
})

describe('lamps', () => {
  it('are said whole or not at all', async () => {
    const { POST } = await import('@/app/api/stations/route')
    const make = (more: object) =>
      call(POST, {
        cookie: manager.cookie,
        body: {
          ...{
            id: newId(),
            name: `Lamp ${newId()}`,
            kind: 'temperature',
            temperatureC: 25,
            lowC: 23,
            highC: 27,
          },
          ...{ walkOrder: 9, shelves: 1, placesPerShelf: 9, ...more },
        },
      })
    expect((await make({ lightLux: 8000 })).body.error.fields.lightHours).toBeTruthy()
    expect((await make({ lightHours: 16 })).body.error.fields.lightLux).toBeTruthy()
    expect((await make({ lightLux: -1, lightHours: 16 })).status).toBe(422)
    expect((await make({ lightLux: 8000, lightHours: 25 })).body.error.fields.lightHours).toBe(
      'A day has 24 hours.',
    )
    expect((await make({ lightLux: 8000, lightUvWm2: 0.4, lightHours: 16 })).status).toBe(200)
  })
})

describe('a study that starts in part', () => {
  it('keeps in its plan what started, and says what did not on its sheet from the first day', async () => {
    const batchId = await makeBatch(formulator.actor, { code: 'PART' })
    const body = {
      ...{ id: newId(), title: 'In part', protocolVersionId, batchIds: [batchId] },
      ...{ adjustments: { leaveOutStations: [1] }, initialReadings: initialOf(batchId) },
    }
    const silent = await call(startRoute, { cookie: formulator.cookie, body })
    expect(silent.status).toBe(422)
    expect(silent.body.error.fields.whyInPart).toBe('Say why these stations do not start.')
    let answer: Awaited<ReturnType<typeof call>> | undefined
    const { count: statements } = await countStatements(async () => {
      answer = await call(startRoute, {
        cookie: formulator.cookie,
        body: { ...body, whyInPart: 'No jars left.' },
      })
    })
    expect(answer!.status).toBe(200)
    expect(statements).toBeLessThanOrEqual(25)
    const sheet = await call(sheetRoute, { cookie: formulator.cookie, params: { code: answer!.body.code } })
    expect(sheet.body.shelves[0].rows).toHaveLength(4)
    expect(sheet.body.study.amendments).toMatchObject([
      { number: 1, kind: 'not started', reason: 'No jars left.' },
    ])
    expect(sheet.body.study.amendments[0].sentence).toMatch(
      /^25 °C was planned by the protocol, where it decides, and was not started: by choice\.$/,
    )
  })
})
