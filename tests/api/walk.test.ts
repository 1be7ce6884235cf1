import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as day } from '@/app/api/bench/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import type { Bench } from '@/lib/bench/queries/today'
import { newId } from '@/lib/db/id'
import {
  askedJars,
  benchStudy,
  jarAt,
  measured,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let technician: Signed
let second: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  second = await t.person('technician')
  study = await benchStudy(t.db, (await t.person('formulator')).actor, 12)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

const send = (jar: AskedJar, body: unknown, who = technician, key?: string) =>
  call(log, { cookie: who.cookie, params: { id: jar.pullJarId }, body, ...(key ? { key } : {}) })
const partly = (jar: AskedJar, values: { ph?: string | null; torque?: string | null }) =>
  measured(study, jar, { ...values, more: { isPartial: true } })
const rowsOf = (jar: AskedJar) =>
  t.db
    .selectFrom('reading')
    .select(['id', 'attribute', 'typed', 'isVoid', 'supersedesId', 'detail', 'measuredAt', 'claimedAt'])
    .where('pullJarId', '=', jar.pullJarId)
    .orderBy('recordedAt')
    .orderBy('id')
    .execute()
const jarState = async (jar: AskedJar) =>
  (await t.db.selectFrom('jar').select('state').where('code', '=', jar.code).executeTakeFirstOrThrow()).state

describe('one attribute at a time', () => {
  it('keeps a part, leaves the jar open in that hand, and closes it by itself when the rest is read', async () => {
    const jar = jarAt(jars, 5, 1)
    const first = await send(jar, partly(jar, { torque: null }))
    expect(first.body).toMatchObject({ state: 'due', missing: ['viscosity'] })
    expect(await jarState(jar)).toBe('stored')
    const bench: Bench = (await call(day, { cookie: second.cookie })).body
    const shown = bench.stations.flatMap((one) => one.jars).find((one) => one.pullJarId === jar.pullJarId)
    expect(shown).toMatchObject({
      state: 'due',
      read: ['ph'],
      openedBy: { name: technician.actor.name },
    })
    // Typed before the answer to the first was there: the version is the old one.
    const rest = await send(jar, partly(jar, { ph: null }))
    expect(rest.body).toMatchObject({ state: 'done', missing: [] })
    expect(await jarState(jar)).toBe('spent')
  })

  it('asks for what is missing only at the closing save, and remembers what was left out', async () => {
    const jar = jarAt(jars, 5, 2)
    const part = partly(jar, { torque: null })
    expect((await send(jar, part)).status).toBe(200)
    const closing = { ...part, isPartial: false, readings: [] }
    const asked = await send(jar, closing)
    expect(asked.status).toBe(409)
    expect(Object.keys(asked.body.error.fields)).toEqual(['missing.viscosity'])
    const left = await send(jar, { ...closing, leaveOut: ['viscosity'] })
    expect(left.body).toMatchObject({ state: 'done' })
    const { leftOut } = await t.db
      .selectFrom('pullJar')
      .select('leftOut')
      .where('id', '=', jar.pullJarId)
      .executeTakeFirstOrThrow()
    expect(leftOut).toEqual(['viscosity'])
  })

  it('D05: a part five times at once, and again with the rest, is there once', async () => {
    const jar = jarAt(jars, 5, 3)
    const part = partly(jar, { torque: null })
    const key = newId()
    const answers = await Promise.all(Array.from({ length: 5 }, () => send(jar, part, technician, key)))
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    // A second screen sends the first part once more together with the rest.
    const rest = measured(study, jar, { ph: null })
    const whole = { ...rest, readings: [...part.readings, ...rest.readings] }
    expect((await send(jar, whole)).body).toMatchObject({ state: 'done' })
    expect((await send(jar, whole)).status).toBe(200)
    expect((await rowsOf(jar)).map((row) => row.attribute)).toEqual(['ph', 'viscosity'])
  })

  it('an entry that is on record is not silently taken with other letters', async () => {
    const jar = jarAt(jars, 5, 4)
    const part = partly(jar, { torque: null })
    await send(jar, part)
    const other = { ...part, readings: part.readings.map((one) => ({ ...one, typed: '5.61' })) }
    const refused = await send(jar, other)
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toContain('"5.50"')
    expect(await rowsOf(jar)).toHaveLength(1)
  })

  it('the same attribute by a second person is asked about; both stay, one counts', async () => {
    const jar = jarAt(jars, 5, 6)
    await send(jar, partly(jar, { torque: null }))
    const mine = partly(jar, { ph: '5.47', torque: null })
    const told = await send(jar, mine, second)
    expect(told.body.error).toMatchObject({
      code: 'already read',
      detail: { by: { name: technician.actor.name } },
    })
    const counts = { resolution: { count: 'mine', reason: 'the meter was not calibrated' } }
    const kept = await send(jar, { ...mine, version: told.body.error.detail.version, ...counts }, second)
    expect(kept.body).toMatchObject({ state: 'due', missing: ['viscosity'] })
    const rows = await rowsOf(jar)
    expect(rows.map((row) => row.typed)).toEqual(['5.50', '5.47'])
    expect(rows[1]!.supersedesId).toBe(rows[0]!.id)
    // The first one's closing save does not slip past what the second did.
    const late = await send(jar, measured(study, jar, { ph: null }))
    expect(late.status).toBe(412)
  })

  it('refuses a closing save of a jar of which nothing was read', async () => {
    const jar = jarAt(jars, 5, 8)
    const answer = await send(jar, { ...measured(study, jar, { ph: null, torque: null }), readings: [] })
    expect(answer.status).toBe(422)
    expect(answer.body.error.sentence).toMatch(/nothing to keep/)
  })

  it('takes at most 15 statements', async () => {
    const jar = jarAt(jars, 25, 1)
    const part = await countStatements(() => send(jar, partly(jar, { torque: null })))
    expect(part.count, part.texts.join('\n')).toBeLessThanOrEqual(15)
  })
})

describe('from paper', () => {
  it('keeps the time that stands on the paper beside the server’s, marked, and corrects no clock by it', async () => {
    const jar = jarAt(jars, 25, 2)
    const at = new Date(Date.parse(study.startedAt) + 2 * 604_800_000 + 3_600_000).toISOString()
    // A tablet two days off changes nothing in what somebody wrote down.
    const deviceNow = new Date(Date.now() + 2 * 86_400_000).toISOString()
    const answer = await send(jar, measured(study, jar, { at, more: { isFromPaper: true, deviceNow } }))
    expect(answer.body).toMatchObject({ state: 'done', measuredAt: at })
    const [row] = await rowsOf(jar)
    expect(row).toMatchObject({ detail: { isFromPaper: true } })
    expect(new Date(row!.measuredAt).toISOString()).toBe(at)
    expect(new Date(row!.claimedAt!).toISOString()).toBe(at)
  })

  it('R06: refuses a time ahead of now and one before the study', async () => {
    const jar = jarAt(jars, 25, 3)
    const ahead = new Date(Date.now() + 3_600_000).toISOString()
    const before = new Date(Date.parse(study.startedAt) - 3_600_000).toISOString()
    for (const at of [ahead, before]) {
      const answer = await send(jar, measured(study, jar, { at, more: { isFromPaper: true } }))
      expect(answer.status).toBe(422)
      expect(answer.body.error.fields.claimedAt).toBeTruthy()
    }
    expect(await rowsOf(jar)).toEqual([])
  })
})
