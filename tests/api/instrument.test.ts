import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as calibrateRoute } from '@/app/api/calibrations/route'
import { GET as listRoute, POST as createRoute } from '@/app/api/instruments/route'
import { GET as getRoute, PUT as changeRoute } from '@/app/api/instruments/[id]/route'
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

async function create(kind: string) {
  count += 1
  const body = { id: newId(), code: `I${count}`, kind, name: `A ${kind}` }
  const answer = await call(createRoute, { cookie: manager.cookie, body })
  expect(answer.status).toBe(200)
  return body
}

const buffers = (slope: number) => ({
  kind: 'meter',
  temperatureC: 25,
  points: [4.01, 7, 10.01].map((bufferPh) => ({ bufferPh, mV: slope * (bufferPh - 7) })),
})

function calibrate(
  instrumentId: string,
  check: unknown,
  more: Record<string, unknown> = {},
  who = technician,
) {
  return call(calibrateRoute, {
    cookie: who.cookie,
    body: {
      id: newId(),
      instrumentId,
      calibratedAt: '2026-03-02T08:00:00Z',
      dueOn: '2026-03-09',
      check,
      ...more,
    },
  })
}

describe('instruments and their calibrations', () => {
  it('judges a meter by its slope against 59.16 mV per pH at 25 °C', async () => {
    const meter = await create('meter')
    const good = await calibrate(meter.id, buffers(-58.6))
    expect(good.body.result).toBe('good')
    // 58.6 / 59.159 = 99.05 %.
    expect(good.body.sentence).toContain('99.1 %')
    const tired = await calibrate(meter.id, buffers(-54))
    expect(tired.body.result).toBe('doubtful')
    const { body } = await call(getRoute, { cookie: technician.cookie, params: { id: meter.id } })
    expect(body.calibrations).toHaveLength(2)
    expect(
      body.calibrations.map(
        (one: { detail: { efficiencyPercent: number } }) => one.detail.efficiencyPercent > 95,
      ),
    ).toEqual([false, true])
  })

  it('judges a viscometer by its check fluid and a balance by its weight', async () => {
    const viscometer = await create('viscometer')
    const fluid = { kind: 'viscometer', spindle: 'disc 4', rpm: 20, fluidMPas: 5000 }
    expect((await calibrate(viscometer.id, { ...fluid, readMPas: 5090 })).body.result).toBe('good')
    expect((await calibrate(viscometer.id, { ...fluid, readMPas: 5150 })).body.result).toBe('doubtful')
    const balance = await create('balance')
    const weight = { kind: 'balance', weightG: 100 }
    expect((await calibrate(balance.id, { ...weight, readG: 100.01 })).body.result).toBe('good')
    expect((await calibrate(balance.id, { ...weight, readG: 99.97 })).body.result).toBe('doubtful')
    const list = await call(listRoute, { cookie: technician.cookie })
    const row = list.body.rows.find((one: { id: string }) => one.id === balance.id)
    expect(row).toMatchObject({ result: 'doubtful', dueOn: '2026-03-09' })
  })

  it('refuses another kind of check, equal buffers, a due date before it and a time to come', async () => {
    const meter = await create('meter')
    expect((await calibrate(meter.id, { kind: 'balance', weightG: 1, readG: 1 })).status).toBe(422)
    const equal = {
      kind: 'meter',
      temperatureC: 25,
      points: [
        { bufferPh: 7, mV: 0 },
        { bufferPh: 7, mV: 1 },
      ],
    }
    expect((await calibrate(meter.id, equal)).status).toBe(422)
    expect((await calibrate(meter.id, buffers(-58.6), { dueOn: '2026-03-01' })).status).toBe(422)
    const future = new Date(Date.now() + 3_600_000).toISOString()
    expect(
      (await calibrate(meter.id, buffers(-58.6), { calibratedAt: future, dueOn: '2099-01-01' })).status,
    ).toBe(422)
    expect((await calibrate(newId(), buffers(-58.6))).status).toBe(404)
  })

  it('R04: the application may not change or delete a calibration', async () => {
    const meter = await create('meter')
    await calibrate(meter.id, buffers(-58.6))
    const { transact } = await import('@/lib/db/transact')
    const change = transact(t.db, technician.actor, {}, (trx) =>
      trx.updateTable('calibration').set({ note: 'better' }).where('instrumentId', '=', meter.id).execute(),
    )
    await expect(change).rejects.toMatchObject({ code: '42501' })
    const removal = transact(t.db, technician.actor, {}, (trx) =>
      trx.deleteFrom('calibration').where('instrumentId', '=', meter.id).execute(),
    )
    await expect(removal).rejects.toMatchObject({ code: '42501' })
  })

  it('D06: the second of two edits gets 412; formulators calibrate nothing', async () => {
    const meter = await create('meter')
    const edit = (name: string) =>
      call(changeRoute, {
        cookie: manager.cookie,
        method: 'PUT',
        params: { id: meter.id },
        body: { version: 1, isActive: true, code: meter.code, kind: 'meter', name, spindles: [] },
      })
    expect((await edit('First')).status).toBe(200)
    expect((await edit('Second')).status).toBe(412)
    const formulator = await t.person('formulator')
    expect((await calibrate(meter.id, buffers(-58.6), {}, formulator)).status).toBe(403)
  })
})
