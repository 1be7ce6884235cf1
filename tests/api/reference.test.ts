import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as makeBatchRoute } from '@/app/api/batches/route'
import { GET as benchJarRoute } from '@/app/api/bench/[code]/route'
import { GET as formulasRoute } from '@/app/api/formulas/route'
import { POST as addRoute } from '@/app/api/references/route'
import { GET as curvesRoute } from '@/app/api/studies/[code]/curves/route'
import { GET as sheetRoute } from '@/app/api/studies/[code]/sheet/route'
import { GET as listRoute, POST as startRoute } from '@/app/api/studies/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { recomputeSeries } from '@/lib/series/commands'
import { loadEvidence } from '@/lib/shelf-case/queries/evidence'
import { caseStation, computeCase } from '@/lib/shelf-case/rules/build'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '@/tests/support/running-study'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let formulator: Signed
let technician: Signed
const weekMs = 604_800_000
const startedAt = new Date(Date.now() - 6.2 * weekMs).toISOString()

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'Europe/Berlin')
  formulator = await t.person('formulator')
  technician = await t.person('technician')
  await makeStations(formulator.actor, 400)
})
afterAll(() => t.close())

const product = { name: 'Moorland day cream', lot: 'B 2211', emulsionType: 'water-in-oil', grams: 3000 }
const add = (body: object = {}, who = formulator) =>
  call(addRoute, { cookie: who.cookie, body: { id: newId(), ...product, ...body } })

async function start(body: object) {
  const answer = await call(startRoute, {
    cookie: formulator.cookie,
    body: {
      id: newId(),
      title: 'Screen',
      startedAt,
      ...body,
      protocolVersionId:
        (body as { protocolVersionId?: string }).protocolVersionId ?? (await makeProtocol(formulator.actor)),
    },
  })
  return answer
}

describe('a bought-in product', () => {
  it('has a name, lots and grams, is released as it is, and has no formula that one could open or make', async () => {
    const first = await add()
    expect(first).toMatchObject({ status: 200, body: { code: 'R-001-1' } })
    expect((await add({ lot: 'B 2212' })).body.code).toBe('R-001-2')
    expect((await add({ name: 'Tarn balm', lot: '7' })).body.code).toBe('R-002-1')
    const row = await t.db
      .selectFrom('batch')
      .select(['state', 'yieldG', 'productLot', 'formulaVersionId'])
      .where('id', '=', first.body.id)
      .executeTakeFirstOrThrow()
    expect(row).toMatchObject({ state: 'released', yieldG: 3000, productLot: 'B 2211' })
    const formulas = await call(formulasRoute, { cookie: formulator.cookie, query: { q: 'moorland' } })
    expect(formulas.body.rows).toEqual([])
    const made = await call(makeBatchRoute, {
      cookie: formulator.cookie,
      body: { id: newId(), formulaVersionId: row.formulaVersionId, sizeG: 100 },
    })
    expect(made.status).toBe(404)
  })

  it('sent twice stands once', async () => {
    const id = newId()
    const [one, two] = [await add({ id, lot: 'twice' }), await add({ id, lot: 'twice' })]
    expect(two.body).toEqual(one.body)
  })

  it.each([
    [{ name: ' ' }, 'name', 'Give the product its name.'],
    [{ lot: '' }, 'lot', 'Give the lot, as it stands on the pack.'],
    [{ grams: null }, 'grams', 'Give what there is of it in g as a number.'],
    [{ grams: -2 }, 'grams', 'What there is of it is above 0 g.'],
    [{ lot: 'b 2211' }, 'lot', 'This lot is R-001-1.'],
    [{ lot: 'x', emulsionType: 'oil-in-water' }, 'emulsionType', 'Known as water-in-oil.'],
  ])('refuses %j at its field', async (change, field, sentence) => {
    const answer = await add(change)
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields[field]).toBe(sentence)
  })

  it('is added by whoever writes batches, and nobody else', async () => {
    expect((await add({ lot: 'no' }, technician)).status).toBe(403)
  })
})

describe('a reference beside a study', () => {
  let own: string
  let reference: string
  let study: { id: string; code: string }

  beforeAll(async () => {
    own = await makeBatch(formulator.actor, { code: 'N90-1' })
    reference = (await add({ lot: 'beside' })).body.id
    const id = newId()
    const protocolVersionId = await makeProtocol(formulator.actor)
    let answer: Awaited<ReturnType<typeof start>> | undefined
    const { count } = await countStatements(async () => {
      answer = await start({
        id,
        protocolVersionId,
        batchIds: [own],
        referenceIds: [reference],
        initialReadings: [...initialOf(own), ...initialOf(reference)],
      })
    })
    expect(answer!.body.error).toBeUndefined()
    expect(count).toBeLessThanOrEqual(25)
    study = { id, code: answer!.body.code }
    await fall()
  })

  /** The study's own pH stands still; the reference's falls by 0.1 a week, out of ± 0.5 before the end. */
  async function fall() {
    const asked = await t.db
      .selectFrom('pullJar')
      .innerJoin('pull', 'pull.id', 'pullJar.pullId')
      .innerJoin('jar', 'jar.id', 'pullJar.jarId')
      .select(['pullJar.id', 'pullJar.jarId', 'jar.batchId', 'pull.timeWeeks', 'pull.studyStationId'])
      .where('pullJar.studyId', '=', study.id)
      .where('pullJar.asks', '=', 'measuring')
      .where('pull.timeWeeks', '<=', 6)
      .execute()
    await transact(t.db, technician.actor, {}, async (trx) => {
      await trx
        .insertInto('reading')
        .values(
          asked.map((jar) => {
            const value = jar.batchId === reference ? 5.61 - 0.1 * jar.timeWeeks : 5.61
            return {
              id: newId(),
              studyId: study.id,
              batchId: jar.batchId,
              studyStationId: jar.studyStationId,
              pullJarId: jar.id,
              jarId: jar.jarId,
              attribute: 'ph',
              value: Number(value.toFixed(2)),
              typed: value.toFixed(2),
              measuredAt: new Date(Date.parse(startedAt) + jar.timeWeeks * weekMs).toISOString(),
              recordedBy: technician.actor.personId,
            }
          }),
        )
        .execute()
      await recomputeSeries(trx, technician.actor, study.id)
    })
  }

  const standings = (batchId: string) =>
    t.db
      .selectFrom('series')
      .select('standing')
      .where('studyId', '=', study.id)
      .where('batchId', '=', batchId)
      .where('attribute', '=', 'ph')
      .execute()

  it('gets jars, pulls and a standing of its own', async () => {
    const jars = await t.db.selectFrom('jar').select('batchId').where('studyId', '=', study.id).execute()
    expect(jars.filter((jar) => jar.batchId === reference)).toHaveLength(54)
    expect((await standings(own)).map((one) => one.standing)).not.toContain('leaning')
    expect((await standings(reference)).map((one) => one.standing)).toContain('leaning')
  })

  it('is no finding of the sheet, the curves or the ledger, and raises no flag of a standing', async () => {
    const { body: sheet } = await call(sheetRoute, {
      cookie: formulator.cookie,
      params: { code: study.code },
    })
    const words = (phrases: { text: string }[]) => phrases.map((phrase) => phrase.text).join('')
    expect(words(sheet.finding.headline)).not.toMatch(/lean|out|R-001/)
    expect(sheet.batches.map((one: { isReference: boolean }) => one.isReference)).toEqual([false, true])
    const { body: curves } = await call(curvesRoute, {
      cookie: formulator.cookie,
      params: { code: study.code },
    })
    expect(words(curves.finding.headline)).toBe('No trend leads out of its band')
    const { body: ledger } = await call(listRoute, { cookie: formulator.cookie, query: { q: study.code } })
    expect(ledger.rows[0]).toMatchObject({
      batches: ['N90-1'],
      references: [expect.stringMatching(/^R-001-/)],
    })
    expect(ledger.rows[0].standing).not.toMatch(/out|leaning/)
    const flags = await t.db
      .selectFrom('flag')
      .select('level')
      .where('studyId', '=', study.id)
      .where('batchId', '=', reference)
      .execute()
    expect(flags.filter((flag) => flag.level !== 'doubt')).toEqual([])
  })

  it('has no part in a shelf-life case: neither batch, pooling, limiting batch, readings nor flags', async () => {
    const evidence = await loadEvidence(t.db, formulator.actor, study.id)
    expect(evidence.batches.map((one) => one.code)).toEqual(['N90-1'])
    const content = computeCase(evidence, caseStation(evidence, null)!, [])
    expect(content.batches.map((one) => one.code)).toEqual(['N90-1'])
    expect(content.readings.length).toBeGreaterThan(0)
    expect(JSON.stringify(content)).not.toMatch(/R-001|Moorland/)
    const ids = new Set(evidence.readings.map((reading) => reading.batchId))
    expect([...ids]).toEqual([own])
  })

  it('is marked on the screen of its jar', async () => {
    const jar = await t.db
      .selectFrom('jar')
      .select('code')
      .where('studyId', '=', study.id)
      .where('batchId', '=', reference)
      .where('kind', '=', 'watch')
      .executeTakeFirstOrThrow()
    const { body } = await call(benchJarRoute, { cookie: technician.cookie, params: { code: jar.code } })
    expect(body.batch).toMatchObject({ isReference: true, formulaName: 'Moorland day cream' })
  })

  it('is drawn beside another study by its readings, where one may see it', async () => {
    const stranger = await t.person('client')
    const beside = `${study.code} N90-1`
    const other = await makeBatch(formulator.actor, { code: 'N91-1' })
    const shared = { clientId: stranger.actor.clientId, isShared: true }
    const { code } = (await start({ batchIds: [other], initialReadings: initialOf(other), ...shared })).body
    const see = (query: object) =>
      call(curvesRoute, { cookie: formulator.cookie, params: { code }, query: { ...query } })
    let page: Awaited<ReturnType<typeof see>> | undefined
    const { count } = await countStatements(async () => {
      page = await see({ beside })
    })
    expect(count).toBeLessThanOrEqual(8)
    expect(page!.body.offers.map((one: { key: string }) => one.key)).toContain(beside)
    expect(page!.body.beside).toMatchObject({ name: `N90-1 in ${study.code}` })
    expect((await see({ beside: 'S-999 N1' })).body.beside).toBeNull()
    const theirs = await call(curvesRoute, { cookie: stranger.cookie, params: { code }, query: { beside } })
    expect(theirs.body).toMatchObject({ beside: null, offers: [] })
  })
})

describe('what cannot stand beside a study', () => {
  it('a batch that is also of the study, and a bought-in product as a batch of it', async () => {
    const own = await makeBatch(formulator.actor, { code: 'N92-1' })
    const bought = (await add({ lot: 'not alone' })).body
    const both = await start({ batchIds: [own], referenceIds: [own], initialReadings: initialOf(own) })
    expect(both.status).toBe(422)
    expect(both.body.error.sentence).toBe(
      'N92-1 is chosen as a batch of the study and as a reference beside it. Choose one of the two.',
    )
    const alone = await start({ batchIds: [bought.id], initialReadings: initialOf(bought.id) })
    expect(alone.status).toBe(422)
    expect(alone.body.error.sentence).toBe(
      `${bought.code} is a bought-in product, so it can only stand beside a study as a reference.`,
    )
  })

  it('a batch that is not released', async () => {
    const own = await makeBatch(formulator.actor, { code: 'N93-1' })
    const resting = await makeBatch(formulator.actor, { code: 'N93-2', state: 'rejected' })
    const answer = await start({ batchIds: [own], referenceIds: [resting], initialReadings: initialOf(own) })
    expect(answer.status).toBe(409)
    expect(answer.body.error.sentence).toBe(
      'N93-2 was rejected, so no study can start on it. Choose another batch.',
    )
  })
})
