import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as listRoute, POST as createRoute } from '@/app/api/stations/route'
import { PUT as changeRoute } from '@/app/api/stations/[id]/route'
import { GET as recordRoute, POST as logRoute } from '@/app/api/stations/[id]/temperatures/route'
import { newId } from '@/lib/db/id'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'

let t: TestDatabase
let manager: Signed
let technician: Signed
let count = 0

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  manager = await t.person('manager', { name: 'Maja Oden' })
  technician = await t.person('technician')
})
afterAll(() => t.close())

const oven = {
  kind: 'temperature',
  temperatureC: 40,
  lowC: 38,
  highC: 42,
  walkOrder: 3,
  shelves: 2,
  placesPerShelf: 10,
  caution: 'Hot shelves: gloves.',
}

async function create(more: Record<string, unknown> = {}) {
  count += 1
  const body = { ...oven, id: newId(), name: `Oven ${count}`, ...more }
  return { body, answer: await call(createRoute, { cookie: manager.cookie, body }) }
}

function log(id: string, readings: [string, number][], who = technician) {
  return call(logRoute, {
    cookie: who.cookie,
    params: { id },
    body: {
      readings: readings.map(([measuredAt, temperatureC]) => ({ id: newId(), measuredAt, temperatureC })),
    },
  })
}

describe('stations', () => {
  it('is made by a manager, once, with its own name', async () => {
    const { body, answer } = await create()
    expect(answer.status).toBe(200)
    const again = await call(createRoute, { cookie: manager.cookie, body })
    expect(again.status).toBe(200)
    const twin = await create({ name: body.name })
    expect(twin.answer.status).toBe(422)
    expect((await call(createRoute, { cookie: technician.cookie, body })).status).toBe(403)
    const list = await call(listRoute, { cookie: technician.cookie })
    expect(list.body.rows.filter((row: { name: string }) => row.name === body.name)).toHaveLength(1)
  })

  it('refuses limits that make no sense, each at its field', async () => {
    const turned = await create({ lowC: 42, highC: 38 })
    expect(turned.answer.status).toBe(422)
    expect(Object.keys(turned.answer.body.error.fields)).toContain('highC')
    const nowhere = await create({ temperatureC: null })
    expect(nowhere.answer.status).toBe(422)
    const halfCycle = await create({
      kind: 'freeze-thaw',
      temperatureC: null,
      lowC: null,
      highC: null,
      cycleLowC: -10,
    })
    expect(halfCycle.answer.status).toBe(422)
  })

  it('D06: the second of two edits gets 412 with who and what', async () => {
    const { body } = await create()
    const edit = (caution: string) =>
      call(changeRoute, {
        cookie: manager.cookie,
        method: 'PUT',
        params: { id: body.id },
        body: { ...oven, name: body.name, isActive: true, version: 1, caution },
      })
    expect((await edit('First')).status).toBe(200)
    const second = await edit('Second')
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain('Maja Oden')
  })

  it('records excursions and a mean kinetic temperature above the plain mean', async () => {
    const { body } = await create()
    const day = (hours: number) =>
      new Date(Date.parse('2026-03-02T00:00:00Z') + hours * 3_600_000).toISOString()
    const answer = await log(body.id, [
      [day(0), 40],
      [day(6), 40.2],
      [day(12), 46],
      [day(18), 47.5],
      [day(24), 40],
      [day(30), 37],
    ])
    expect(answer.body).toEqual({ logged: 6 })
    const { body: record } = await call(recordRoute, { cookie: technician.cookie, params: { id: body.id } })
    expect(record.excursions).toMatchObject([
      { side: 'above', extremeC: 47.5, hours: 12, from: day(12), to: day(24) },
      { side: 'below', extremeC: 37 },
    ])
    expect(record).toMatchObject({ readings: 6, minC: 37, maxC: 47.5 })
    // Weights 3, 6, 6, 6, 6, 3 h: (120 + 241.2 + 276 + 285 + 240 + 111) / 30 = 42.44.
    expect(record.meanC).toBeCloseTo(42.44, 6)
    expect(record.mktC).toBeGreaterThan(record.meanC)
    expect(record.mktC).toBeLessThan(47.5)
  })

  it('takes a temperature once and none from the future', async () => {
    const { body } = await create()
    const reading = { id: newId(), measuredAt: '2026-03-02T08:00:00Z', temperatureC: 40.1 }
    const send = () =>
      call(logRoute, { cookie: technician.cookie, params: { id: body.id }, body: { readings: [reading] } })
    expect((await send()).body).toEqual({ logged: 1 })
    expect((await send()).body).toEqual({ logged: 0 })
    const late = await log(body.id, [[new Date(Date.now() + 3_600_000).toISOString(), 40]])
    expect(late.status).toBe(422)
    expect((await log(body.id, [['2026-03-02T08:00:00Z', -300]])).status).toBe(422)
    const qa = await t.person('qa')
    expect((await log(body.id, [['2026-03-02T08:00:00Z', 40]], qa)).status).toBe(403)
  })
})
