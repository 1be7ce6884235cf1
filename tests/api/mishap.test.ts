import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as day } from '@/app/api/bench/route'
import { POST as mishap } from '@/app/api/jars/[code]/mishaps/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { GET as follows, POST as takePlace } from '@/app/api/pulls/[id]/stand-in/route'
import { GET as sheet } from '@/app/api/studies/[code]/sheet/route'
import type { Bench } from '@/lib/bench/queries/today'
import { newId } from '@/lib/db/id'
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

let t: TestDatabase
let technician: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  study = await benchStudy(t.db, (await t.person('formulator')).actor, 8)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

type What = { kind: string; reason?: string; id?: string; version?: number; isJarAlone?: boolean }
const now = new Date().toISOString()
const note = (
  jar: { code: string; pullJarId: string },
  { kind, reason = 'as told', id = newId(), version = 1, isJarAlone = false }: What,
  key?: string,
) => {
  const pull = isJarAlone ? null : { pullJarId: jar.pullJarId, version }
  return call(mishap, {
    cookie: technician.cookie,
    params: { code: jar.code },
    body: { id, kind, reason, claimedAt: now, deviceNow: now, pull },
    ...(key ? { key } : {}),
  })
}
const send = (jar: { pullJarId: string }, body: unknown) =>
  call(log, { cookie: technician.cookie, params: { id: jar.pullJarId }, body })
const stateOf = async (code: string) =>
  (await t.db.selectFrom('jar').select('state').where('code', '=', code).executeTakeFirstOrThrow()).state
const pullStates = async (code: string) =>
  (
    await t.db
      .selectFrom('pullJar')
      .innerJoin('jar', 'jar.id', 'pullJar.jarId')
      .select('pullJar.state')
      .where('jar.code', '=', code)
      .execute()
  ).map((row) => row.state)

describe('what happens to a jar', () => {
  it('stands on the study sheet: in its cell, and at its station where nothing was asked of the jar', async () => {
    const jar = jarAt(jars, 25, 6)
    expect((await note(jar, { kind: 'broken', reason: 'slipped from the glove' })).status).toBe(200)
    const spare = await t.db
      .selectFrom('jar')
      .innerJoin('studyStation as ss', 'ss.id', 'jar.studyStationId')
      .select('jar.code')
      .where('jar.studyId', '=', study.studyId)
      .where('jar.kind', '=', 'spare')
      .where('ss.temperatureC', '=', 25)
      .executeTakeFirstOrThrow()
    const alone = await note({ ...jar, code: spare.code }, { kind: 'lost', isJarAlone: true })
    expect(alone.status).toBe(200)
    const { body } = await call(sheet, { cookie: technician.cookie, params: { code: study.code } })
    const row = body.shelves[0].rows.find(
      (one: { station: { temperatureC: number } }) => one.station.temperatureC === 25,
    )
    expect(row.station.mishaps).toMatchObject([{ kind: 'lost', code: spare.code }])
    const cell = row.cells.find((one: { weeks: number }) => one.weeks === 6)
    expect(cell.mishaps).toMatchObject([
      { kind: 'broken', code: jar.code, reason: 'slipped from the glove', by: technician.actor.initials },
    ])
  })

  it('R03: is kept with its kind, reason, person and time, on the trail; blank reasons are refused', async () => {
    const jar = jarAt(jars, 5, 1)
    expect((await note(jar, { kind: 'missed', reason: '  ' })).status).toBe(422)
    const answer = await note(jar, { kind: 'missed', reason: 'the oven could not be opened' })
    expect(answer.status).toBe(200)
    const row = await t.db
      .selectFrom('jarMishap')
      .selectAll()
      .where('id', '=', answer.body.id)
      .executeTakeFirstOrThrow()
    expect(row).toMatchObject({
      kind: 'missed',
      pullJarId: jar.pullJarId,
      recordedBy: technician.actor.personId,
    })
    const trail = await t.db
      .selectFrom('trail')
      .select(['tableName', 'reason'])
      .where('requestId', '=', answer.headers.get('x-request-id'))
      .execute()
    expect(trail.map((one) => one.tableName).toSorted()).toEqual(['jar_mishap', 'pull_jar'])
    expect(trail[0]!.reason).toBe('the oven could not be opened')
    const bench: Bench = (await call(day, { cookie: technician.cookie })).body
    const shown = bench.stations.flatMap((one) => one.jars).find((one) => one.pullJarId === jar.pullJarId)
    expect(shown).toMatchObject({
      state: 'missed',
      mishaps: [{ kind: 'missed', by: technician.actor.initials }],
    })
    expect(await stateOf(jar.code)).toBe('stored')
  })

  it('a broken watch jar is lost and missing from its later pulls; one opened by mistake is spent', async () => {
    const broken = jarAt(jars, 25, 4, 'watch')
    const answer = await note(broken, { kind: 'broken', reason: 'fell' })
    expect(answer.body.alsoMissed).toBeGreaterThan(2)
    expect(await stateOf(broken.code)).toBe('lost')
    expect(new Set(await pullStates(broken.code))).toEqual(new Set(['missed']))
    const wrong = jarAt(jars, 5, 12)
    const opened = await note(wrong, { kind: 'wrong jar', reason: 'taken instead of its neighbour' })
    expect(opened.body).toMatchObject({ alsoMissed: 0, pullJarId: wrong.pullJarId })
    expect(await stateOf(wrong.code)).toBe('spent')
    const late = await send(wrong, measured(study, wrong))
    expect(late.body.error.sentence).toContain('opened by mistake: taken instead of its neighbour')
  })

  it('a spare of which nothing is asked can be broken too, once', async () => {
    // At 45 °C the spares are wanted below.
    const spare = await t.db
      .selectFrom('jar')
      .innerJoin('studyStation as ss', 'ss.id', 'jar.studyStationId')
      .select('jar.code')
      .where('jar.studyId', '=', study.studyId)
      .where('jar.kind', '=', 'spare')
      .where('ss.temperatureC', '=', 5)
      .orderBy('jar.code')
      .executeTakeFirstOrThrow()
    const one = { ...spare, pullJarId: '' }
    expect((await note(one, { kind: 'missed', isJarAlone: true })).status).toBe(422)
    expect((await note(one, { kind: 'broken', isJarAlone: true })).body).toMatchObject({ follows: null })
    expect((await note(one, { kind: 'lost', isJarAlone: true })).status).toBe(409)
  })

  it('D05: five times at once it is one entry, with the same answer', async () => {
    const jar = jarAt(jars, 5, 2)
    const id = newId()
    const key = newId()
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => note(jar, { kind: 'lost', reason: 'not found', id }, key)),
    )
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(answers.map((one) => JSON.stringify(one.body))).size).toBe(1)
    // And under another key, as after the device was started anew.
    expect((await note(jar, { kind: 'lost', reason: 'not found', id })).status).toBe(200)
    const rows = await t.db
      .selectFrom('jarMishap')
      .select('id')
      .where('pullJarId', '=', jar.pullJarId)
      .execute()
    expect(rows).toHaveLength(1)
  })

  it('D06: on an older version it is refused with 412', async () => {
    const jar = jarAt(jars, 5, 3)
    const part = measured(study, jar, { torque: null, more: { isPartial: true } })
    expect((await send(jar, part)).status).toBe(200)
    expect((await note(jar, { kind: 'broken' })).status).toBe(412)
    // What was read of it stays on record, so it is no missed jar.
    expect((await note(jar, { kind: 'missed', version: 2 })).status).toBe(409)
    expect((await note(jar, { kind: 'broken', version: 2 })).status).toBe(200)
  })
})

describe('before its window', () => {
  it('a jar is read only with word that it is pulled early, and stands at its real time', async () => {
    const jar = jarAt(jars, 5, 10)
    const now = new Date().toISOString()
    const body = measured(study, jar, { at: now })
    const asked = await send(jar, body)
    expect(asked.status).toBe(409)
    expect(asked.body.error.code).toBe('early')
    expect((await note(jar, { kind: 'pulled early', reason: 'the lab is closed that week' })).status).toBe(
      200,
    )
    const kept = await send(jar, body)
    expect(kept.status).toBe(200)
    expect(Math.abs(Date.parse(kept.body.measuredAt) - Date.parse(now))).toBeLessThan(2000)
    const [reading] = await t.db
      .selectFrom('reading')
      .select('detail')
      .where('pullJarId', '=', jar.pullJarId)
      .execute()
    expect(reading!.detail).toHaveProperty('window')
    // Inside its window no jar is early.
    const due = jarAt(jars, 45, 8)
    expect((await note(due, { kind: 'pulled early' })).status).toBe(409)
  })
})

describe('what follows', () => {
  const ask = (jar: { pullJarId: string }) =>
    call(follows, { cookie: technician.cookie, params: { id: jar.pullJarId } })
  const use = (jar: { pullJarId: string }, jarId: string, id = newId(), key?: string) =>
    call(takePlace, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: { id, jarId },
      ...(key ? { key } : {}),
    })

  it('says what it means for the trend, counting the points that are there', async () => {
    for (const week of [1, 2, 3]) {
      const read = jarAt(jars, 45, week)
      expect((await send(read, measured(study, read))).status).toBe(200)
    }
    const jar = jarAt(jars, 45, 4)
    const { body } = await note(jar, { kind: 'broken', reason: 'fell' })
    // Three pulls and the initial.
    expect(body.follows.sentences).toEqual([
      'Week 4 of pH and viscosity at 45 °C will have no reading; the trends go on with four points.',
    ])
    expect(body.follows.substitutes.map((one: { kind: string }) => one.kind)).toEqual([
      'spare',
      'spare',
      'retain',
    ])
    expect(body.follows.substitutes[0].shelf).toBeGreaterThan(0)
  })

  it('D05: a spare takes the place once, is asked for as that jar was, and is then no spare any more', async () => {
    const jar = jarAt(jars, 45, 4)
    const { body } = await ask(jar)
    const spare = body.substitutes[0]
    const [id, key] = [newId(), newId()]
    const answers = await Promise.all(Array.from({ length: 5 }, () => use(jar, spare.jarId, id, key)))
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect((await use(jar, body.substitutes[1].jarId)).status).toBe(409)
    const bench: Bench = (await call(day, { cookie: technician.cookie })).body
    const shown = bench.stations.flatMap((one) => one.jars).find((one) => one.pullJarId === id)
    expect(shown).toMatchObject({
      code: spare.code,
      asks: 'measuring',
      label: 'week 4',
      standsInFor: jar.code,
      state: 'due',
    })
    const read = await send({ pullJarId: id }, measured(study, jar))
    expect(read.body).toMatchObject({ state: 'done' })
    expect(await stateOf(spare.code)).toBe('spent')
    expect((await ask(jarAt(jars, 45, 6))).body.substitutes).toEqual([])
  })

  it('a retain may take the place; it was not kept there, which is a doubt', async () => {
    const jar = jarAt(jars, 45, 6)
    const { body } = await note(jar, { kind: 'lost', reason: 'not found' })
    const retain = body.follows.substitutes.find((one: { kind: string }) => one.kind === 'retain')
    const id = newId()
    expect((await use(jar, retain.jarId, id)).status).toBe(200)
    const read = await send({ pullJarId: id }, measured(study, jar))
    expect(read.status).toBe(200)
    expect(read.body.readings[0].doubts.map((one: { reason: string }) => one.reason)).toContain('place')
  })

  it('of a watch jar that is gone, another is looked at from then on', async () => {
    const jar = jarAt(jars, 45, 8, 'watch')
    const { body } = await note(jar, { kind: 'broken', reason: 'cracked' })
    expect(body.follows.sentences.at(-1)).toMatch(/missing from \w+ later pulls as well/)
    const spare = body.follows.substitutes[0]
    const id = newId()
    expect((await use(jar, spare.jarId, id)).status).toBe(200)
    expect((await pullStates(spare.code)).length).toBe(1 + body.alsoMissed)
    const looked = await send({ pullJarId: id }, layered(study, jar, 0, 0))
    expect(looked.body).toMatchObject({ state: 'done' })
    expect(await stateOf(spare.code)).toBe('stored')
  })
})
