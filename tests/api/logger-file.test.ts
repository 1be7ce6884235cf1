import { createHash } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { POST as importRoute } from '@/app/api/stations/[id]/logger-files/route'
import { GET as recordRoute } from '@/app/api/stations/[id]/temperatures/route'
import { POST as createRoute } from '@/app/api/stations/route'
import { newId } from '@/lib/db/id'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'

let t: TestDatabase
let manager: Signed
let technician: Signed
let stationId = ''
let count = 0

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  manager = await t.person('manager')
  technician = await t.person('technician', { name: 'Mada Orr' })
})
afterAll(() => t.close())
beforeEach(async () => {
  count += 1
  stationId = newId()
  await call(createRoute, {
    cookie: manager.cookie,
    body: {
      id: stationId,
      name: `Oven ${count}`,
      kind: 'temperature',
      temperatureC: 40,
      lowC: 38,
      highC: 42,
      walkOrder: 1,
      shelves: 2,
      placesPerShelf: 10,
    },
  })
})

function send(
  text: string | Uint8Array,
  fields: Record<string, string> = {},
  who = technician,
  key = newId(),
) {
  const form = new FormData()
  form.set('file', new File([text as BlobPart], 'oven.csv', { type: 'text/csv' }))
  for (const [name, value] of Object.entries({ id: newId(), isTaken: 'true', ...fields }))
    form.set(name, value)
  return call(importRoute, { cookie: who.cookie, params: { id: stationId }, body: form, key })
}

const small =
  'time;°C\n2026-03-02T08:00:00Z;40,1\n2026-03-02T09:00:00Z;43,0\nbroken;40\n2026-03-02T10:00:00Z;40,2\n'
const record = async () =>
  (await call(recordRoute, { cookie: technician.cookie, params: { id: stationId } })).body

describe("a logger's file at a station", () => {
  it('shows first what it would give and takes nothing; taken, it is on record with its SHA-256 and who', async () => {
    const preview = await send(small, { isTaken: 'false' })
    expect(preview.body).toMatchObject({
      isTaken: false,
      freshRows: 3,
      badRows: 1,
      bad: [{ line: 4, why: '"broken" is no date and time.' }],
      minC: 40.1,
      maxC: 43,
      readAs: { delimiter: ';', unit: 'C' },
    })
    expect((await record()).readings).toBe(0)
    expect((await send(small)).body).toMatchObject({ isTaken: true, freshRows: 3 })
    expect(await record()).toMatchObject({ readings: 3, excursions: [{ side: 'above', extremeC: 43 }] })
    const kept = await t.db.selectFrom('loggerFile').selectAll().where('stationId', '=', stationId).execute()
    expect(kept).toMatchObject([
      {
        sha256: createHash('sha256').update(small).digest('hex'),
        takenRows: 3,
        badRows: 1,
        recordedBy: technician.actor.personId,
        originalName: 'oven.csv',
      },
    ])
  })

  it('D05: the same file five times at once, under one key or under five, is taken once', async () => {
    const [id, key] = [newId(), newId()]
    const same = await Promise.all(Array.from({ length: 5 }, () => send(small, { id }, technician, key)))
    expect(same.map((one) => one.status)).toEqual([200, 200, 200, 200, 200])
    const others = await Promise.all(Array.from({ length: 5 }, () => send(small, { id })))
    expect(others.every((one) => one.status === 200)).toBe(true)
    expect((await record()).readings).toBe(3)
    const again = await send(small)
    expect(again.body).toMatchObject({ freshRows: 0, knownRows: 3, before: { by: 'Mada Orr' } })
    expect((await record()).readings).toBe(3)
  })

  it('skips what is there and says where another temperature is on record', async () => {
    await send(small)
    const more = await send('2026-03-02T09:00:00Z;44\n2026-03-02T11:00:00Z;40\n', { isTaken: 'false' })
    expect(more.body).toMatchObject({
      freshRows: 1,
      knownRows: 1,
      otherRows: [{ line: 1, temperatureC: 44, knownC: 43 }],
    })
  })

  it('asks for the order of day and month instead of guessing, and refuses to take it unasked', async () => {
    const text = '03/04/2026 08:00;40\n05/04/2026 08:00;40\n'
    expect((await send(text, { isTaken: 'false' })).body.asks).toBe('order')
    const unasked = await send(text)
    expect(unasked.status).toBe(422)
    expect(unasked.body.error.fields.order).toBeTruthy()
    expect((await send(text, { order: 'day first' })).body.freshRows).toBe(2)
  })

  it.each([
    ['UTF-16', (text: string) => new Uint8Array(Buffer.from(`\uFEFF${text}`, 'utf16le'))],
    ['windows-1252', (text: string) => new Uint8Array(Buffer.from(text, 'latin1'))],
  ])('reads %s', async (_name, encode) => {
    expect((await send(encode(small), { isTaken: 'false' })).body).toMatchObject({ freshRows: 3 })
  })

  it('refuses a picture, a file without readings, formulators and a station that is not there', async () => {
    const png = new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13])
    expect((await send(png)).status).toBe(415)
    expect((await send('hello;world\n')).status).toBe(422)
    expect((await send(small, {}, await t.person('formulator'))).status).toBe(403)
    stationId = newId()
    expect((await send(small)).status).toBe(404)
  })

  it('takes 50,000 rows in one go', async () => {
    const begun = Date.UTC(2026, 0, 1)
    const rows = Array.from(
      { length: 50_000 },
      (_, i) => `${new Date(begun + i * 300_000).toISOString()},${(40 + (i % 11) / 10).toFixed(1)}`,
    )
    const started = performance.now()
    const answer = await send(`time,temperature\n${rows.join('\n')}\n`)
    const seconds = (performance.now() - started) / 1000
    console.log(`50,000 rows taken in ${seconds.toFixed(1)} s`)
    expect(answer.body).toMatchObject({ isTaken: true, freshRows: 50_000, badRows: 0 })
    expect(seconds).toBeLessThan(30)
    const trail = await t.db
      .selectFrom('trail')
      .select((eb) => eb.fn.countAll<number>().as('rows'))
      .where('tableName', '=', 'station_temperature')
      .executeTakeFirstOrThrow()
    expect(trail.rows).toBeGreaterThanOrEqual(50_000)
  }, 60_000)
})
