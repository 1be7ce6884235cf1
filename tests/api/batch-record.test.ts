import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sql } from 'kysely'
import { POST as MAKE } from '@/app/api/batches/route'
import { GET } from '@/app/api/batches/[code]/route'
import { POST as FILL } from '@/app/api/batches/[code]/fills/route'
import { POST as FINISH } from '@/app/api/batches/[code]/finish/route'
import { POST as PHOTO } from '@/app/api/batches/[code]/photos/route'
import { GET as ORIGINAL } from '@/app/api/batches/[code]/photos/[id]/original/route'
import { GET as FORMULA } from '@/app/api/formulas/[code]/route'
import { POST as READ } from '@/app/api/batches/[code]/readings/route'
import { PUT as STEP } from '@/app/api/batches/[code]/steps/route'
import { PUT as WEIGH } from '@/app/api/batches/[code]/weighings/route'
import { POST as CREATE_FORMULA } from '@/app/api/formulas/route'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { toleranceWords } from '@/lib/batch/rules/weighing'
import { getBatch, type BatchPage } from '@/lib/batch/queries/get-batch'
import { newId } from '@/lib/db/id'
import type { Route } from '@/lib/http/route'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { makeProtocol } from '../support/running-study'
import { countStatements } from '../support/statements'

let t: TestDatabase
let lena: Signed
let rolf: Signed
const balance = newId()
const viscometer = newId()

let folder: string

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'stillstand-batch-photos-'))
  process.env['STILLSTAND_FILES'] = folder
  t = await testDatabase()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  rolf = await t.person('formulator', { name: 'Rolf Adler' })
  await asLena(async (trx) => {
    await trx
      .insertInto('instrument')
      .values([
        { id: balance, code: 'B9', kind: 'balance', name: 'Bench balance', spindles: '[]' },
        {
          ...{ id: viscometer, code: 'V9', kind: 'viscometer', name: 'Viscometer' },
          spindles: JSON.stringify([{ name: 'T-bar C', constant: 10_000 }]),
        },
      ])
      .execute()
  })
})
afterAll(async () => {
  await t.close()
  await rm(folder, { recursive: true, force: true })
})

type OwnerTrx = Parameters<Parameters<ReturnType<TestDatabase['owner']['transaction']>['execute']>[0]>[0]
const asLena = (work: (trx: OwnerTrx) => Promise<unknown>) =>
  t.owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${lena.actor.personId}, true)`.execute(trx)
    await work(trx)
  })

async function newBatch(code: string, lineCount = 2, more: object = {}) {
  const lines = Array.from({ length: lineCount }, (_, index) => ({
    ...{ id: newId(), phase: index ? 'B' : 'A', inciName: index ? `Aqua ${index}` : 'Squalane' },
    ...{ percentThousandths: 100_000 / lineCount, density: 1, isInternal: index > 0 },
  }))
  const steps = [
    {
      id: newId(),
      phase: 'B into A',
      instruction: 'Add slowly',
      speedRpm: 300,
      minutes: 44,
      temperatureC: 25,
    },
  ]
  const versionId = newId()
  const formula = { id: newId(), versionId, code, name: 'Cream', emulsionType: 'water-in-oil', lines, steps }
  expect((await call(CREATE_FORMULA, { cookie: lena.cookie, body: formula })).status).toBe(200)
  const body = { id: newId(), formulaVersionId: versionId, sizeG: 1000, ...more }
  const made = await call(MAKE, { cookie: lena.cookie, body })
  expect(made.status, JSON.stringify(made.body)).toBe(200)
  return made.body.code as string
}
const load = async (code: string): Promise<BatchPage> =>
  (await call(GET, { cookie: lena.cookie, params: { code } })).body
const put = (route: Route, code: string, body: unknown, who = lena) =>
  call(route, { cookie: who.cookie, params: { code }, body })

async function resting(code: string, hours: number) {
  const batch = await newBatch(code)
  const { weighings, steps } = await load(batch)
  for (const { id, targetG } of weighings) {
    const body = { id: newId(), weighingId: id, version: 1, actualTyped: String(targetG) }
    expect((await put(WEIGH, batch, body)).status).toBe(200)
  }
  for (const { id } of steps)
    expect((await put(STEP, batch, { id: newId(), stepId: id, version: 1 })).status).toBe(200)
  expect((await put(FINISH, batch, { version: 1, yieldG: 980 })).status).toBe(200)
  await asLena((trx) =>
    sql`update batch set made_at = now() - ${`${hours} hours`}::interval where code = ${batch}`.execute(trx),
  )
  return batch
}

describe('sub-weighings', () => {
  it('add up, each with its tare, lot and balance; the line is kept with the last', async () => {
    const batch = await newBatch('P1')
    const line = (await load(batch)).weighings[0]!
    const first = {
      ...{ id: newId(), weighingId: line.id, version: 1, isLast: false, balanceId: balance },
      ...{ actualTyped: '332,5', tareTyped: '32.4', lot: 'K-1' },
    }
    const begun = await put(WEIGH, batch, first)
    expect(begun.body).toMatchObject({ version: 2, actualG: null, totalG: 300.1 })
    const rest = {
      ...first,
      id: newId(),
      version: 2,
      isLast: true,
      actualTyped: '200',
      tareTyped: '',
      lot: 'K-2',
    }
    expect((await put(WEIGH, batch, rest)).body).toMatchObject({ actualG: 500.1, isWithin: true })
    const kept = (await load(batch)).weighings[0]!
    expect(kept).toMatchObject({ lot: 'K-1, K-2', balance: 'B9' })
    expect(kept.portions.map(({ netG, isLast }) => [netG, isLast])).toEqual([
      [300.1, false],
      [200, true],
    ])
    expect(kept.portions[0]!.balanceDoubt).toBe('B9 has no check on record.')
  })

  it('D05: a portion sent twice, even at the same moment, is kept once', async () => {
    const batch = await newBatch('P2')
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '500' }
    const both = await Promise.all([put(WEIGH, batch, body), put(WEIGH, batch, body)])
    expect(both.map((answer) => answer.status)).toEqual([200, 200])
    expect((await put(WEIGH, batch, body)).body).toMatchObject({ version: 2, actualG: 500 })
    expect((await load(batch)).weighings[0]!.portions).toHaveLength(1)
  })

  it('R03: a correction supersedes a portion with a reason, once; nothing left opens the line again', async () => {
    const batch = await newBatch('P3')
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '500' }
    expect((await put(WEIGH, batch, body)).status).toBe(200)
    const none = { ...body, id: newId(), version: 2, actualTyped: '0', supersedes: body.id }
    expect((await put(WEIGH, batch, none)).body.error.fields.reason).toBeTruthy()
    expect((await put(WEIGH, batch, { ...none, reason: 'Went into the wrong vessel' })).body).toMatchObject({
      actualG: null,
    })
    const twice = { ...none, id: newId(), version: 3, reason: 'Again' }
    expect((await put(WEIGH, batch, twice)).status).toBe(409)
    expect((await put(WEIGH, batch, { ...twice, supersedes: newId() })).status).toBe(409)
    await expect(
      sql`update batch_portion set net_g = 1`.execute(t.owner),
      'append-only in the database itself',
    ).rejects.toThrow()
  })

  it('refuse a tare that leaves nothing, a foreign instrument and a time before the batch', async () => {
    const batch = await newBatch('P4')
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '500' }
    expect((await put(WEIGH, batch, { ...body, tareTyped: '501' })).body.error.fields.tareTyped).toBeTruthy()
    expect((await put(WEIGH, batch, { ...body, tareTyped: 'pot' })).body.error.fields.tareTyped).toBeTruthy()
    for (const balanceId of [viscometer, newId()]) {
      expect((await put(WEIGH, batch, { ...body, balanceId })).body.error.fields.balanceId).toBeTruthy()
    }
    const old = { claimedAt: '2020-01-01T08:00:00Z', deviceNow: new Date().toISOString(), isFromPaper: true }
    expect((await put(WEIGH, batch, { ...body, ...old })).body.error.fields.claimedAt).toContain(
      'begun later',
    )
    expect((await put(WEIGH, batch, { ...body, claimedAt: 'noon' })).status).toBe(422)
  })

  it('R06: what is typed from paper keeps the time it was done beside the time it was typed', async () => {
    const batch = await newBatch('P5')
    await asLena((trx) =>
      sql`update batch set created_at = now() - interval '2 days' where code = ${batch}`.execute(trx),
    )
    const line = (await load(batch)).weighings[0]!
    const done = Date.now() - 86_400_000
    const answer = await put(WEIGH, batch, {
      ...{ id: newId(), weighingId: line.id, version: 1, actualTyped: '500', isFromPaper: true },
      ...{ claimedAt: new Date(done).toISOString(), deviceNow: new Date().toISOString() },
    })
    expect(answer.status).toBe(200)
    const portion = (await load(batch)).weighings[0]!.portions[0]!
    expect(portion.isFromPaper).toBe(true)
    expect(Math.abs(Date.parse(portion.weighedAt) - done)).toBeLessThan(5_000)
    expect(Math.abs(Date.parse(portion.recordedAt) - Date.now())).toBeLessThan(60_000)
  })

  it('go by the batch’s own tolerance', async () => {
    const batch = await newBatch('P6', 2, { tolerancePercent: 2 })
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '510' }
    expect((await put(WEIGH, batch, body)).body).toMatchObject({ isWithin: true })
    const usual = await newBatch('P7')
    const other = {
      ...body,
      id: newId(),
      weighingId: (await load(usual)).weighings[0]!.id,
      actualTyped: '505.1',
    }
    expect((await put(WEIGH, usual, other)).body.error.sentence).toContain('more than 1 %')
  })

  it('go by the narrowest tolerance of the protocols that the batch was sized for, unless one was typed', async () => {
    const plan = readyMadePlan('screen', 'cream')
    const wide = await makeProtocol(lena.actor, { ...plan, weighingTolerancePercent: 2 })
    const narrow = await makeProtocol(lena.actor, { ...plan, weighingTolerancePercent: 0.5 })
    const silent = await makeProtocol(lena.actor, plan)
    const batch = await newBatch('P9', 2, { protocolVersionIds: [silent, wide, narrow] })
    const page = await load(batch)
    expect(page).toMatchObject({ tolerancePercent: 0.5, protocolTolerancePercent: 0.5 })
    expect(page.protocolCode).toMatch(/^P-/)
    expect(toleranceWords(page)).toBe('0.5 % as A screen asks')
    const line = page.weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '503' }
    expect((await put(WEIGH, batch, body)).body.error.sentence).toContain('more than 0.5 %')
    // Typed at the sizing it counts before the protocol's; where a protocol says nothing, the lab's does.
    const typed = await newBatch('P10', 2, { protocolVersionIds: [narrow], tolerancePercent: 3 })
    expect(toleranceWords(await load(typed))).toBe('3 %')
    expect(await load(await newBatch('P11', 2, { protocolVersionIds: [silent] }))).toMatchObject({
      tolerancePercent: 1,
    })
    const versionId = newId()
    const gone = { id: newId(), formulaVersionId: versionId, sizeG: 1000, protocolVersionIds: [newId()] }
    expect((await call(MAKE, { cookie: lena.cookie, body: gone })).status).toBe(404)
  })

  it('a sheet of forty lines with portions is read in at most eight statements', async () => {
    const batch = await newBatch('P8', 40)
    for (const { id } of (await load(batch)).weighings.slice(0, 10)) {
      const body = { weighingId: id, actualTyped: '12.5' }
      expect((await put(WEIGH, batch, { ...body, id: newId(), version: 1, isLast: false })).status).toBe(200)
      expect((await put(WEIGH, batch, { ...body, id: newId(), version: 2 })).status).toBe(200)
    }
    const { count } = await countStatements(() => getBatch(t.db, lena.actor, batch))
    expect(count).toBeLessThanOrEqual(8)
  })
})

describe('the process', () => {
  it('begins and ends by one press each, in that order, once', async () => {
    const batch = await newBatch('S1')
    const step = (await load(batch)).steps[0]!
    const press = { id: newId(), stepId: step.id, version: 1, kind: 'start' }
    expect((await put(STEP, batch, { ...press, kind: 'end' })).status).toBe(409)
    expect((await put(STEP, batch, press)).body).toMatchObject({ version: 2, doneAt: null })
    expect((await put(STEP, batch, press)).body).toMatchObject({ version: 2 })
    expect((await put(STEP, batch, { ...press, id: newId(), version: 2 })).body.error.sentence).toContain(
      'Step 1 runs already',
    )
    const stale = await put(STEP, batch, { ...press, id: newId(), kind: 'end' }, rolf)
    expect(stale.status).toBe(412)
    expect((await put(STEP, batch, { ...press, id: newId(), kind: 'end', version: 2 })).status).toBe(200)
    expect((await load(batch)).steps[0]!.entries.map((entry) => entry.kind)).toEqual(['start', 'end'])
  })

  it('R03: a step done otherwise than prescribed says why', async () => {
    const batch = await newBatch('S2')
    const step = (await load(batch)).steps[0]!
    const body = { id: newId(), stepId: step.id, version: 1, actualSpeedRpm: 400, actualTemperatureC: 26 }
    const bare = await put(STEP, batch, body)
    expect(bare.status).toBe(422)
    expect(bare.body.error.sentence).toBe(
      'Step 1 was done with 400 rpm where 300 rpm was prescribed. Say why.',
    )
    expect((await put(STEP, batch, { ...body, note: 'The anchor slipped at 300' })).status).toBe(200)
  })
})

describe('jars and readings', () => {
  it('D05, R03: a jar is on record once; a correction says why', async () => {
    const batch = await newBatch('F1')
    const jar = { id: newId(), number: 1, tareG: 42.1, grossG: 91.9, torqueNm: 1.2 }
    expect((await put(FILL, batch, jar)).body).toMatchObject({ fillG: 49.8 })
    expect((await put(FILL, batch, jar)).status).toBe(200)
    expect((await put(FILL, batch, { ...jar, id: newId() })).body.error.fields.number).toBeTruthy()
    expect((await put(FILL, batch, { ...jar, id: newId(), number: 2, grossG: 40 })).status).toBe(422)
    const better = { ...jar, id: newId(), grossG: 92, supersedes: jar.id }
    expect((await put(FILL, batch, better)).body.error.fields.reason).toBeTruthy()
    expect((await put(FILL, batch, { ...better, reason: 'Misread' })).status).toBe(200)
    expect((await put(FILL, batch, { ...better, id: newId(), reason: 'Misread' })).status).toBe(409)
    expect((await load(batch)).jars).toHaveLength(2)
  })

  it('R10: an initial waits for the rest, or says why it does not', async () => {
    const batch = await resting('R1', 3)
    const ph = { id: newId(), moment: 'initial', attribute: 'ph', typed: '5,42', detail: { path: 'extract' } }
    const early = await put(READ, batch, ph)
    expect(early.status).toBe(422)
    expect(early.body.error.sentence).toContain('has rested 3 of 24 h')
    expect((await put(READ, batch, { ...ph, reason: 'The oven is free today only' })).body.value).toBe(5.42)
    const making = await newBatch('R2')
    expect((await put(READ, making, { ...ph, id: newId() })).status).toBe(409)
    const check = { ...ph, id: newId(), moment: 'in process' }
    expect((await put(READ, making, check)).status).toBe(200)
  })

  it('D05, R03: replicates are kept once each, with values from the science', async () => {
    const batch = await resting('R3', 30)
    const torque = {
      ...{ id: newId(), moment: 'initial', attribute: 'viscosity', typed: '62', instrumentId: viscometer },
      detail: { spindle: 'T-bar C', rpm: 10 },
    }
    expect((await put(READ, batch, torque)).body.value).toBe(62_000)
    expect((await put(READ, batch, torque)).body.value).toBe(62_000)
    expect((await put(READ, batch, { ...torque, id: newId() })).status).toBe(409)
    const second = { ...torque, id: newId(), replicate: 2, typed: '6.4' }
    expect((await put(READ, batch, second)).status).toBe(200)
    const better = { ...second, id: newId(), typed: '64', supersedes: second.id }
    expect((await put(READ, batch, better)).body.error.fields.reason).toBeTruthy()
    expect((await put(READ, batch, { ...better, reason: 'The point slipped' })).body.value).toBe(64_000)
    expect((await load(batch)).readings).toHaveLength(3)
  })

  it('refuse what cannot have been read, each at its field', async () => {
    const batch = await resting('R4', 30)
    const read = { id: newId(), moment: 'initial', attribute: 'ph', typed: '5.4' }
    const refused = [
      [{ ...read, typed: '15' }, 'typed'],
      [{ ...read, typed: 'sour' }, 'typed'],
      [{ ...read, typed: '' }, 'typed'],
      [{ ...read, attribute: 'smell' }, 'attribute'],
      [{ ...read, attribute: 'density', typed: '20' }, 'typed'],
      [{ ...read, attribute: 'viscosity', detail: { spindle: 'T-bar Z', rpm: 10 } }, 'detail.spindle'],
      [{ ...read, attribute: 'viscosity', detail: { spindle: 'T-bar C' } }, 'detail.rpm'],
      [{ ...read, attribute: 'centrifuge', detail: { rpm: 3000, minutes: 30 } }, 'detail.radiusMm'],
      [{ ...read, instrumentId: newId() }, 'instrumentId'],
    ] as const
    for (const [body, field] of refused) {
      const answer = await put(READ, batch, body)
      expect(answer.status, JSON.stringify(body)).toBe(422)
      expect(answer.body.error.fields[field], JSON.stringify(answer.body)).toBeTruthy()
    }
    expect((await load(batch)).readings).toHaveLength(0)
  })
})

describe('drops and photos of a batch', () => {
  const readDrops = (batch: string, typed: string, more: object = {}) =>
    put(READ, batch, { id: newId(), moment: 'initial', attribute: 'droplets', typed, ...more })

  it('a count keeps what was typed and what it comes to; the formula tells the film between drops by it', async () => {
    const batch = await resting('D1', 30)
    const bad = await readDrops(batch, '2.5; tiny')
    expect([bad.status, bad.body.error.fields.typed]).toEqual([422, expect.stringContaining('"tiny"')])
    expect((await readDrops(batch, '1 × 2; 2')).status).toBe(200)
    const [reading] = (await load(batch)).readings
    expect(reading).toMatchObject({ typed: '1 × 2; 2', detail: { drops: { counts: [2, 1] } } })
    expect(reading?.value).toBeCloseTo(10 / 6, 9)
    const page = async () => (await call(FORMULA, { cookie: lena.cookie, params: { code: 'D1' } })).body
    expect((await page()).drops).toMatchObject({ batchCode: batch })
    const fixed = { supersedes: reading?.id, reason: 'Scale of the other lens' }
    expect((await readDrops(batch, '3,4', fixed)).status).toBe(200)
    expect((await page()).drops).toEqual({ batchCode: batch, diameterUm: 3.4 })
    const words = await put(READ, batch, {
      ...{ id: newId(), moment: 'initial', attribute: 'look', typed: 'a'.repeat(201) },
    })
    expect(words.status).toBe(422)
  })

  it('D05: a photo is kept once, byte for byte, for whoever reads batches; one that is none is refused', async () => {
    const batch = await resting('D2', 30)
    const bytes = new Uint8Array(
      await new Jimp({ width: 60, height: 40, color: 0x336699ff }).getBuffer('image/png'),
    )
    const id = newId()
    const now = new Date().toISOString()
    const form = (file: Uint8Array, of: string) => {
      const data = new FormData()
      const fields = { id: of, note: 'microscope', deviceNow: now, claimedAt: now }
      for (const [name, value] of Object.entries(fields)) data.set(name, value)
      data.set('file', new Blob([file as BlobPart]), 'drops.png')
      return data
    }
    const send = (file: Uint8Array, of = id, who = lena) =>
      call(PHOTO, { cookie: who.cookie, params: { code: batch }, body: form(file, of) })
    expect((await send(new TextEncoder().encode('no picture'), newId())).status).toBe(415)
    for (const answer of [await send(bytes), await send(bytes)]) expect(answer.status).toBe(200)
    const { photos } = await load(batch)
    expect(photos).toMatchObject([{ id, note: 'microscope', by: lena.actor.initials }])
    const technician = await t.person('technician')
    const original = await call(ORIGINAL, { cookie: technician.cookie, params: { code: batch, id } })
    expect(new Uint8Array(await original.response.arrayBuffer())).toEqual(bytes)
    expect((await send(bytes, newId(), technician)).status).toBe(403)
    expect((await call(ORIGINAL, { cookie: lena.cookie, params: { code: 'D1-1', id } })).status).toBe(404)
    await expect(t.owner.deleteFrom('batchPhoto').where('id', '=', id).execute()).rejects.toThrow()
  })
})
