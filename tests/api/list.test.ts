import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as BATCHES } from '@/app/api/batches/route'
import { GET as FORMULAS } from '@/app/api/formulas/route'
import { GET as FORMULA_FILE } from '@/app/api/formulas/export/route'
import { GET as BOOK } from '@/app/api/ingredients/book/route'
import { GET as BOOK_FILE } from '@/app/api/ingredients/export/route'
import { GET as STUDIES, POST as startStudy } from '@/app/api/studies/route'
import { GET as STUDY_FILE } from '@/app/api/studies/export/route'
import { GET as JARS } from '@/app/api/studies/[code]/jars/route'
import { GET as JAR_FILE } from '@/app/api/studies/[code]/jars/export/route'
import { GET as READINGS } from '@/app/api/studies/[code]/readings/route'
import { GET as READING_FILE } from '@/app/api/studies/[code]/readings/export/route'
import { GET as TRAIL } from '@/app/api/trail/route'
import { GET as TRAIL_FILE } from '@/app/api/trail/export/route'
import { GET as FLAGS } from '@/app/api/flags/route'
import { GET as CASES } from '@/app/api/cases/route'
import { GET as REPORTS } from '@/app/api/reports/route'
import { GET as PROTOCOLS } from '@/app/api/protocols/route'
import { GET as INSTRUMENTS } from '@/app/api/instruments/route'
import { GET as STATIONS } from '@/app/api/stations/route'
import { GET as PEOPLE } from '@/app/api/people/route'
import { batchList } from '@/lib/batch/rules/list'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { flagList } from '@/lib/flag/rules/list'
import { formulaList } from '@/lib/formula/rules/list'
import type { Route } from '@/lib/http/route'
import { addIngredients } from '@/lib/ingredient/commands'
import { ingredientList } from '@/lib/ingredient/rules'
import { ingredientInput } from '@/lib/ingredient/schema'
import { instrumentList } from '@/lib/instrument/rules/list'
import type { List } from '@/lib/list/schema'
import { personList } from '@/lib/person/rules'
import { protocolList } from '@/lib/protocol/rules/list'
import { reportList } from '@/lib/report/rules'
import { caseList } from '@/lib/shelf-case/rules/list'
import { stationList } from '@/lib/station/rules/list'
import { jarList } from '@/lib/study/rules/jar-list'
import { studyList } from '@/lib/study/rules/list'
import { readingList } from '@/lib/study/rules/reading-list'
import { trailList } from '@/lib/trail/rules/list'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '../support/running-study'
import { countStatements } from '../support/statements'

let t: TestDatabase
let lena: Signed
let manager: Signed
let study: { code: string; id: string }

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  lena = await t.person('formulator', { name: 'Lena' })
  manager = await t.person('manager')
  await makeStations(lena.actor)
  const protocolVersionId = await makeProtocol(lena.actor)
  const batchId = await makeBatch(lena.actor, { code: 'LIST-1' })
  const id = newId()
  const body = { id, title: '=cmd, "quoted"', protocolVersionId, batchIds: [batchId] }
  const input = { ...body, initialReadings: initialOf(batchId) }
  const started = await call(startStudy, { cookie: lena.cookie, body: input })
  study = { id, code: started.body.code }
  // Prices are equal for many and missing for some, so that neither sorts by itself.
  const many = Array.from({ length: 130 }, (_, i) =>
    ingredientInput.parse({
      ...{ id: newId(), inciName: `Item ${i}`, density: 1 + (i % 3) / 10, function: i % 2 ? 'oil' : '' },
      priceCentsPerKg: i % 4 === 0 ? null : 100 * (i % 5),
    }),
  )
  await transact(t.db, lena.actor, {}, (trx) => addIngredients(trx, lena.actor, many))
}, 120_000)
afterAll(() => t.close())

type Page = { rows: { id: string }[]; next: string | null; previous: string | null; total: number }
const book = async (query: Record<string, string>): Promise<Page> =>
  (await call(BOOK, { cookie: lena.cookie, query })).body

async function walk(query: Record<string, string>): Promise<string[][]> {
  const pages: string[][] = []
  let page = await book(query)
  for (;;) {
    pages.push(page.rows.map((row) => row.id))
    if (page.next === null) return pages
    page = await book({ ...query, after: page.next })
  }
}

describe('pages', () => {
  it.each(['inciName', 'function', 'density', 'price', 'supplierName', 'melts'])(
    'by %s neither skip nor repeat a row in either order, whatever is equal or empty',
    async (sort) => {
      for (const order of ['asc', 'desc']) {
        const pages = await walk({ sort, order })
        const ids = pages.flat()
        expect(new Set(ids).size).toBe(ids.length)
        expect(ids.length).toBe((await book({})).total)
      }
    },
  )

  it('have what is empty at the end in either order', async () => {
    for (const order of ['asc', 'desc']) {
      const all: { priceCentsPerKg: number | null }[] = []
      let page = (await call(BOOK, { cookie: lena.cookie, query: { sort: 'price', order } })).body
      for (;;) {
        all.push(...page.rows)
        if (!page.next) break
        const query = { sort: 'price', order, after: page.next }
        page = (await call(BOOK, { cookie: lena.cookie, query })).body
      }
      const prices = all.map((row) => row.priceCentsPerKg)
      const told = prices.filter((price) => price !== null)
      expect(prices.slice(0, told.length)).toEqual(told)
      expect(told).toEqual(told.toSorted((a, b) => (order === 'asc' ? a - b : b - a)))
    }
  })

  it('go back the way they came', async () => {
    const query = { sort: 'price', order: 'desc' }
    const [first, second, third] = await walk(query)
    const last = await book({
      ...query,
      after: (await book({ ...query, after: (await book(query)).next! })).next!,
    })
    expect(last.rows.map((row) => row.id)).toEqual(third)
    const back = await book({ ...query, before: last.previous! })
    expect(back.rows.map((row) => row.id)).toEqual(second)
    const begin = await book({ ...query, before: back.previous! })
    expect([begin.rows.map((row) => row.id), begin.previous]).toEqual([first, null])
  })

  it('stay whole when rows come in between them', async () => {
    const before = await book({ q: 'item' })
    const add = (inciName: string) =>
      transact(t.db, lena.actor, {}, (trx) =>
        addIngredients(trx, lena.actor, [ingredientInput.parse({ id: newId(), inciName, density: 1 })]),
      )
    const early = 'Item 0 early'
    await add(early)
    await add('Item 999 late')
    const seen = [...before.rows.map((row) => row.id)]
    let page = before
    while (page.next) {
      page = await book({ q: 'item', after: page.next })
      seen.push(...page.rows.map((row) => row.id))
    }
    expect(new Set(seen).size).toBe(seen.length)
    // The 130 that were there and the late one; the early one came in on a page that was read already.
    expect(seen).toHaveLength(131)
  })

  it('orders codes as people do', async () => {
    const names = (await call(BOOK, { cookie: lena.cookie, query: { q: 'item 1' } })).body.rows.map(
      (row: { inciName: string }) => row.inciName,
    )
    expect(names.slice(0, 3)).toEqual(['Item 1', 'Item 10', 'Item 11'])
    const two = (await book({ sort: 'inciName' })) as unknown as { rows: { inciName: string }[] }
    const order = two.rows.map((row) => row.inciName)
    expect(order.indexOf('Item 2')).toBeLessThan(order.indexOf('Item 10'))
  })
})

const lists: { list: List<never>; route: Route; who?: () => Signed }[] = [
  { list: formulaList as never, route: FORMULAS },
  { list: batchList as never, route: BATCHES },
  { list: ingredientList as never, route: BOOK },
  { list: protocolList as never, route: PROTOCOLS },
  { list: studyList as never, route: STUDIES },
  { list: flagList as never, route: FLAGS },
  { list: caseList as never, route: CASES },
  { list: reportList as never, route: REPORTS },
  { list: instrumentList as never, route: INSTRUMENTS },
  { list: stationList as never, route: STATIONS },
  { list: personList as never, route: PEOPLE, who: () => manager },
  { list: jarList as never, route: JARS },
  { list: readingList as never, route: READINGS },
  { list: trailList as never, route: TRAIL },
]
const look = (route: Route, query: Record<string, string>, who = lena) =>
  call(route, { cookie: who.cookie, params: { code: study.code }, query })

describe.each(lists.map(({ list, ...rest }) => ({ name: list.name, list, ...rest })))(
  'the list of $name',
  ({ list, route, who = () => lena }) => {
    it('sorts by every column that says so, both ways, with the same rows', async () => {
      const ids = async (query: Record<string, string>) => {
        const answer = await look(route, query, who())
        expect([query, answer.status]).toEqual([query, 200])
        return answer.body.rows.length as number
      }
      const count = await ids({})
      const sorted = list.columns.filter((column) => column.sort)
      expect(sorted.length).toBeGreaterThan(0)
      for (const { key } of sorted)
        for (const order of ['asc', 'desc']) expect(await ids({ sort: key, order })).toBe(count)
    })

    it('takes every filter, and addresses that nobody wrote', async () => {
      for (const [key, filter] of Object.entries<{ kind: string; options: readonly string[] | null }>(
        list.filters,
      ))
        for (const value of [...(filter.options ?? ['O’Hara; --']), '2026-03-29', '2026-13-45', '%'])
          expect([key, value, (await look(route, { [key]: value, q: '%_\\' }, who())).status]).toEqual([
            key,
            value,
            200,
          ])
      const odd: Record<string, string>[] = [
        { sort: 'constructor', order: 'up', columns: '__proto__,x', after: 'x' },
        { after: Buffer.from('["9","9"]').toString('base64url') },
        { before: Buffer.from('[null,"0197"]').toString('base64url') },
        { after: Buffer.from(`["2026-99-99 00:00:00+00","${newId()}"]`).toString('base64url') },
        { q: '\u0000' },
      ]
      for (const query of odd) expect([query, (await look(route, query, who())).status]).toEqual([query, 200])
    })
  },
)

describe('statements', () => {
  it('of a list do not grow with its rows', async () => {
    const few = await countStatements(() => look(BOOK, { q: 'item 12' }))
    const many = await countStatements(() => look(BOOK, {}))
    expect(many.count).toBeLessThanOrEqual(few.count)
    expect((await countStatements(() => look(STUDIES, {}))).count).toBeLessThanOrEqual(16)
    expect((await countStatements(() => look(JARS, {}))).count).toBeLessThanOrEqual(8)
    expect((await countStatements(() => look(READINGS, {}))).count).toBeLessThanOrEqual(9)
    expect((await countStatements(() => look(TRAIL, {}))).count).toBeLessThanOrEqual(6)
  })
})

describe('A09, R09: a file', () => {
  it('holds every page of what is searched for, in the chosen columns', async () => {
    const query = { q: 'item', columns: 'inciName,density', sort: 'density', order: 'desc' }
    const answer = await call(BOOK_FILE, { cookie: lena.cookie, query })
    expect(answer.headers.get('content-disposition')).toMatch(/ingredients-\d{4}-\d\d-\d\d\.csv/)
    const bytes = Buffer.from(await answer.response.arrayBuffer())
    expect([...bytes.subarray(0, 3)]).toEqual([0xef, 0xbb, 0xbf])
    const lines = bytes.subarray(3).toString().trim().split('\r\n')
    expect(lines[0]).toBe('INCI name,g/mL')
    expect(lines).toHaveLength(1 + (await book({ q: 'item' })).total)
    expect(lines[1]).toMatch(/^Item \d+,1\.2$/)
  })

  it('obeys whose rows they are, as the list does', async () => {
    const client = await t.person('client')
    const own = await call(STUDY_FILE, { cookie: client.cookie })
    expect([own.status, (await own.response.text()).trim().split('\r\n')]).toEqual([
      200,
      [expect.any(String)],
    ])
    expect((await call(STUDIES, { cookie: client.cookie })).body.choices.client).toEqual([])
    for (const route of [FORMULA_FILE, BOOK_FILE, TRAIL_FILE])
      expect((await call(route, { cookie: client.cookie })).status).toBe(403)
    for (const route of [JAR_FILE, READING_FILE])
      expect((await call(route, { cookie: client.cookie, params: { code: study.code } })).status).toBe(403)
    const technician = await t.person('technician')
    const record = await call(TRAIL_FILE, { cookie: technician.cookie, query: { columns: 'who' } })
    const who = (await record.response.text()).trim().split('\r\n').slice(1)
    expect(new Set(who)).toEqual(new Set([technician.actor.name]))
  })

  it('shares its studies with their client alone', async () => {
    const client = await t.person('client')
    await t.owner.transaction().execute(async (trx) => {
      await trx.executeQuery({
        sql: `select set_config('app.actor_id', '${manager.actor.personId}', true)`,
        parameters: [],
      } as never)
      await trx
        .updateTable('study')
        .set({ clientId: client.actor.clientId, isShared: true })
        .where('id', '=', study.id)
        .execute()
    })
    const query = { columns: 'code,title' }
    const text = await (await call(STUDY_FILE, { cookie: client.cookie, query })).response.text()
    expect(text.trim().split('\r\n').slice(1)).toEqual([`${study.code},"'=cmd, ""quoted"""`])
  })

  it('is on the trail with what it held', async () => {
    const qa = await t.person('qa')
    const first = await call(JAR_FILE, {
      cookie: qa.cookie,
      params: { code: study.code },
      query: { format: 'xlsx', q: '45' },
    })
    await first.response.arrayBuffer()
    const entry = await t.db
      .selectFrom('trail')
      .select(['event', 'after'])
      .where('actorId', '=', qa.actor.personId)
      .where('operation', '=', 'event')
      .orderBy('id', 'desc')
      .executeTakeFirstOrThrow()
    expect(entry.event).toBe(`exported the jars of ${study.code}`)
    expect(entry.after).toMatchObject({ format: 'xlsx', search: '45', study_id: study.id })
  })

  it('A11: is taken by a person one at a time', async () => {
    const qa = await t.person('qa')
    const ask = () =>
      BOOK_FILE(new Request('http://lab.example/api/test', { headers: { cookie: qa.cookie } }), {
        params: Promise.resolve({}),
      })
    const first = await ask()
    const second = await ask()
    expect([first.status, second.status]).toEqual([200, 429])
    await first.text()
    expect((await ask()).status).toBe(200)
  })
})
