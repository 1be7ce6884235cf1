import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as LIST, POST as CREATE } from '@/app/api/formulas/route'
import { GET, PUT } from '@/app/api/formulas/[code]/route'
import { POST as NEW_VERSION } from '@/app/api/formulas/[code]/versions/route'
import { GET as SEARCH, POST as ADD } from '@/app/api/ingredients/route'
import { GET as KNOWN } from '@/app/api/ingredients/known/route'
import { POST as MAKE } from '@/app/api/batches/route'
import { newId } from '@/lib/db/id'
import type { SaveFormulaInput } from '@/lib/formula/schema'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let lena: Signed
let rolf: Signed
let technician: Signed

beforeAll(async () => {
  t = await testDatabase()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  rolf = await t.person('formulator', { name: 'Rolf Adler' })
  technician = await t.person('technician')
})
afterAll(() => t.close())

const line = (phase: string, inciName: string, percent: number, more: object = {}) => ({
  id: newId(),
  phase,
  inciName,
  function: '',
  percentThousandths: Math.round(percent * 1000),
  density: 1,
  isInternal: phase === 'B',
  ...more,
})

const step = (instruction: string, more: object = {}) => ({ id: newId(), instruction, ...more })

async function newFormula(code: string, lines: object[] = [], steps: object[] = []) {
  const body = {
    ...{ id: newId(), versionId: newId(), code, name: `Cream ${code}`, emulsionType: 'water-in-oil' },
    ...{ lines, steps },
  }
  const answer = await call(CREATE, { cookie: lena.cookie, body })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return body
}

const save = (code: string, body: unknown, who = lena) =>
  call(PUT, { cookie: who.cookie, method: 'PUT', params: { code }, body })
const load = async (code: string, query: Record<string, string> = {}) =>
  (await call(GET, { cookie: lena.cookie, params: { code }, query })).body

async function draftOf(code: string): Promise<SaveFormulaInput> {
  const { versionId, version, name, emulsionType, note, lines, steps, ...page } = await load(code)
  const { targetPhLow, targetPhHigh } = page
  const plain = lines.map(({ formulaVersionId: _, ...rest }: { formulaVersionId: string }) => rest)
  return { versionId, version, name, emulsionType, targetPhLow, targetPhHigh, note, lines: plain, steps }
}

const trailOf = (requestId: string | null) =>
  t.owner
    .selectFrom('trail')
    .select(['tableName', 'rowId', 'operation', 'actorId'])
    .where('requestId', '=', requestId)
    .execute()

describe('ingredients', () => {
  it('finds names that begin with what was typed before those that contain it', async () => {
    for (const inciName of ['Squalane', 'Aqua', 'Hydrogenated Squalene Extract']) {
      const body = { id: newId(), inciName, density: 0.81 }
      expect((await call(ADD, { cookie: lena.cookie, body })).status).toBe(200)
    }
    const found = await call(SEARCH, { cookie: technician.cookie, query: { q: 'squal' } })
    expect(found.body.map((row: { inciName: string }) => row.inciName)).toEqual([
      'Squalane',
      'Hydrogenated Squalene Extract',
    ])
    const signs = await call(SEARCH, { cookie: lena.cookie, query: { q: '%' } })
    expect(signs.body).toEqual([])
  })

  it('D05: adding twice with one id changes nothing; the same name under another id is refused by name', async () => {
    const body = { id: newId(), inciName: 'Tocopherol', density: 0.95, priceCentsPerKg: 2800 }
    expect((await call(ADD, { cookie: lena.cookie, body })).body.id).toBe(body.id)
    expect((await call(ADD, { cookie: lena.cookie, body })).body.id).toBe(body.id)
    const again = await call(ADD, {
      cookie: lena.cookie,
      body: { ...body, id: newId(), inciName: 'TOCOPHEROL' },
    })
    expect(again.status).toBe(409)
    expect(again.body.error.sentence).toContain('Tocopherol is already among the ingredients')
    const known = await call(KNOWN, { cookie: lena.cookie, query: { name: 'tocopherol' } })
    expect(known.body[0].id).toBe(body.id)
  })

  it('says at its place what is wrong with one', async () => {
    const answer = await call(ADD, {
      cookie: lena.cookie,
      body: { id: newId(), inciName: ' ', density: 0, priceCentsPerKg: 1.5 },
    })
    expect(answer.status).toBe(422)
    expect(Object.keys(answer.body.error.fields).sort()).toEqual(['density', 'inciName', 'priceCentsPerKg'])
  })
})

describe('a new formula', () => {
  it('D05: sent twice it is there once', async () => {
    const body = await newFormula('N10', [line('A', 'Squalane', 14), line('B', 'Aqua', 86)])
    expect((await call(CREATE, { cookie: lena.cookie, body })).status).toBe(200)
    expect(await t.owner.selectFrom('formula').select('id').where('code', '=', 'N10').execute()).toHaveLength(
      1,
    )
  })

  it('refuses a code that is taken, whatever its capitals, and one with other signs', async () => {
    const taken = await call(CREATE, {
      cookie: lena.cookie,
      body: { id: newId(), versionId: newId(), code: 'n10', name: 'Other', emulsionType: 'oil-in-water' },
    })
    expect(taken.status).toBe(409)
    expect(taken.body.error.detail.field).toBe('code')
    const odd = await call(CREATE, {
      cookie: lena.cookie,
      body: { id: newId(), versionId: newId(), code: 'N-10', name: '', emulsionType: 'paste' },
    })
    expect(odd.status).toBe(422)
    expect(Object.keys(odd.body.error.fields).sort()).toEqual(['code', 'emulsionType', 'name'])
  })

  it('refuses an unknown client and an unknown ingredient without a 500', async () => {
    const body = { id: newId(), versionId: newId(), code: 'N11', name: 'X', emulsionType: 'water-in-oil' }
    const client = await call(CREATE, { cookie: lena.cookie, body: { ...body, clientId: newId() } })
    expect(client.status).toBe(422)
    expect(client.body.error.fields.clientId).toBeTruthy()
    const lines = [line('A', 'Ghost Oil', 1, { ingredientId: newId() })]
    const ingredient = await call(CREATE, { cookie: lena.cookie, body: { ...body, lines } })
    expect(ingredient.status).toBe(422)
    expect(ingredient.body.error.fields['lines.0.inciName']).toContain('Ghost Oil')
  })

  it('is not for a technician', async () => {
    const answer = await call(CREATE, { cookie: technician.cookie, body: {} })
    expect(answer.status).toBe(403)
  })
})

describe('saving a draft', () => {
  it('R01: leaves one trail row per changed row and none for those that stayed', async () => {
    const [oil, water, gum] = [line('A', 'Squalane', 14), line('B', 'Aqua', 85), line('B', 'Xanthan Gum', 1)]
    await newFormula('N20', [oil, water, gum], [step('Heat A')])
    const draft = await draftOf('N20')
    const [first, second] = draft.lines
    const answer = await save('N20', {
      ...draft,
      lines: [first, { ...second, percentThousandths: 86_000 }],
      steps: [...draft.steps, step('B into A', { phase: 'B into A', minutes: 40 })],
    })
    expect(answer.status, JSON.stringify(answer.body)).toBe(200)
    const trail = await trailOf(answer.headers.get('x-request-id'))
    expect(trail.map((row) => `${row.operation} ${row.tableName}`).sort()).toEqual([
      'delete formula_line',
      'insert formula_step',
      'update formula_line',
      'update formula_version',
    ])
    expect(new Set(trail.map((row) => row.actorId))).toEqual(new Set([lena.actor.personId]))
    expect(new Set(trail.map((row) => row.rowId)).size).toBe(4)
  })

  it('D06: the second of two editors is told who changed what, and nothing is lost', async () => {
    await newFormula('N21', [line('A', 'Squalane', 14), line('B', 'Aqua', 86)])
    const draft = await draftOf('N21')
    const change = (percentThousandths: number) => ({
      ...draft,
      lines: draft.lines.map((row) => (row.inciName === 'Aqua' ? { ...row, percentThousandths } : row)),
    })
    expect((await save('N21', change(85_000), rolf)).status).toBe(200)
    const stale = await save('N21', change(84_000))
    expect(stale.status).toBe(412)
    expect(stale.body.error.sentence).toContain(
      'Rolf Adler has saved N21 since you opened it and changed Aqua.',
    )
    expect(stale.body.error.detail.changed).toEqual(['Aqua'])
    expect((await load('N21')).lines[1].percentThousandths).toBe(85_000)
  })

  it('takes moved lines, a moved remainder and an emptied draft', async () => {
    const lines = [line('A', 'Squalane', 14), line('B', 'Aqua', 86, { isRemainder: true })]
    await newFormula('N22', lines, [step('Stir')])
    const draft = await draftOf('N22')
    const turned = draft.lines.toReversed().map((row) => ({ ...row, isRemainder: !row.isRemainder }))
    expect((await save('N22', { ...draft, lines: turned })).status).toBe(200)
    const after = await load('N22')
    expect(after.lines.map((row: { inciName: string }) => row.inciName)).toEqual(['Aqua', 'Squalane'])
    expect(after.lines[1].isRemainder).toBe(true)
    expect((await save('N22', { ...draft, version: 2, lines: [], steps: [] })).status).toBe(200)
    expect((await load('N22')).lines).toEqual([])
  })

  it('says at its place what is wrong with a line', async () => {
    await newFormula('N23')
    const draft = await draftOf('N23')
    const lines = [
      line('', 'Aqua', 86),
      line('A', '', 101, { density: -1 }),
      line('A', 'Squalane', 0, { percentThousandths: 0.5 }),
    ]
    const answer = await save('N23', { ...draft, lines })
    expect(answer.status).toBe(422)
    expect(Object.keys(answer.body.error.fields).sort()).toEqual([
      'lines.0.phase',
      'lines.1.density',
      'lines.1.inciName',
      'lines.1.percentThousandths',
      'lines.2.percentThousandths',
    ])
    const two = [line('A', 'Squalane', 1, { isRemainder: true }), line('A', 'Aqua', 1, { isRemainder: true })]
    expect((await save('N23', { ...draft, lines: two })).body.error.sentence).toContain('Only one line')
  })

  it('does not pull a line over from another formula', async () => {
    const own = line('A', 'Squalane', 100)
    await newFormula('N24', [own])
    await newFormula('N25')
    const answer = await save('N25', { ...(await draftOf('N25')), lines: [own] })
    expect(answer.status).toBe(409)
    expect((await load('N24')).lines).toHaveLength(1)
  })

  it('answers 404 for a formula, a version or a draft that is not there', async () => {
    const draft = { ...(await draftOf('N25')) }
    expect((await save('N99', draft)).status).toBe(404)
    expect((await save('N25', { ...draft, versionId: newId() })).status).toBe(404)
    expect((await call(GET, { cookie: lena.cookie, params: { code: 'N99' } })).status).toBe(404)
    const version = await call(GET, { cookie: lena.cookie, params: { code: 'N25' }, query: { version: '9' } })
    expect(version.status).toBe(404)
    expect(version.body.error.sentence).toContain('no version 9')
  })
})

describe('versions', () => {
  it('R10: a version that a batch uses is locked; a new one begins as its copy, one draft at a time', async () => {
    const made = await newFormula(
      'N30',
      [line('A', 'Squalane', 14), line('B', 'Aqua', 86, { isRemainder: true })],
      [step('B into A', { phase: 'B into A' })],
    )
    const early = { id: newId(), fromVersionId: made.versionId }
    const twoDrafts = await call(NEW_VERSION, { cookie: lena.cookie, params: { code: 'N30' }, body: early })
    expect(twoDrafts.status).toBe(409)
    const batch = { id: newId(), formulaVersionId: made.versionId, sizeG: 1000 }
    expect((await call(MAKE, { cookie: lena.cookie, body: batch })).status).toBe(200)
    const locked = await save('N30', { ...(await draftOf('N30')) })
    expect(locked.status).toBe(409)
    expect(locked.body.error.sentence).toContain('locked because a batch uses it')

    const body = { id: newId(), fromVersionId: made.versionId, note: 'More gum' }
    const next = await call(NEW_VERSION, { cookie: lena.cookie, params: { code: 'N30' }, body })
    expect(next.body).toEqual({ id: body.id, number: 2 })
    const again = await call(NEW_VERSION, { cookie: lena.cookie, params: { code: 'N30' }, body })
    expect(again.body).toEqual({ id: body.id, number: 2 })
    const page = await load('N30')
    expect(page.lines.map((row: { inciName: string }) => row.inciName)).toEqual(['Squalane', 'Aqua'])
    expect(page.lines[0].id).not.toBe(made.lines[0])
    expect(page.before.number).toBe(1)
    expect(page.versions[0].batchCodes).toEqual(['N30-1'])
    expect((await load('N30', { version: '1' })).state).toBe('locked')
  })

  it('keeps the emulsion type once a batch was made', async () => {
    const answer = await save('N30', { ...(await draftOf('N30')), emulsionType: 'oil-in-water' })
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields.emulsionType).toContain('water-in-oil')
  })

  it('answers 404 where there is nothing to begin from', async () => {
    const body = { id: newId(), fromVersionId: newId() }
    for (const code of ['N30', 'N99']) {
      expect((await call(NEW_VERSION, { cookie: lena.cookie, params: { code }, body })).status).toBe(404)
    }
  })
})

describe('the list', () => {
  it('shows internal phase by volume and batches, searched and sorted', async () => {
    await newFormula('N9', [
      line('A', 'Squalane', 20, { density: 0.8 }),
      line('B', 'Aqua', 80, { density: 1 }),
    ])
    const all = await call(LIST, { cookie: lena.cookie })
    expect(all.body.rows[0].code).toBe('N9')
    // 80 / 1 of 80 / 1 + 20 / 0.8 mL
    expect(all.body.rows[0].internalVolumePercent).toBeCloseTo(76.19, 2)
    expect(all.body.rows[0].isHighInternalPhase).toBe(true)
    const found = await call(LIST, { cookie: lena.cookie, query: { q: 'cream n3', sort: 'batches' } })
    expect(found.body.rows.map((row: { code: string }) => row.code)).toEqual(['N30'])
    expect(found.body.rows[0].batches).toEqual([{ code: 'N30-1', state: 'making' }])
    const odd = await call(LIST, { cookie: lena.cookie, query: { sort: 'nothing', order: 'x' } })
    expect(odd.status).toBe(200)
  })
})
