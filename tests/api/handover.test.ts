import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as bench } from '@/app/api/bench/route'
import { GET as oneDay } from '@/app/api/days/[day]/route'
import { POST as review } from '@/app/api/days/[day]/reviews/route'
import { GET as days } from '@/app/api/days/route'
import { POST as readNote } from '@/app/api/handovers/[id]/read/route'
import { POST as writeNote } from '@/app/api/handovers/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
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

let t: TestDatabase
let technician: Signed
let second: Signed
let formulator: Signed
let qa: Signed
let both: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  second = await t.person('technician')
  formulator = await t.person('formulator')
  qa = await t.person('qa')
  both = await t.person(['technician', 'qa'])
  study = await benchStudy(t.db, formulator.actor, 8)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

describe('notes for the next shift', () => {
  const now = new Date().toISOString()
  const write = (id: string, text: string, who = technician, key?: string) =>
    call(writeNote, {
      cookie: who.cookie,
      body: { id, text, claimedAt: now, deviceNow: now },
      ...(key ? { key } : {}),
    })
  const read = (id: string, who: Signed, key?: string) =>
    call(readNote, {
      cookie: who.cookie,
      params: { id },
      body: { id: newId() },
      ...(key ? { key } : {}),
    })
  const notes = async () => (await call(bench, { cookie: second.cookie })).body.notes

  it('D05: five sends leave one note, shown on the Bench until somebody has read it', async () => {
    const [id, key] = [newId(), newId()]
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => write(id, 'Oven 3 runs warm.', technician, key)),
    )
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect((await write(id, 'Oven 3 runs warm.')).status).toBe(200)
    expect((await write(id, 'Something else.')).status).toBe(409)
    expect(await notes()).toMatchObject([
      { id, text: 'Oven 3 runs warm.', by: technician.actor.name, readAt: null },
    ])

    const read5 = await Promise.all(Array.from({ length: 5 }, () => read(id, second)))
    expect(read5.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(read5.map((one) => one.body.id)).size).toBe(1)
    // Who comes later changes nothing in who had read it.
    expect((await read(id, formulator)).body.readBy).toBe(second.actor.name)
    expect(await notes()).toMatchObject([{ id, readBy: second.actor.name }])
  })

  it('refuses an empty note, one by QA, and reading a note that is none', async () => {
    expect((await write(newId(), '   ')).status).toBe(422)
    expect((await write(newId(), 'Hello', qa)).status).toBe(403)
    expect((await read(newId(), second)).status).toBe(404)
  })
})

describe("a day's review", () => {
  const markDay = (day: string, entryIds: string[], who = qa, id = newId(), key?: string) =>
    call(review, {
      cookie: who.cookie,
      params: { day },
      body: { id, entryIds, remark: 'seen' },
      ...(key ? { key } : {}),
    })
  const dayOf = async (day: string, who = qa) =>
    (await call(oneDay, { cookie: who.cookie, params: { day } })).body
  const logNow = async (jar: AskedJar, who = technician) => {
    const answer = await call(log, {
      cookie: who.cookie,
      params: { id: jar.pullJarId },
      body: measured(study, jar),
    })
    expect(answer.status).toBe(200)
    return { day: answer.body.measuredAt as string, readings: answer.body.readings as { id: string }[] }
  }
  const newest = async () => (await call(days, { cookie: qa.cookie })).body

  it('is refused to whoever logged that day, to other roles, and for what was not on the page', async () => {
    await logNow(jarAt(jars, 5, 1))
    await logNow(jarAt(jars, 25, 1), both)
    const [{ day, readings, by, reviewedBy, unseen }] = await newest()
    expect({ readings, reviewedBy, unseen }).toEqual({ readings: 4, reviewedBy: null, unseen: 4 })
    expect(by.map((one: { name: string }) => one.name)).toContain(technician.actor.name)
    const { entryIds } = await dayOf(day)
    const own = await markDay(day, entryIds, both)
    expect(own.status).toBe(403)
    expect(own.body.error.sentence).toMatch(/yourself/)
    expect((await markDay(day, entryIds, formulator)).status).toBe(403)
    const partial = await markDay(day, entryIds.slice(1))
    expect(partial.status).toBe(412)
    expect((await dayOf(day)).reviews).toEqual([])
  })

  it('D05: is kept once; what is entered or corrected after it asks for a new one', async () => {
    const [{ day }] = await newest()
    const { entryIds, readings } = await dayOf(day)
    const [id, key] = [newId(), newId()]
    const answers = await Promise.all(Array.from({ length: 5 }, () => markDay(day, entryIds, qa, id, key)))
    expect(answers.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    expect(await dayOf(day)).toMatchObject({
      unseenIds: [],
      reviews: [{ id, by: qa.actor.name, remark: 'seen' }],
    })
    // Nothing new: a second look is not asked for.
    expect((await markDay(day, entryIds)).status).toBe(409)

    const ph = readings.find((one: { attribute: string }) => one.attribute === 'ph')
    const correctionId = newId()
    const corrected = await call(correct, {
      cookie: formulator.cookie,
      params: { id: ph.id },
      body: { id: correctionId, typed: '5.52', isConfirmed: true, reason: 'misread' },
    })
    expect(corrected.status).toBe(200)
    const after = await dayOf(day)
    expect(after.unseenIds).toEqual([correctionId])
    // The old value stays beside the new one.
    expect(after.readings.filter((one: { attribute: string }) => one.attribute === 'ph').length).toBe(3)
    expect((await newest())[0]).toMatchObject({ unseen: 1, changed: 1, reviewedBy: qa.actor.name })
    expect((await markDay(day, after.entryIds)).status).toBe(200)
    expect((await dayOf(day)).reviews).toHaveLength(2)
  })
})
