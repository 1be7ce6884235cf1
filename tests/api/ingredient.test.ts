import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as BOOK } from '@/app/api/ingredients/book/route'
import { GET as FACTS } from '@/app/api/ingredients/facts/route'
import { GET as KNOWN } from '@/app/api/ingredients/known/route'
import { GET, PUT } from '@/app/api/ingredients/[id]/route'
import { GET as SEARCH, POST as ADD } from '@/app/api/ingredients/route'
import { POST as CREATE } from '@/app/api/formulas/route'
import { demoIngredients } from '@/fixtures/demo/ingredients'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { addIngredients } from '@/lib/ingredient/commands'
import type { IngredientRow } from '@/lib/ingredient/queries'
import { findNamed } from '@/lib/ingredient/rules'
import { ingredientInput } from '@/lib/ingredient/schema'
import { call } from '../support/call'
import { countStatements } from '../support/statements'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let lena: Signed
let rolf: Signed
let technician: Signed
const squalane = newId()
const vitamin = newId()

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  rolf = await t.person('formulator', { name: 'Rolf Adler' })
  technician = await t.person('technician')
  const entries = [
    {
      id: squalane,
      inciName: 'Squalane',
      function: 'oil',
      density: 0.81,
      isOilPhase: true,
      supplierName: 'Olive 92',
    },
    {
      id: vitamin,
      inciName: 'Tocopherol',
      function: 'antioxidant',
      density: 0.95,
      isOilPhase: true,
      synonyms: ['Vitamin E', 'vitamin e', 'TOCOPHEROL'],
    },
    {
      id: newId(),
      inciName: 'Glycerin',
      function: 'humectant',
      density: 1.261,
      densitySource: 'pycnometer',
      priceCentsPerKg: 160,
    },
    { id: newId(), inciName: 'Olea Europaea Fruit Oil', function: 'oil', density: 0.913, isOilPhase: true },
  ]
  for (const body of entries) expect((await call(ADD, { cookie: lena.cookie, body })).status).toBe(200)
})
afterAll(() => t.close())

const book = async (query: Record<string, string> = {}, who = technician) =>
  (await call(BOOK, { cookie: who.cookie, query })).body
const names = (rows: { inciName: string }[]) => rows.map((row) => row.inciName)
const one = async (id: string) => (await call(GET, { cookie: technician.cookie, params: { id } })).body
const change = (id: string, body: unknown, who = lena, headers?: Record<string, string>) =>
  call(PUT, { cookie: who.cookie, method: 'PUT', params: { id }, body, ...(headers ? { headers } : {}) })

async function bodyOf(id: string) {
  const { id: _id, createdAt: _at, formulas: _formulas, lastChange: _change, ...fields } = await one(id)
  return fields
}

describe('search as one types', () => {
  it('finds synonyms and suppliers’ names after INCI names, and says which matched', async () => {
    const search = async (q: string) => (await call(SEARCH, { cookie: lena.cookie, query: { q } })).body
    const byNames = await search('ol')
    expect(names(byNames)).toEqual(['Olea Europaea Fruit Oil', 'Tocopherol', 'Squalane'])
    expect(byNames.map((row: { match: unknown }) => row.match)).toEqual([
      null,
      null,
      { in: 'supplier', text: 'Olive 92' },
    ])
    const [found] = await search('VITAMIN')
    expect(found).toMatchObject({ inciName: 'Tocopherol', match: { in: 'synonym', text: 'Vitamin E' } })
    expect(found.synonyms).toEqual(['Vitamin E'])
  })
})

describe('the book', () => {
  it('is searched, filtered and sorted on the server, and bad addresses are no fault', async () => {
    expect(names((await book({ q: 'olive' })).rows)).toEqual(['Squalane'])
    expect(names((await book({ phase: 'water' })).rows)).toEqual(['Glycerin'])
    expect(names((await book({ function: 'oil', sort: 'density', order: 'desc' })).rows)).toEqual([
      'Olea Europaea Fruit Oil',
      'Squalane',
    ])
    const priced = await book({ sort: 'price' })
    expect(names(priced.rows)[0]).toBe('Glycerin')
    expect([priced.total, priced.counts]).toEqual([4, { all: 4, fromMemory: 3 }])
    expect(priced.choices.function).toEqual(['antioxidant', 'humectant', 'oil'])
    const odd = await call(BOOK, {
      cookie: technician.cookie,
      query: { q: '%\u0000', phase: 'gas', sort: 'x', after: 'nowhere', order: 'up' },
    })
    expect([odd.status, odd.body.total]).toEqual([200, 0])
  })

  it('says in how many formulas an ingredient is used, each once', async () => {
    const line = (phase: string) => ({
      ...{ id: newId(), phase, ingredientId: squalane, inciName: 'Squalane' },
      ...{ percentThousandths: 5000, density: 0.81, isInternal: false },
    })
    for (const code of ['U1', 'U2']) {
      const body = { id: newId(), versionId: newId(), code, name: code, emulsionType: 'water-in-oil' }
      const made = await call(CREATE, {
        cookie: lena.cookie,
        body: { ...body, lines: [line('A'), line('C')] },
      })
      expect(made.status).toBe(200)
    }
    const [row] = (await book({ q: 'squalane' })).rows
    expect(row.usedIn).toBe(2)
    expect((await one(squalane)).formulas.map((formula: { code: string }) => formula.code)).toEqual([
      'U1',
      'U2',
    ])
  })

  it('turns its pages in no more statements than one page takes', async () => {
    const few = await countStatements(() => book())
    const more = Array.from({ length: 120 }, (_, i) =>
      ingredientInput.parse({ id: newId(), inciName: `Zz ${1000 + i}`, density: 1 }),
    )
    await transact(t.db, lena.actor, {}, (trx) => addIngredients(trx, lena.actor, more))
    const many = await countStatements(() => book())
    expect(many.count).toBeLessThanOrEqual(few.count)
    const second = await book({ after: (await book()).next })
    const third = await book({ after: second.next })
    expect([third.total, third.before, third.rows.length, third.next]).toEqual([124, 100, 24, null])
    expect(names((await book({ before: third.previous })).rows)).toEqual(names(second.rows))
  })
})

describe('changing an entry', () => {
  it('R01: leaves one trail row with who changed what, and the page says so', async () => {
    const body = {
      ...(await bodyOf(vitamin)),
      density: 0.951,
      densitySource: 'data sheet 12',
      meltsAboveC: 3,
    }
    const answer = await change(vitamin, body)
    expect(answer.status, JSON.stringify(answer.body)).toBe(200)
    const trail = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'operation', 'before', 'after'])
      .where('requestId', '=', answer.headers.get('x-request-id'))
      .execute()
    expect(trail).toHaveLength(1)
    expect(trail[0]).toMatchObject({ before: { density: 0.95 }, after: { density: 0.951, version: 2 } })
    expect((await one(vitamin)).lastChange).toMatchObject({ by: 'Lena Brandt', operation: 'update' })
  })

  it('D06: the second of two editors is told who changed it, and theirs stays', async () => {
    const mine = await bodyOf(squalane)
    expect((await change(squalane, { ...mine, note: 'From rolf' }, rolf)).status).toBe(200)
    const stale = await change(squalane, { ...mine, note: 'From lena' })
    expect(stale.status).toBe(412)
    expect(stale.body.error.sentence).toContain('Rolf Adler changed Squalane')
    expect((await one(squalane)).note).toBe('From rolf')
  })

  it('D05: the same change sent twice under one key happens once', async () => {
    const body = { ...(await bodyOf(squalane)), note: 'Once' }
    const headers = { 'idempotency-key': newId() }
    const first = await change(squalane, body, lena, headers)
    const again = await change(squalane, body, lena, headers)
    expect([first.status, again.status]).toEqual([200, 200])
    expect(again.body).toEqual(first.body)
  })

  it('refuses a taken name, ranges turned round and absurd figures at their places', async () => {
    const body = await bodyOf(squalane)
    const taken = await change(squalane, { ...body, inciName: 'GLYCERIN' })
    expect(taken.status).toBe(422)
    expect(taken.body.error.fields.inciName).toBeTruthy()
    const turned = await change(squalane, {
      ...body,
      ...{ percentLowThousandths: 5000, percentHighThousandths: 1000, phLow: 8, phHigh: 3 },
    })
    expect(Object.keys(turned.body.error.fields).sort()).toEqual(['phHigh', 'percentHighThousandths'].sort())
    const absurd = await change(squalane, {
      ...body,
      ...{ density: 0, acidValue: 'much', meltsAboveC: 900, holdsInternalPercent: 120, synonyms: [''] },
    })
    expect(absurd.status).toBe(422)
    expect(Object.keys(absurd.body.error.fields).sort()).toEqual([
      ...['acidValue', 'density', 'holdsInternalPercent', 'meltsAboveC', 'synonyms.0'],
    ])
  })

  it('is for formulators alone, and for an entry that is there', async () => {
    const body = await bodyOf(squalane)
    expect((await change(squalane, body, technician)).status).toBe(403)
    expect((await change(newId(), body)).status).toBe(404)
    expect((await call(GET, { cookie: lena.cookie, params: { id: newId() } })).status).toBe(404)
    expect([404, 422]).toContain((await call(GET, { cookie: lena.cookie, params: { id: 'x' } })).status)
  })
})

it('facts are read for the ingredients named', async () => {
  const facts = await call(FACTS, { cookie: lena.cookie, query: { id: vitamin } })
  expect(facts.body).toMatchObject([{ id: vitamin, meltsAboveC: 3, density: 0.951 }])
  expect((await call(FACTS, { cookie: lena.cookie, query: { id: 'x' } })).status).toBe(422)
})

it('the demo’s book holds two hundred names or more, each once', () => {
  const all = demoIngredients.map(({ entry }) => entry[0].toLowerCase())
  expect(all.length).toBeGreaterThanOrEqual(200)
  expect(new Set(all).size).toBe(all.length)
})

describe('names of a pasted block', () => {
  const known = async (...name: string[]): Promise<IngredientRow[]> =>
    (
      await call(KNOWN, {
        cookie: technician.cookie,
        path: `/api/ingredients/known?${new URLSearchParams(name.map((one) => ['name', one]))}`,
      })
    ).body

  it('are found by INCI name, synonym and supplier’s own name, whatever their capitals and spaces', async () => {
    const rows = await known('  squalane ', 'OLIVE  92', 'vitamin e', 'Nothing of the kind')
    expect(rows.map((row) => row.inciName).toSorted()).toEqual(['Squalane', 'Tocopherol'])
    expect(findNamed(rows, ' SQUALANE')).toMatchObject({ row: { id: squalane }, match: null })
    expect(findNamed(rows, 'OLIVE  92')).toMatchObject({ row: { id: squalane }, match: { in: 'supplier' } })
    expect(findNamed(rows, 'vitamin e')).toMatchObject({ row: { id: vitamin }, match: { in: 'synonym' } })
    expect(findNamed(rows, 'Nothing of the kind')).toBeNull()
    // A part of a name is another name.
    expect(await known('olive', 'vitamin')).toEqual([])
  })

  it('that several ingredients have are left to a person', () => {
    const both = ['One Oil', 'Other Oil'].map((inciName) => ({
      ...{ inciName, synonyms: ['House oil'], supplierName: '' },
    }))
    expect(findNamed(both, 'house oil')).toBeNull()
    expect(findNamed(both, 'other oil')?.row.inciName).toBe('Other Oil')
  })
})
