import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { PUT as changeRoute } from '@/app/api/studies/[code]/route'
import { POST as endRoute } from '@/app/api/studies/[code]/end/route'
import { PUT as followRoute } from '@/app/api/studies/[code]/follow/route'
import { GET as jarsRoute } from '@/app/api/studies/[code]/jars/route'
import { GET as listRoute, POST as startRoute } from '@/app/api/studies/route'
import { GET as jarRoute, PUT as fillRoute } from '@/app/api/jars/[code]/route'
import { newId } from '@/lib/db/id'
import { isJarCode } from '@/lib/jar/rules/code'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '@/tests/support/running-study'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let formulator: Signed
let technician: Signed
let client: Signed
let protocolVersionId: string
let stations: Map<string, string>
let count = 0

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'Europe/Berlin')
  formulator = await t.person('formulator')
  technician = await t.person('technician')
  client = await t.person('client')
  stations = await makeStations(formulator.actor)
  protocolVersionId = await makeProtocol(formulator.actor)
})
afterAll(() => t.close())

async function batch(yieldG?: number, state?: string) {
  count += 1
  return makeBatch(formulator.actor, {
    code: `N${count}`,
    ...(yieldG ? { yieldG } : {}),
    ...(state ? { state } : {}),
  })
}

type Body = Record<string, unknown>
function start(body: Body, key?: string) {
  return call(startRoute, {
    cookie: formulator.cookie,
    body: { id: newId(), title: 'Screen', protocolVersionId, ...body },
    ...(key ? { key } : {}),
  })
}

describe('starting a study', () => {
  it('R01: makes jars, places, pulls and initial readings, each row once on the trail under one request', async () => {
    const batchId = await batch()
    const id = newId()
    let answer: Awaited<ReturnType<typeof start>> | undefined
    const { count: statements } = await countStatements(async () => {
      answer = await start({ id, batchIds: [batchId], initialReadings: initialOf(batchId) })
    })
    expect(answer!.body.error).toBeUndefined()
    expect(answer!.status).toBe(200)
    expect(statements).toBeLessThanOrEqual(25)

    // 4 stations with 9 pulls and one with 5 cycles: 5 watch, 41 measuring, 5 spare, 2 retain, 1 initial.
    const jars = await t.db.selectFrom('jar').selectAll().where('studyId', '=', id).execute()
    expect(jars).toHaveLength(54)
    const kinds = Object.fromEntries(
      ['watch', 'measuring', 'spare', 'retain'].map((kind) => [
        kind,
        jars.filter((j) => j.kind === kind).length,
      ]),
    )
    expect(kinds).toEqual({ watch: 5, measuring: 42, spare: 5, retain: 2 })
    expect(jars.every((jar) => isJarCode(jar.code))).toBe(true)
    const standing = jars.filter((jar) => jar.studyStationId !== null)
    expect(new Set(standing.map((j) => `${j.studyStationId} ${j.shelf} ${j.place}`)).size).toBe(51)

    const pulls = await t.db.selectFrom('pull').selectAll().where('studyId', '=', id).execute()
    expect(pulls).toHaveLength(41)
    const asked = await t.db.selectFrom('pullJar').selectAll().where('studyId', '=', id).execute()
    expect(asked.filter((one) => one.asks === 'watch')).toHaveLength(41)
    expect(asked.filter((one) => one.asks === 'measuring')).toHaveLength(41)

    const readings = await t.db
      .selectFrom('reading')
      .select(['attribute', 'typed', 'value', 'studyStationId'])
      .where('studyId', '=', id)
      .orderBy('attribute')
      .orderBy('replicate')
      .execute()
    expect(readings.map((r) => [r.attribute, r.typed, r.value])).toEqual([
      ['ph', '5,60', 5.6],
      ['ph', '5.62', 5.62],
      // Torque 62 % × 10 000 / 10 rpm.
      ['viscosity', '62', 62_000],
    ])

    const { requestId } = await t.owner
      .selectFrom('trail')
      .select('requestId')
      .where('tableName', '=', 'study')
      .where('rowId', '=', id)
      .executeTakeFirstOrThrow()
    const ofRequest = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'rowId', 'actorId'])
      .where('requestId', '=', requestId)
      .execute()
    // Study, batch, stations, pulls, jars, asks, readings, follower, and the locked version of the protocol.
    const rows = 1 + 1 + 5 + 41 + 54 + 82 + 3 + 1 + 1
    expect(new Set(ofRequest.map((row) => `${row.tableName} ${row.rowId}`)).size).toBe(ofRequest.length)
    expect(ofRequest).toHaveLength(rows)
    expect(ofRequest.every((row) => row.actorId === formulator.actor.personId)).toBe(true)
  })

  it('stands lying jars beside upright ones in one cabinet, each in a place of its own, and sets jars aside', async () => {
    const screen = readyMadePlan('screen', 'cream')
    const [, , warm] = screen.stations
    const version = await makeProtocol(formulator.actor, {
      ...screen,
      stations: [warm!, { ...warm!, orientation: 'lying' }],
      setAside: [{ what: 'microbiology', jars: 2 }],
    })
    const batchId = await batch()
    const id = newId()
    const body = { id, protocolVersionId: version, batchIds: [batchId], initialReadings: initialOf(batchId) }
    expect((await start(body)).status).toBe(200)
    const places = await t.db
      .selectFrom('studyStation')
      .select(['stationId', 'variant'])
      .where('studyId', '=', id)
      .orderBy('position')
      .execute()
    expect(places.map(({ variant }) => variant)).toEqual(['', 'lying'])
    expect(places[0]!.stationId).toBe(places[1]!.stationId)
    const jars = await t.db.selectFrom('jar').selectAll().where('studyId', '=', id).execute()
    const standing = jars.filter((jar) => jar.studyStationId !== null)
    expect(new Set(standing.map((jar) => `${jar.shelf} ${jar.place}`)).size).toBe(standing.length)
    expect(jars.filter((jar) => jar.setAsideFor === 'microbiology').map((jar) => jar.state)).toEqual([
      'kept',
      'kept',
    ])
  })

  it('locks the version of the protocol it follows', async () => {
    const version = await makeProtocol(formulator.actor)
    const batchId = await batch()
    await start({ protocolVersionId: version, batchIds: [batchId], initialReadings: initialOf(batchId) })
    const row = await t.db
      .selectFrom('protocolVersion')
      .select('state')
      .where('id', '=', version)
      .executeTakeFirstOrThrow()
    expect(row.state).toBe('locked')
  })

  it('D05: sent again with the same id, it changes nothing and answers the same', async () => {
    const batchId = await batch()
    const body = { id: newId(), batchIds: [batchId], initialReadings: initialOf(batchId) }
    const first = await start(body, 'start-once')
    const again = await start(body, 'start-once')
    const otherKey = await start(body)
    expect([again.status, otherKey.status]).toEqual([200, 200])
    expect(again.body).toEqual(first.body)
    expect(otherKey.body).toEqual(first.body)
    const jars = await t.db.selectFrom('jar').select('id').where('studyId', '=', body.id).execute()
    expect(jars).toHaveLength(54)
  })

  it('gives pulls of a summer-time change the same day of the week, in the lab zone', async () => {
    const batchId = await batch()
    const id = newId()
    const answer = await start({
      id,
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      startedAt: '2026-10-11T22:30:00Z',
    })
    expect(answer.status).toBe(200)
    const study = await t.db
      .selectFrom('study')
      .select('startedOn')
      .where('id', '=', id)
      .executeTakeFirstOrThrow()
    // Half past ten in the evening in UTC is half past midnight of the next day in Berlin.
    expect(study.startedOn).toBe('2026-10-12')
    const pulls = await t.db
      .selectFrom('pull')
      .select(['dueOn', 'windowFrom', 'windowTo'])
      .where('studyId', '=', id)
      .where('timeWeeks', 'in', [2, 3])
      .orderBy('timeWeeks')
      .execute()
    expect(pulls[0]).toMatchObject({ dueOn: '2026-10-26', windowFrom: '2026-10-25', windowTo: '2026-10-27' })
    expect(pulls.at(-1)!.dueOn).toBe('2026-11-02')
  })

  it('refuses a batch that is not released', async () => {
    const batchId = await batch(3000, 'resting')
    const answer = await start({ batchIds: [batchId], initialReadings: initialOf(batchId) })
    expect(answer.status).toBe(409)
    expect(answer.body.error.sentence).toBe(
      `N${count} is still resting. Release it before a study starts on it.`,
    )
  })

  it('refuses a batch that cannot fill the jars, with the missing grams and what would fit', async () => {
    const batchId = await batch(1500)
    const answer = await start({ batchIds: [batchId], initialReadings: initialOf(batchId) })
    expect(answer.status).toBe(409)
    // 54 jars × 30 g ÷ 0.97 = 1670.1 g.
    expect(answer.body.error.sentence).toMatch(/^171 g are missing, so this study cannot start\./)
    const { detail } = answer.body.error
    expect(detail).toMatchObject({ jars: 54, enoughFor: 48, initialJars: 1, retains: 2 })
    const kinds = detail.options.map((option: { kind: string; leftG: number }) => [
      option.kind,
      option.leftG >= 0,
    ])
    expect(kinds).toEqual([
      ['fill', true],
      ['weeks', true],
      ['retains', false],
    ])
    const weeks = detail.options[1]
    const fitting = await start({
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      adjustments: weeks.adjustments,
    })
    expect(fitting.status).toBe(200)
    expect(fitting.body.jars).toBe(weeks.jars)
  })

  it('counts what earlier studies have filled from the same batch', async () => {
    const batchId = await batch(2000)
    expect((await start({ batchIds: [batchId], initialReadings: initialOf(batchId) })).status).toBe(200)
    const second = await start({ batchIds: [batchId], initialReadings: initialOf(batchId) })
    expect(second.status).toBe(409)
    expect(second.body.error.detail.kind).toBe('batch short')
  })

  it('refuses a station that cannot hold the jars, and one that keeps another temperature', async () => {
    const narrow = newId()
    const manager = await t.person('manager')
    const { POST } = await import('@/app/api/stations/route')
    const made = await call(POST, {
      cookie: manager.cookie,
      body: {
        id: narrow,
        name: 'Small oven',
        kind: 'temperature',
        temperatureC: 45,
        lowC: 43,
        highC: 47,
        walkOrder: 9,
        shelves: 1,
        placesPerShelf: 4,
      },
    })
    expect(made.status).toBe(200)
    const batchId = await batch()
    const full = await start({
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      stationChoices: [{ position: 3, stationId: narrow }],
    })
    expect(full.status).toBe(409)
    expect(full.body.error.sentence).toMatch(
      /^Small oven has four free places, 11 are needed\. What would fit: use Station 45, \d+ free places; start without 45 °C\.$/,
    )
    const { detail } = full.body.error
    expect(detail).toMatchObject({ kind: 'station', position: 3, free: 4, needed: 11 })
    // What it offers does start.
    const fitting = detail.options.find((option: { kind: string }) => option.kind === 'without')
    const again = await start({
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      stationChoices: [{ position: 3, stationId: narrow }],
      adjustments: fitting.adjustments,
      whyInPart: 'The big oven is being repaired.',
    })
    expect(again.status).toBe(200)
    const wrong = await start({
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      stationChoices: [{ position: 3, stationId: stations.get('40') }],
    })
    expect(wrong.status).toBe(409)
    expect(wrong.body.error.sentence).toMatch(/^Station 40 is no 45 °C station\./)
  })

  it('refuses an initial outside its own band, a missing one, an impossible one and one from the future', async () => {
    const plan = readyMadePlan('screen', 'cream')
    const ph = plan.attributes.find((one) => one.attribute === 'ph')!
    ph.tolerance = { kind: 'range', lower: 4.5, upper: 5.5 }
    const version = await makeProtocol(formulator.actor, plan)
    const batchId = await batch()
    const outside = await start({
      protocolVersionId: version,
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
    })
    expect(outside.status).toBe(422)
    expect(outside.body.error.sentence).toMatch(/is 5\.61, outside its own band \(4\.50 to 5\.50\)\./)

    const missing = await start({ batchIds: [batchId], initialReadings: initialOf(batchId).slice(1) })
    expect(missing.status).toBe(422)
    expect(missing.body.error.sentence).toMatch(/has no initial pH/)

    const impossible = await start({
      batchIds: [batchId],
      initialReadings: [{ batchId, attribute: 'ph', typed: ['56'] }, ...initialOf(batchId).slice(1)],
    })
    expect(impossible.status).toBe(422)
    expect(impossible.body.error.fields['initialReadings.0.typed.0']).toBe('pH runs from 0 to 14.')

    const future = await start({
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
      startedAt: new Date(Date.now() + 3_600_000).toISOString(),
    })
    expect(future.status).toBe(422)
  })

  it('refuses a protocol without time points', async () => {
    const plan = readyMadePlan('screen', 'cream')
    plan.stations[1]!.timePoints = []
    const version = await makeProtocol(formulator.actor, plan)
    const batchId = await batch()
    const answer = await start({
      protocolVersionId: version,
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
    })
    expect(answer.status).toBe(422)
    expect(answer.body.error.sentence).toBe('The protocol has no time points at 25 °C. Add them to its plan.')
  })

  it('refuses bodies that make no sense with 422, never with 500', async () => {
    for (const body of [
      {},
      { batchIds: [] },
      { batchIds: ['x'], initialReadings: 'all' },
      { batchIds: [newId()], initialReadings: [] },
    ]) {
      const answer = await start(body)
      expect([404, 422]).toContain(answer.status)
    }
  })

  it('is not for technicians', async () => {
    const answer = await call(startRoute, { cookie: technician.cookie, body: {} })
    expect(answer.status).toBe(403)
  })
})

describe('a running study', () => {
  async function running(more: Body = {}) {
    const batchId = await batch()
    const answer = await start({ batchIds: [batchId], initialReadings: initialOf(batchId), ...more })
    expect(answer.body.error).toBeUndefined()
    return answer.body as { id: string; code: string }
  }

  it('A05: a client sees its own shared studies and no others', async () => {
    const mine = await running({ clientId: client.actor.clientId, isShared: true })
    const unshared = await running({ clientId: client.actor.clientId })
    const other = await running()
    const { GET } = await import('@/app/api/studies/[code]/sheet/route')
    const status = async (code: string) =>
      (await call(GET, { cookie: client.cookie, params: { code } })).status
    expect([await status(mine.code), await status(unshared.code), await status(other.code)]).toEqual([
      200, 404, 404,
    ])
    const list = await call(listRoute, { cookie: client.cookie })
    expect(list.body.rows.map((row: { code: string }) => row.code)).toEqual([mine.code])
  })

  it('D06: the second of two edits gets 412 with who came first', async () => {
    const { code } = await running()
    const edit = (title: string) =>
      call(changeRoute, {
        cookie: formulator.cookie,
        method: 'PUT',
        params: { code },
        body: { version: 1, title, clientId: null, isShared: false },
      })
    expect((await edit('First')).status).toBe(200)
    const second = await edit('Second')
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain(formulator.actor.name)
  })

  it('ends with a reason and not without one, and leaves the ledger of running studies', async () => {
    const { code } = await running()
    const end = (body: Body) => call(endRoute, { cookie: formulator.cookie, params: { code }, body })
    expect((await end({ version: 1, reason: '  ' })).status).toBe(422)
    expect((await end({ version: 1, reason: 'All pulls are read.' })).status).toBe(200)
    expect((await end({ version: 2, reason: 'Again.' })).status).toBe(409)
    const list = await call(listRoute, { cookie: formulator.cookie, query: { is: 'running', q: code } })
    expect(list.body.rows).toEqual([])
  })

  it('is followed and no longer followed', async () => {
    const { code, id } = await running()
    const follow = (isFollowing: boolean) =>
      call(followRoute, { cookie: technician.cookie, method: 'PUT', params: { code }, body: { isFollowing } })
    expect((await follow(true)).status).toBe(200)
    expect((await follow(true)).status).toBe(200)
    const followers = () =>
      t.db.selectFrom('studyFollower').select('personId').where('studyId', '=', id).execute()
    expect(await followers()).toHaveLength(2)
    await follow(false)
    expect(await followers()).toHaveLength(1)
  })

  it('finds a jar by its code in small letters with spaces, and keeps what it weighed at filling', async () => {
    const { code } = await running()
    const { body } = await call(jarsRoute, { cookie: technician.cookie, params: { code } })
    const jar = body.rows[0] as { code: string; version: number }
    const typed = `45·${jar.code.toLowerCase().split('').join(' ')}`
    const found = await call(jarRoute, { cookie: technician.cookie, params: { code: typed } })
    expect(found.body).toMatchObject({ code: jar.code, studyCode: code })
    const fill = (input: Body) =>
      call(fillRoute, { cookie: technician.cookie, method: 'PUT', params: { code: jar.code }, body: input })
    expect((await fill({ version: 1, tareG: 60, grossG: 50, fillHeightMm: 40 })).status).toBe(422)
    expect((await fill({ version: 1, tareG: 60.12, grossG: 90.4, fillHeightMm: 40 })).status).toBe(200)
    expect((await fill({ version: 1, tareG: 60, grossG: 91, fillHeightMm: 40 })).status).toBe(412)
    const nothing = await call(jarRoute, { cookie: technician.cookie, params: { code: 'AAAAA' } })
    expect(nothing.status).toBe(404)
  })
})
