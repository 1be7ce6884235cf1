import { sql } from 'kysely'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { GET as list, POST as log } from '@/app/api/cycles/route'
import { POST as read } from '@/app/api/pulls/[id]/readings/route'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, layered, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let technician: Signed
let qa: Signed
let study: BenchStudy
let [frozenId, warmId] = ['', '']

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  qa = await t.person('qa')
  const formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 4)
  const stations = await t.db
    .selectFrom('studyStation')
    .select(['id', 'temperatureC', 'stationId'])
    .where('studyId', '=', study.studyId)
    .execute()
  const frozen = stations.find((station) => station.temperatureC === 5)!
  frozenId = frozen.id
  warmId = stations.find((station) => station.temperatureC === 45)!.id
  // The fridge becomes a freeze-thaw station: what is tried here is the cycles, not the protocol.
  await t.owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${formulator.actor.personId}, true)`.execute(trx)
    await trx.updateTable('studyStation').set({ isFreezeThaw: true }).where('id', '=', frozenId).execute()
    await trx
      .updateTable('station')
      .set({ cycleLowC: -10, cycleHighC: 25 })
      .where('id', '=', frozen.stationId)
      .execute()
  })
})
afterAll(() => t.close())

const hoursAgo = (hours: number) => new Date(Date.now() - hours * 3_600_000).toISOString()
// Three hours each, one after the other, so that no two overlap.
const half = ({ cycle = 1, half: name = 'cold', ...more }: Record<string, unknown> = {}) => {
  const begun = 40 - 8 * Number(cycle) - (name === 'warm' ? 4 : 0)
  return {
    ...{ id: newId(), studyStationId: frozenId, cycle, half: name },
    ...{ begunAt: hoursAgo(begun), endedAt: hoursAgo(begun - 3), reachedC: -10.5, isFrozenThrough: true },
    ...more,
  }
}
const send = (body: object, cookie = technician.cookie) => call(log, { cookie, body })

it('keeps each half once and lists them in order', async () => {
  const cold = half()
  expect((await send(cold)).status).toBe(200)
  expect((await send(cold)).status).toBe(200)
  expect((await send(half({ half: 'warm', reachedC: 25, isFrozenThrough: null }))).status).toBe(200)
  const rows = await call(list, { cookie: qa.cookie, query: { studyStation: frozenId } })
  expect(rows.body.map((row: { half: string }) => row.half)).toEqual(['cold', 'warm'])
  expect(rows.body[0]).toMatchObject({
    reachedC: -10.5,
    isFrozenThrough: true,
    recordedBy: technician.actor.initials,
  })
})

it('the same half of five people at once is kept once', async () => {
  const answers = await Promise.all(Array.from({ length: 5 }, () => send(half({ cycle: 2 }))))
  expect(answers.map((answer) => answer.status).toSorted()).toEqual([200, 409, 409, 409, 409])
})

it.each([
  ['an end before its beginning', { endedAt: hoursAgo(35) }, 422],
  ['an end that lies ahead', { endedAt: hoursAgo(-1) }, 422],
  ['cycle 0', { cycle: 0 }, 422],
  ['a beginning before the half before it ended', { begunAt: hoursAgo(22) }, 422],
  ['a half before its turn', { cycle: 3 }, 409],
  ['a cycle that the study does not have', { cycle: 90 }, 409],
  ['more hours held than it lasted', { heldHours: 4, heldReason: 'weekend' }, 422],
  ['a hold without a reason', { heldHours: 1 }, 422],
  ['a temperature that is none', { reachedC: 'cold' }, 422],
  ['a station that is not there', { studyStationId: newId() }, 404],
])('refuses %s', async (_name, more, status) => {
  expect((await send(half({ cycle: 2, half: 'warm', ...more }))).status).toBe(status)
})

it('refuses cycles at a station that has none, and QA', async () => {
  expect((await send(half({ studyStationId: warmId }))).status).toBe(404)
  expect((await send(half(), qa.cookie)).status).toBe(403)
})

it('a cycle cut short is a doubt on the readings after it', async () => {
  await send(half({ cycle: 2, half: 'warm', reachedC: 25 }))
  const short = half({ cycle: 3, isFrozenThrough: false })
  const asked = await send(short)
  expect(asked.status).toBe(409)
  expect(asked.body.error.sentence).toMatch(
    /^The jars were not frozen through\. Readings taken after it carry a doubt then/,
  )
  expect((await send({ ...short, isConfirmed: true })).status).toBe(200)
  const readAt = async (week: number, more: object) => {
    const jar = jarAt(await askedJars(t.db, study.studyId), 5, week, 'watch')
    const body = { ...layered(study, jar, 0, 0), ...more }
    return call(read, { cookie: technician.cookie, params: { id: jar.pullJarId }, body })
  }
  // Told late, from paper: it was read before that half.
  const before = await readAt(2, { isFromPaper: true })
  expect(before.body.readings[0].doubts).toEqual([])
  const kept = await readAt(3, { claimedAt: new Date().toISOString() })
  expect(kept.body.readings[0].doubts).toMatchObject([
    { reason: 'cycle', sentence: expect.stringMatching(/Cycle 3/) },
  ])
  expect(kept.body.raised).toMatchObject([{ rule: 'cycle', level: 'doubt' }])
})
