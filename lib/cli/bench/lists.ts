import { sql } from 'kysely'
import { batchSource } from '../../batch/queries/list-batches'
import { batchList } from '../../batch/rules/list'
import { systemActor } from '../../auth/actor'
import { createDb, createPool, type Db } from '../../db/client'
import { migrate } from '../../db/migrator'
import { formulaSource } from '../../formula/queries/list-formulas'
import { formulaList } from '../../formula/rules/list'
import { ingredientSource } from '../../ingredient/queries'
import { ingredientList } from '../../ingredient/rules'
import { pageOf } from '../../list/queries/page'
import type { Source } from '../../list/queries/source'
import type { List, ListQuery } from '../../list/schema'
import { median } from '../../science/mean'
import { trailSource } from '../../trail/queries'
import { trailList } from '../../trail/rules/list'
import { atMost, plain, type Figure } from './figure'

const rows = 100_000
const scratch = 'stillstand_bench_lists'
/** The server that the tests use: it lets its administrator and the owner in without a password. */
const adminUrl =
  process.env['TEST_DATABASE_ADMIN_URL'] ?? 'postgres://stillstand_admin@127.0.0.1:54329/postgres'
const times = (ratio: number) => `${ratio.toFixed(1)} times`

/**
 * Lists of a hundred thousand rows in a database of their own: the last page beside the first, and a search that finds
 * one row beside reading every row once. Ratios of one run, so that a slow machine says the same as a quick one.
 */
export async function benchLists(): Promise<Figure[]> {
  const admin = createPool(adminUrl, 1)
  await admin.query(`drop database if exists ${scratch} with (force)`)
  await admin.query(`create database ${scratch} owner stillstand_owner`)
  const ownerUrl = new URL(adminUrl)
  ownerUrl.username = 'stillstand_owner'
  ownerUrl.password = ''
  ownerUrl.pathname = `/${scratch}`
  try {
    await migrate(ownerUrl.href)
    const pool = createPool(ownerUrl.href, 2)
    const db = createDb(() => pool)
    await fill(db)
    const figures = await measureAll(db)
    await pool.end()
    return figures
  } finally {
    await admin.query(`drop database if exists ${scratch} with (force)`)
    await admin.end()
  }
}

/** Its rows are made by PostgreSQL without triggers: a trail of them would be measured, not the lists. */
async function fill(db: Db): Promise<void> {
  const actor = systemActor().personId
  const id = (kind: number) =>
    sql`(lpad(to_hex(${sql.lit(kind)}), 8, '0') || '-0000-7000-8000-' || lpad(to_hex(i), 12, '0'))::uuid`
  const each = sql`from generate_series(1, ${sql.lit(rows)}) as i`
  await db.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${actor}, true)`.execute(trx)
    for (const table of ['ingredient', 'formula', 'formula_version', 'formula_line', 'batch', 'lab'])
      await sql`alter table ${sql.table(table)} disable trigger user`.execute(trx)
    await sql`insert into lab (id, name, time_zone) values (${actor}, 'Bench', 'UTC')`.execute(trx)
    await sql`insert into ingredient (id, inci_name, function, density, price_cents_per_kg)
      select ${id(1)}, 'Item ' || i, 'kind ' || i % 40, 0.8 + (i % 50) / 100.0, case when i % 3 > 0 then i % 900 end ${each}`.execute(
      trx,
    )
    await sql`insert into formula (id, code, name, emulsion_type, created_by, created_at)
      select ${id(2)}, 'F' || i, 'cream ' || i % 977, 'water-in-oil', ${actor}, now() - i * interval '1 minute' ${each}`.execute(
      trx,
    )
    await sql`insert into formula_version (id, formula_id, number, created_by)
      select ${id(3)}, ${id(2)}, 1, ${actor} ${each}`.execute(trx)
    await sql`insert into formula_line (id, formula_version_id, position, phase, inci_name, percent_thousandths, density, is_internal)
      select ${id(4)}, ${id(3)}, 0, 'A', 'Item ' || i, 100000, 1, i % 2 = 0 ${each}`.execute(trx)
    await sql`insert into formula_figure select ${id(2)}, ${id(3)}, (i % 1000) / 10.0, i % 1000 > 740, 0 ${each}`.execute(
      trx,
    )
    await sql`insert into batch (id, code, formula_version_id, size_g, created_by, made_at)
      select ${id(5)}, 'B' || i, ${id(3)}, 100 + i % 500, ${actor}, now() - i * interval '1 minute' ${each}`.execute(
      trx,
    )
    await sql`insert into trail (actor_id, table_name, row_id, operation, after)
      select ${actor}, 'formula', i::text, 'insert', jsonb_build_object('code', 'F' || i) ${each}`.execute(
      trx,
    )
  })
  await sql`analyze`.execute(db)
}

async function measureAll(db: Db): Promise<Figure[]> {
  const actor = { ...systemActor(), roles: ['manager' as const] }
  const book = ingredientList.query.parse({})
  const byPrice = ingredientList.query.parse({ sort: 'price' })
  const formulas = formulaList.query.parse({})
  const byName = formulaList.query.parse({ sort: 'name' })
  const batches = batchList.query.parse({})
  const record = trailList.query.parse({})
  return [
    plain('rows of each list', String(rows)),
    ...(await measure('ingredients by name', db, ingredientList, ingredientSource, actor, book)),
    ...(await measure('ingredients by price', db, ingredientList, ingredientSource, actor, byPrice)),
    ...(await measure('formulas by code', db, formulaList, formulaSource, actor, formulas)),
    ...(await measure('formulas by name', db, formulaList, formulaSource, actor, byName)),
    ...(await measure('batches, latest first', db, batchList, batchSource, actor, batches)),
    ...(await measure('record, latest first', db, trailList, trailSource, actor, record)),
  ]
}

async function measure<Line, Q extends ListQuery, A>(
  what: string,
  db: Db,
  list: Pick<List<Line>, 'sort'>,
  sourceOf: (db: Db, actor: A, query: Q) => Source<Line> | Promise<Source<Line>>,
  actor: A,
  query: Q,
): Promise<Figure[]> {
  const source = await sourceOf(db, actor, query)
  const turned = { ...query, order: query.order === 'asc' ? ('desc' as const) : ('asc' as const) }
  // The first page of the turned list ends where the list itself has its last rows; its token leads there.
  const end = await pageOf(db, source, turned)
  const last = { ...query, place: { side: 'after' as const, token: end.next ?? '' } }
  const once = await typicalMs(() =>
    sql`select count(*) from ${source.from} where ${source.id} is not null`.execute(db),
  )
  const first = await typicalMs(() => pageOf(db, source, query))
  const late = await typicalMs(() => pageOf(db, source, last))
  const sought = await sourceOf(db, actor, { ...query, q: '99 999'.replace(' ', '') })
  const search = await typicalMs(() => pageOf(db, sought, query))
  return [
    plain(`${what}: first page, every row read once`, `${first.toFixed(0)} ms, ${once.toFixed(0)} ms`),
    atMost(`${what}: last page beside the first`, late / first, 2, times),
    atMost(`${what}: a search beside reading every row once`, search / Math.max(once, 5), 25, times),
  ]
}

async function typicalMs(work: () => Promise<unknown>): Promise<number> {
  const taken: number[] = []
  await work()
  for (let round = 0; round < 7; round++) {
    const begun = performance.now()
    await work()
    taken.push(performance.now() - begun)
  }
  return median(taken)
}
