import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as LIST, POST as MAKE } from '@/app/api/batches/route'
import { GET } from '@/app/api/batches/[code]/route'
import { PUT as WEIGH } from '@/app/api/batches/[code]/weighings/route'
import { PUT as STEP } from '@/app/api/batches/[code]/steps/route'
import { POST as FINISH } from '@/app/api/batches/[code]/finish/route'
import { POST as TEST_TYPE } from '@/app/api/batches/[code]/type-test/route'
import { POST as DECIDE } from '@/app/api/batches/[code]/decision/route'
import { POST as CREATE_FORMULA } from '@/app/api/formulas/route'
import { createBatch } from '@/lib/batch/commands/create-batch'
import { getBatchForStudy } from '@/lib/batch/queries/get-batch-for-study'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import type { Route } from '@/lib/http/route'
import { call } from '../support/call'
import { countStatements } from '../support/statements'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let lena: Signed
let rolf: Signed

beforeAll(async () => {
  t = await testDatabase()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  rolf = await t.person('formulator', { name: 'Rolf Adler' })
})
afterAll(() => t.close())

async function newFormula(code: string, percents = [14, 86]) {
  const names = ['Squalane', 'Aqua']
  const lines = percents.map((percent, index) => ({
    id: newId(),
    phase: 'AB'[index],
    inciName: names[index],
    percentThousandths: percent * 1000,
    density: [0.81, 0.998][index],
    isInternal: index === 1,
  }))
  const steps = [
    { id: newId(), phase: 'A', instruction: 'Warm the oil', speedRpm: 200, minutes: 10, temperatureC: 40 },
    { id: newId(), phase: 'B into A', instruction: 'Add slowly', speedRpm: 300, minutes: 44 },
  ]
  const versionId = newId()
  const body = { id: newId(), versionId, code, name: 'Cream', emulsionType: 'water-in-oil', lines, steps }
  const answer = await call(CREATE_FORMULA, { cookie: lena.cookie, body })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return versionId
}

const make = (formulaVersionId: string, sizeG: unknown = 2000, id = newId()) =>
  call(MAKE, { cookie: lena.cookie, body: { id, formulaVersionId, sizeG } })
const load = async (code: string): Promise<BatchPage> =>
  (await call(GET, { cookie: lena.cookie, params: { code } })).body
const put = (route: Route, code: string, body: unknown, who = lena) =>
  call(route, { cookie: who.cookie, params: { code }, body })

/** A batch with both lines weighed right and both steps done. */
async function made(code: string) {
  const versionId = await newFormula(code)
  const batch = (await make(versionId)).body.code as string
  const { weighings, steps } = await load(batch)
  for (const line of weighings) {
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: String(line.targetG) }
    expect((await put(WEIGH, batch, body)).status).toBe(200)
  }
  for (const step of steps)
    expect((await put(STEP, batch, { id: newId(), stepId: step.id, version: 1 })).status).toBe(200)
  return batch
}

async function rested(code: string) {
  const batch = await made(code)
  expect((await put(FINISH, batch, { version: 1, yieldG: 1968, fillG: 49.6 })).status).toBe(200)
  return batch
}

async function restFor(batch: string, hours: number) {
  await t.owner.transaction().execute(async (trx) => {
    const { sql } = await import('kysely')
    await sql`select set_config('app.actor_id', ${lena.actor.personId}, true)`.execute(trx)
    await sql`update batch set made_at = now() - ${`${hours} hours`}::interval where code = ${batch}`.execute(
      trx,
    )
  })
}

describe('a new batch', () => {
  it('R01: scales the weighing sheet, locks the version, and leaves one trail row per row', async () => {
    const answer = await make(await newFormula('B1'))
    expect(answer.body.code).toBe('B1-1')
    const batch = await load('B1-1')
    expect(batch.weighings.map((line) => [line.inciName, line.targetG])).toEqual([
      ['Squalane', 280],
      ['Aqua', 1720],
    ])
    expect(batch.steps.map((step) => step.phase)).toEqual(['A', 'B into A'])
    const trail = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'operation', 'rowId'])
      .where('requestId', '=', answer.headers.get('x-request-id'))
      .execute()
    expect(trail.map((row) => `${row.operation} ${row.tableName}`).sort()).toEqual([
      'insert batch',
      'insert batch_step',
      'insert batch_step',
      'insert batch_weighing',
      'insert batch_weighing',
      'update formula_version',
    ])
    expect(new Set(trail.map((row) => row.rowId)).size).toBe(6)
  })

  it('D05: sent twice it is one batch; two at the same moment get two codes', async () => {
    const versionId = await newFormula('B2')
    const id = newId()
    expect((await make(versionId, 2000, id)).body.code).toBe('B2-1')
    expect((await make(versionId, 2000, id)).body.code).toBe('B2-1')
    const both = await Promise.all([make(versionId), make(versionId)])
    expect(both.map((answer) => answer.body.code).sort()).toEqual(['B2-2', 'B2-3'])
    const other = await make(await newFormula('B3'), 2000, id)
    expect(other.status).toBe(409)
  })

  it('refuses a version that does not add up, is empty or is not there, and a size that cannot be', async () => {
    const short = await make(await newFormula('B4', [14, 85]))
    expect(short.status).toBe(409)
    expect(short.body.error.sentence).toContain('total 99.00 %, 1.00 % missing')
    expect((await make(await newFormula('B5', []))).body.error.sentence).toContain('no lines yet')
    expect((await make(newId())).status).toBe(404)
    for (const size of [0, -5, 5, 'much', null]) {
      const answer = await make(newId(), size)
      expect(answer.status).toBe(422)
      expect(answer.body.error.fields.sizeG).toBeTruthy()
    }
  })

  it('takes few statements, whatever the number of lines', async () => {
    const versionId = await newFormula('B6')
    const { count } = await countStatements(() =>
      transact(t.db, lena.actor, {}, (trx) =>
        createBatch(trx, lena.actor, {
          id: newId(),
          formulaVersionId: versionId,
          sizeG: 100,
          protocolVersionIds: [],
          tolerancePercent: null,
          note: '',
        }),
      ),
    )
    expect(count).toBeLessThanOrEqual(9)
  })
})

describe('weighing', () => {
  it('keeps the weight as typed, with a decimal comma too, and the difference', async () => {
    const batch = (await make(await newFormula('W1'))).body.code
    const line = (await load(batch)).weighings[0]!
    const body = {
      id: newId(),
      weighingId: line.id,
      version: 1,
      actualTyped: '280,50',
      lot: 'K-2217',
      balance: 'B2',
    }
    const answer = await put(WEIGH, batch, body)
    expect(answer.body).toMatchObject({ version: 2, actualG: 280.5, isWithin: true })
    expect(answer.body.differencePercent).toBeCloseTo(0.1786, 4)
    expect((await load(batch)).weighings[0]).toMatchObject({
      actualTyped: '280,50',
      lot: 'K-2217',
      balance: 'B2',
    })
  })

  it('R03: wants a note outside the tolerance and a reason for a correction', async () => {
    const batch = (await make(await newFormula('W2'))).body.code
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '276' }
    const bare = await put(WEIGH, batch, { ...body, note: '   ' })
    expect(bare.status).toBe(422)
    expect(bare.body.error.sentence).toContain('Squalane is 4.00 g short')
    expect(bare.body.error.fields.note).toBeTruthy()
    expect((await put(WEIGH, batch, { ...body, note: 'The can is empty' })).status).toBe(200)
    const again = { ...body, id: newId(), supersedes: body.id, version: 2, actualTyped: '280' }
    const silent = await put(WEIGH, batch, { ...again, reason: ' ' })
    expect(silent.status).toBe(422)
    expect(silent.body.error.fields.reason).toBeTruthy()
    const told = await put(WEIGH, batch, { ...again, reason: 'A second can was found' })
    expect(told.status).toBe(200)
    const { portions, ...kept } = (await load(batch)).weighings[0]!
    expect(kept).toMatchObject({ actualG: 280, version: 3 })
    expect(portions.map(({ netG, supersedes, reason }) => [netG, supersedes, reason])).toEqual([
      [276, null, ''],
      [280, body.id, 'A second can was found'],
    ])
    const trail = await t.owner
      .selectFrom('trail')
      .select(['reason', 'tableName', 'operation'])
      .where('requestId', '=', told.headers.get('x-request-id'))
      .execute()
    expect(trail.map((row) => `${row.operation} ${row.tableName}`).sort()).toEqual([
      'insert batch_portion',
      'update batch_weighing',
    ])
    expect(trail[0]?.reason).toBe('A second can was found')
  })

  it('D06: the second of two people at one line is told', async () => {
    const batch = (await make(await newFormula('W3'))).body.code
    const line = (await load(batch)).weighings[0]!
    const body = { id: newId(), weighingId: line.id, version: 1, actualTyped: '280' }
    expect((await put(WEIGH, batch, body, rolf)).status).toBe(200)
    const stale = await put(WEIGH, batch, { ...body, id: newId(), actualTyped: '281' })
    expect(stale.status).toBe(412)
    expect(stale.body.error.sentence).toContain('Rolf Adler has written the weight of Squalane')
  })

  it('refuses what is no weight, and lines that are not there', async () => {
    const batch = (await make(await newFormula('W4'))).body.code
    const line = (await load(batch)).weighings[0]!
    for (const actualTyped of ['', 'abc', '1,000.5', '-3', '0', '99999999']) {
      const answer = await put(WEIGH, batch, { id: newId(), weighingId: line.id, version: 1, actualTyped })
      expect(answer.status, actualTyped).toBe(422)
      expect(answer.body.error.fields.actualTyped, actualTyped).toBeTruthy()
    }
    const ghost = { id: newId(), weighingId: newId(), version: 1, actualTyped: '1' }
    expect((await put(WEIGH, batch, ghost)).status).toBe(404)
    expect((await put(WEIGH, 'W4-9', ghost)).status).toBe(404)
  })
})

describe('steps and yield', () => {
  it('R03: keep what was done beside what was prescribed; a correction wants a reason', async () => {
    const batch = (await make(await newFormula('S1'))).body.code
    const step = (await load(batch)).steps[1]!
    const body = {
      id: newId(),
      stepId: step.id,
      version: 1,
      actualSpeedRpm: 320,
      actualMinutes: 46,
      actualTemperatureC: 28.5,
    }
    expect((await put(STEP, batch, body)).status).toBe(200)
    expect((await load(batch)).steps[1]).toMatchObject({
      speedRpm: 300,
      actualSpeedRpm: 320,
      actualMinutes: 46,
    })
    expect((await put(STEP, batch, { ...body, id: newId(), version: 2 })).status).toBe(422)
    expect(
      (await put(STEP, batch, { ...body, id: newId(), version: 2, reason: 'Clock misread' })).status,
    ).toBe(200)
    expect((await put(STEP, batch, { ...body, id: newId(), version: 1, reason: 'x' })).status).toBe(412)
    const odd = await put(STEP, batch, { ...body, actualSpeedRpm: 1.5, actualMinutes: -1 })
    expect(Object.keys(odd.body.error.fields).sort()).toEqual(['actualMinutes', 'actualSpeedRpm'])
    expect((await put(STEP, batch, { ...body, id: newId(), stepId: newId() })).status).toBe(404)
  })

  it('R10: making ends only when all is weighed and done, and its sheet is closed then', async () => {
    const open = (await make(await newFormula('S2'))).body.code
    const early = await put(FINISH, open, { version: 1, yieldG: 100 })
    expect(early.status).toBe(409)
    expect(early.body.error.sentence).toContain('2 lines are not weighed, 2 steps are not done')

    const batch = await made('S3')
    const more = await put(FINISH, batch, { version: 1, yieldG: 2001 })
    expect(more.status).toBe(422)
    expect(more.body.error.fields.yieldG).toContain('2\u2009000.00 g')
    expect((await put(FINISH, batch, { version: 7, yieldG: 1900 })).status).toBe(412)
    expect((await put(FINISH, batch, { version: 1, yieldG: 1900 })).body.state).toBe('resting')
    const { weighings, steps } = await load(batch)
    const late = { id: newId(), weighingId: weighings[0]!.id, version: 2, actualTyped: '280', reason: 'Late' }
    expect((await put(WEIGH, batch, late)).status).toBe(409)
    expect(
      (await put(STEP, batch, { id: newId(), stepId: steps[0]!.id, version: 2, reason: 'Late' })).status,
    ).toBe(409)
    expect((await put(FINISH, batch, { version: 2, yieldG: 1900 })).status).toBe(409)
  })
})

describe('type test and decision', () => {
  it('asks for a reason where the test contradicts the formula', async () => {
    const batch = await rested('T1')
    const body = { version: 2, method: 'dilution', found: 'oil-in-water' }
    const bare = await put(TEST_TYPE, batch, body)
    expect(bare.status).toBe(422)
    expect(bare.body.error.sentence).toContain('designed water-in-oil and the test says oil-in-water')
    expect((await put(TEST_TYPE, batch, { ...body, reason: 'Inverted at minute 30' })).status).toBe(200)
    const again = { version: 3, method: 'dye', found: 'water-in-oil' }
    expect((await put(TEST_TYPE, batch, again)).status).toBe(422)
    expect((await put(TEST_TYPE, batch, { ...again, version: 2, reason: 'Second sample' })).status).toBe(412)
    expect((await put(TEST_TYPE, batch, { ...again, reason: 'Second sample' })).status).toBe(200)
  })

  it('wants the conductivity where that was the method, and a batch that rests', async () => {
    const batch = await rested('T2')
    const body = { version: 2, method: 'conductivity', found: 'water-in-oil' }
    const bare = await put(TEST_TYPE, batch, body)
    expect(bare.body.error.fields.conductivityUsCm).toBeTruthy()
    // A test tells which phase is outside, so it agrees for silicone as it does for oil.
    const silicone = { ...body, found: 'water-in-silicone', conductivityUsCm: 0.4 }
    expect((await put(TEST_TYPE, batch, silicone)).status).toBe(200)
    const making = await made('T3')
    expect((await put(TEST_TYPE, making, { ...silicone, version: 1 })).status).toBe(409)
  })

  it('R10: a batch is released once, after its test, and early only with a reason', async () => {
    const batch = await rested('T4')
    const release = { version: 2, decision: 'released' }
    expect((await put(DECIDE, batch, release)).body.error.sentence).toContain('no emulsion-type test yet')
    const test = { version: 2, method: 'dilution', found: 'water-in-oil' }
    expect((await put(TEST_TYPE, batch, test)).status).toBe(200)
    const early = await put(DECIDE, batch, { ...release, version: 3 })
    expect(early.status).toBe(422)
    expect(early.body.error.sentence).toContain('has not rested 24 h')
    await restFor(batch, 25)
    expect((await put(DECIDE, batch, release)).status).toBe(412)
    expect((await put(DECIDE, batch, { ...release, version: 3 })).body.state).toBe('released')
    const twice = await put(DECIDE, batch, { version: 4, decision: 'rejected', reason: 'Second thoughts' })
    expect(twice.status).toBe(409)
  })

  it('R03: a rejection wants a reason, and is possible while making', async () => {
    const batch = (await make(await newFormula('T5'))).body.code
    expect((await put(DECIDE, batch, { version: 1, decision: 'released' })).status).toBe(409)
    expect((await put(DECIDE, batch, { version: 1, decision: 'rejected', reason: '  ' })).status).toBe(422)
    const answer = await put(DECIDE, batch, { version: 1, decision: 'rejected', reason: 'Spilled' })
    expect(answer.body.state).toBe('rejected')
  })
})

describe('what others see', () => {
  it('gives a study the yield, the fill, the type and the internal phase', async () => {
    const batch = await rested('Q1')
    const { id } = await load(batch)
    const seen = await getBatchForStudy(t.db, lena.actor, id)
    expect(seen).toMatchObject({
      code: 'Q1-1',
      state: 'resting',
      yieldG: 1968,
      fillG: 49.6,
      formulaCode: 'Q1',
    })
    // 86 / 0.998 of 86 / 0.998 + 14 / 0.81 mL
    expect(seen.internalVolumePercent).toBeCloseTo(83.29, 2)
    expect(seen.isHighInternalPhase).toBe(true)
    await expect(getBatchForStudy(t.db, lena.actor, newId())).rejects.toMatchObject({ status: 404 })
  })

  it('lists batches by state and words; a client sees none', async () => {
    const found = await call(LIST, { cookie: lena.cookie, query: { q: 'q1', state: 'resting' } })
    expect(found.body.rows).toMatchObject([{ code: 'Q1-1', lines: 2, linesWeighed: 2, formulaName: 'Cream' }])
    expect((await call(LIST, { cookie: lena.cookie, query: { sort: 'x', state: 'y' } })).status).toBe(200)
    const client = await t.person('client')
    for (const route of [LIST, GET]) {
      expect((await call(route, { cookie: client.cookie, params: { code: 'Q1-1' } })).status).toBe(403)
    }
    const technician = await t.person('technician')
    expect((await call(MAKE, { cookie: technician.cookie, body: {} })).status).toBe(403)
    expect((await call(GET, { cookie: technician.cookie, params: { code: 'ZZ-1' } })).status).toBe(404)
  })
})
