import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as MAKE } from '@/app/api/batches/route'
import { POST as ANSWER } from '@/app/api/formulas/[code]/answers/route'
import { GET, PUT } from '@/app/api/formulas/[code]/route'
import { POST as NEXT } from '@/app/api/formulas/[code]/versions/route'
import { POST as CREATE } from '@/app/api/formulas/route'
import { POST as ADD } from '@/app/api/ingredients/route'
import { newId } from '@/lib/db/id'
import { formulaChecks } from '@/lib/formula/rules/checks'
import { targetPhOf } from '@/lib/formula/rules/target-ph'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let lena: Signed
const benzoate = newId()

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  const body = { id: benzoate, inciName: 'Sodium Benzoate', density: 1.44, phLow: 2, phHigh: 5 }
  expect((await call(ADD, { cookie: lena.cookie, body })).status).toBe(200)
})
afterAll(() => t.close())

const line = (phase: string, inciName: string, fn: string, percent: number, more: object = {}) => ({
  ...{ id: newId(), phase, inciName, function: fn, percentThousandths: Math.round(percent * 1000) },
  ...{ density: 1, isInternal: phase === 'B', ...more },
})

/** A cream without salt, whose preservative has a range of pH. */
async function newCream(code: string) {
  const lines = [
    line('A', 'Squalane', 'oil', 14),
    line('B', 'Aqua', 'water', 85.6),
    line('B', 'Sodium Benzoate', 'preservative', 0.4, { ingredientId: benzoate }),
  ]
  const body = { id: newId(), versionId: newId(), code, name: code, emulsionType: 'water-in-oil', lines }
  expect((await call(CREATE, { cookie: lena.cookie, body })).status).toBe(200)
  return body
}

const load = async (code: string): Promise<FormulaPage> =>
  (await call(GET, { cookie: lena.cookie, params: { code } })).body
const checksOf = (page: FormulaPage) =>
  formulaChecks(page.emulsionType, page.lines, page.steps, page.ground, targetPhOf(page))
const checkOf = async (code: string, key: string) =>
  checksOf(await load(code)).find((check) => check.key === key)

async function answerBody(code: string, question: string, more: object = {}) {
  const { versionId } = await load(code)
  const askedAbout = (await checkOf(code, question))?.askedAbout ?? ''
  return { id: newId(), versionId, question, kind: 'answered', note: 'Sugar holds it', askedAbout, ...more }
}
const answer = (code: string, body: unknown, who = lena) =>
  call(ANSWER, { cookie: who.cookie, params: { code }, body })
const kept = (versionId: string) =>
  t.owner
    .selectFrom('formulaAnswer')
    .select(['id', 'question', 'kind', 'note', 'answeredBy'])
    .where('formulaVersionId', '=', versionId)
    .execute()

/** The draft with one share changed, as the editor saves it. */
async function change(code: string, inciName: string, percent: number, more: object = {}) {
  const { versionId, version, name, emulsionType, note, lines, steps, ...page } = await load(code)
  const { targetPhLow, targetPhHigh } = page
  const changed = lines.map(({ formulaVersionId: _, ...row }) =>
    row.inciName === inciName ? { ...row, percentThousandths: percent * 1000 } : row,
  )
  const body = {
    versionId,
    version,
    name,
    emulsionType,
    note,
    steps,
    lines: changed,
    targetPhLow,
    targetPhHigh,
  }
  const saved = await call(PUT, {
    cookie: lena.cookie,
    method: 'PUT',
    params: { code },
    body: { ...body, ...more },
  })
  expect(saved.status, JSON.stringify(saved.body)).toBe(200)
}

describe('answering a question of a formula', () => {
  it('R01: is kept with who, when and text, in one trail row, and closes the question', async () => {
    const { versionId } = await newCream('Q1')
    expect((await checkOf('Q1', 'salt'))?.isOpen).toBe(true)
    const answered = await answer('Q1', await answerBody('Q1', 'salt'))
    expect(answered.status, JSON.stringify(answered.body)).toBe(200)
    expect(await kept(versionId)).toMatchObject([
      { question: 'salt', kind: 'answered', note: 'Sugar holds it', answeredBy: lena.actor.personId },
    ])
    const trail = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'operation', 'actorId'])
      .where('requestId', '=', answered.headers.get('x-request-id'))
      .execute()
    expect(trail).toEqual([
      { tableName: 'formula_answer', operation: 'insert', actorId: lena.actor.personId },
    ])
    const check = await checkOf('Q1', 'salt')
    expect(check).toMatchObject({ isOpen: false, given: { by: lena.actor.initials, note: 'Sugar holds it' } })
  })

  it('is open again when what it rests on changes, and not when anything else does', async () => {
    const { versionId } = await newCream('Q2')
    await answer('Q2', await answerBody('Q2', 'salt', { kind: 'set aside' }))
    await change('Q2', 'Squalane', 13)
    expect(await checkOf('Q2', 'salt')).toMatchObject({ isOpen: false, given: { kind: 'set aside' } })
    await change('Q2', 'Aqua', 86)
    expect(await checkOf('Q2', 'salt')).toMatchObject({ isOpen: true, isReopened: true })
    expect((await answer('Q2', await answerBody('Q2', 'salt', { note: 'Still' }))).status).toBe(200)
    expect((await checkOf('Q2', 'salt'))?.isOpen).toBe(false)
    expect(await kept(versionId)).toHaveLength(2)
  })

  it('D05: sent twice is kept once; other words under the same id are refused', async () => {
    const { versionId } = await newCream('Q3')
    const body = await answerBody('Q3', 'gel')
    const [first, again] = [await answer('Q3', body), await answer('Q3', body)]
    expect([first.status, again.status]).toEqual([200, 200])
    expect(again.body).toEqual(first.body)
    expect(await kept(versionId)).toHaveLength(1)
    expect((await answer('Q3', { ...body, note: 'Other words' })).status).toBe(409)
  })

  it('D06: what changed since it was on screen is said, and nothing is kept', async () => {
    const { versionId } = await newCream('Q4')
    const body = await answerBody('Q4', 'salt')
    await change('Q4', 'Aqua', 84)
    const stale = await answer('Q4', body)
    expect(stale.status).toBe(412)
    expect(stale.body.error.sentence).toContain('has changed in version 1 of Q4')
    expect(await kept(versionId)).toEqual([])
  })

  it('a preservative outside the target pH of the formula stays asked until a note says why', async () => {
    await newCream('Q5')
    expect(await checkOf('Q5', 'ph')).toMatchObject({ isOpen: true })
    await change('Q5', 'Aqua', 85.6, { targetPhLow: 4.5, targetPhHigh: 4.5 })
    expect(await checkOf('Q5', 'ph')).toMatchObject({ isOpen: false, isAsked: false })
    await change('Q5', 'Aqua', 85.6, { targetPhLow: 4.5, targetPhHigh: 6 })
    expect((await checkOf('Q5', 'ph'))?.answer).toContain('target 4.50 to 6.00')
    const outside = await answer('Q5', await answerBody('Q5', 'ph', { note: 'A second one helps' }))
    expect(outside.status, JSON.stringify(outside.body)).toBe(200)
    expect(await checkOf('Q5', 'ph')).toMatchObject({ isOpen: false, isAsked: true })
  })

  it('carries over to the next version and names where it was given; what changed there is open again', async () => {
    const { versionId } = await newCream('Q10')
    for (const question of ['salt', 'gel'])
      expect((await answer('Q10', await answerBody('Q10', question))).status).toBe(200)
    await change('Q10', 'Aqua', 85.6, { targetPhLow: 4.2, targetPhHigh: 4.8 })
    const batch = { id: newId(), formulaVersionId: versionId, sizeG: 1000 }
    expect((await call(MAKE, { cookie: lena.cookie, body: batch })).status).toBe(200)
    const next = { id: newId(), fromVersionId: versionId, note: '' }
    expect((await call(NEXT, { cookie: lena.cookie, params: { code: 'Q10' }, body: next })).status).toBe(200)
    expect(await load('Q10')).toMatchObject({ number: 2, targetPhLow: 4.2, targetPhHigh: 4.8 })
    const carried = { isOpen: false, given: { number: 1, by: lena.actor.initials, note: 'Sugar holds it' } }
    expect(await checkOf('Q10', 'salt')).toMatchObject(carried)
    expect(await checkOf('Q10', 'gel')).toMatchObject(carried)
    await change('Q10', 'Aqua', 86)
    expect(await checkOf('Q10', 'salt')).toMatchObject({ isOpen: true, isReopened: true })
    expect((await answer('Q10', await answerBody('Q10', 'salt', { note: 'Anew' }))).status).toBe(200)
    expect(await checkOf('Q10', 'salt')).toMatchObject({ isOpen: false, given: { number: 2, note: 'Anew' } })
    // The first version keeps its own.
    const first = (await call(GET, { cookie: lena.cookie, params: { code: 'Q10' }, query: { version: '1' } }))
      .body
    const check = checksOf(first).find((one) => one.key === 'salt')
    expect(check).toMatchObject({ isOpen: false, given: { number: 1, note: 'Sugar holds it' } })
  })

  it('refuses what is not asked, what the formula answers itself, and empty or absurd answers', async () => {
    await newCream('Q6')
    const body = await answerBody('Q6', 'salt')
    expect((await answer('Q6', { ...body, question: 'finish' })).status).toBe(409)
    const own = await answer('Q6', await answerBody('Q6', 'preservative'))
    expect([own.status, own.body.error.sentence]).toEqual([409, expect.stringContaining('itself')])
    const empty = await answer('Q6', { ...body, note: '  ', kind: 'perhaps', question: 'moon' })
    expect(empty.status).toBe(422)
    expect(Object.keys(empty.body.error.fields).sort()).toEqual(['kind', 'note', 'question'])
    expect((await answer('Q6', { ...body, versionId: newId() })).status).toBe(404)
    expect((await answer('Q99', body)).status).toBe(404)
  })

  it('A05: is for formulators; the answers cannot be changed by anyone', async () => {
    await newCream('Q7')
    const body = await answerBody('Q7', 'salt')
    for (const role of ['technician', 'qa', 'manager', 'client'] as const) {
      expect((await answer('Q7', body, await t.person(role))).status).toBe(403)
    }
    expect((await answer('Q7', body)).status).toBe(200)
    await expect(
      t.owner.updateTable('formulaAnswer').set({ note: 'Mine' }).where('id', '=', body.id).execute(),
    ).rejects.toThrow()
  })
})

it('the page takes as many statements with answers as without', async () => {
  await newCream('Q8')
  const before = await countStatements(() => load('Q8'))
  for (const question of ['salt', 'gel', 'polymer'])
    expect((await answer('Q8', await answerBody('Q8', question))).status).toBe(200)
  expect((await countStatements(() => load('Q8'))).count).toBe(before.count)
})
