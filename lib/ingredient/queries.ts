import { sql, type Expression, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { pageOf } from '@/lib/list/queries/page'
import { naturally, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { comparable, matchOf } from './rules'
import { fromMemory } from './schema'

type BookQuery = ListQuery<'phase' | 'function' | 'source'>

const lineColumns = [
  'ingredient.id',
  'ingredient.inciName',
  'ingredient.function',
  'ingredient.density',
  'ingredient.isOilPhase',
  'ingredient.priceCentsPerKg',
  'ingredient.caution',
] as const
const nameColumns = ['ingredient.synonyms', 'ingredient.supplierName'] as const
const figureColumns = [
  'ingredient.densitySource',
  'ingredient.percentLowThousandths',
  'ingredient.percentHighThousandths',
  'ingredient.rangeSource',
  'ingredient.acidValue',
  'ingredient.baseValue',
  'ingredient.phLow',
  'ingredient.phHigh',
  'ingredient.meltsAboveC',
  'ingredient.holdsInternalPercent',
  'ingredient.figuresSource',
] as const

/** At most twelve: INCI names that begin with what was typed, those that contain it, then by synonym or supplier's name. */
export async function searchIngredients(db: Db, _actor: Actor, q: string) {
  const typed = likeText(q)
  const rows = await db
    .selectFrom('ingredient')
    .select([...lineColumns, ...nameColumns])
    .where(namedLike(`%${typed}%`))
    .orderBy(sql`lower(inci_name) not like ${`${typed}%`}`)
    .orderBy(sql`lower(inci_name) not like ${`%${typed}%`}`)
    .orderBy(sql`lower(inci_name)`)
    .limit(12)
    .execute()
  return rows.map((row) => ({ ...row, match: matchOf(row, q) }))
}

export type FoundIngredient = Awaited<ReturnType<typeof searchIngredients>>[number]

/** Those of the names that are in the book, as INCI name, synonym or supplier's own name, whatever their capitals and spaces. */
export async function listIngredientsNamed(db: Db, _actor: Actor, names: readonly string[]) {
  const wanted = names.map(comparable)
  if (!wanted.length) return []
  return db
    .selectFrom('ingredient')
    .select([...lineColumns, ...nameColumns])
    .where((eb) =>
      eb.or([
        eb(compared(sql`inci_name`), 'in', wanted),
        eb(compared(sql`supplier_name`), 'in', wanted),
        eb.exists(
          eb
            .selectFrom(sql<{ name: string }>`unnest(ingredient.synonyms)`.as<'synonym'>(sql`synonym(name)`))
            .select('synonym.name')
            .where(compared(sql`synonym.name`), 'in', wanted),
        ),
      ]),
    )
    .execute()
}

export type IngredientRow = Awaited<ReturnType<typeof listIngredientsNamed>>[number]

/** What the questions to a formula ask of its ingredients. */
export async function listIngredientFacts(db: Db, _actor: Actor, ids: readonly string[]) {
  if (!ids.length) return []
  return db
    .selectFrom('ingredient')
    .select(['ingredient.id', 'ingredient.density', ...figureColumns])
    .where('ingredient.id', 'in', [...ids])
    .execute()
}

/** The same, of what the lines of a formula's version name. */
export async function listFactsOfVersion(db: Db | Trx, formulaVersionId: string) {
  return db
    .selectFrom('ingredient')
    .select(['ingredient.id', 'ingredient.density', ...figureColumns])
    .where('ingredient.id', 'in', (eb) =>
      eb
        .selectFrom('formulaLine')
        .select((line) => line.ref('formulaLine.ingredientId').$notNull().as('ingredientId'))
        .where('formulaLine.formulaVersionId', '=', formulaVersionId)
        .where('formulaLine.ingredientId', 'is not', null),
    )
    .execute()
}

export type IngredientFacts = Awaited<ReturnType<typeof listIngredientFacts>>[number]

/** One page of the book, how many densities are from memory, and the functions to filter by. */
export async function listIngredientBook(db: Db, actor: Actor, query: BookQuery) {
  const page = await pageOf(db, ingredientSource(db, actor, query), query)
  return { ...page, counts: await countBook(db), choices: { function: await listFunctions(db) } }
}

export type IngredientBook = Awaited<ReturnType<typeof listIngredientBook>>

export function ingredientSource(db: Db, _actor: Actor, { q, filters }: BookQuery): Source<BookRow> {
  const { phase, function: use, source } = filters
  return {
    from: sql`ingredient`,
    where: [
      ...(q ? [sql<SqlBool>`${namedLike(`%${likeText(q)}%`)}`] : []),
      ...(phase ? [sql<SqlBool>`is_oil_phase = ${phase === 'oil'}`] : []),
      ...(use ? [sql<SqlBool>`function = ${use}`] : []),
      ...(source ? [sql<SqlBool>`(density_source = ${fromMemory}) = ${source === 'from memory'}`] : []),
    ],
    id: sql`ingredient.id`,
    idKind: 'uuid',
    sorts: {
      inciName: naturally('ingredient.inciName'),
      function: naturally('ingredient.function'),
      density: { by: sql`density`, kind: 'number' },
      price: { by: sql`price_cents_per_kg`, kind: 'number' },
      supplierName: { by: sql`nullif(supplier_name, '') collate natural_order`, kind: 'text' },
      densitySource: naturally('ingredient.densitySource'),
      melts: { by: sql`melts_above_c`, kind: 'number' },
      acid: { by: sql`acid_value`, kind: 'number' },
      base: { by: sql`base_value`, kind: 'number' },
    },
    rows: (ids) => bookRows(db, q, ids),
    idOf: (row) => row.id,
  }
}

async function bookRows(db: Db, q: string, ids: string[]) {
  const rows = await db
    .selectFrom('ingredient')
    .select([...lineColumns, ...nameColumns, ...figureColumns])
    .select(['ingredient.note', 'ingredient.version'])
    .where(sql<SqlBool>`ingredient.id = any(${ids}::uuid[])`)
    .execute()
  const usedIn = await countFormulas(db, ids)
  return rows.map((row) => ({ ...row, usedIn: usedIn.get(row.id) ?? 0, match: matchOf(row, q) }))
}

export type BookRow = Awaited<ReturnType<typeof bookRows>>[number]

/** Of the whole book, whatever is searched for. */
async function countBook(db: Db) {
  return db
    .selectFrom('ingredient')
    .select((eb) => [
      eb.fn.countAll<number>().as('all'),
      eb.fn.countAll<number>().filterWhere('densitySource', '=', fromMemory).as('fromMemory'),
    ])
    .executeTakeFirstOrThrow()
}

/** One ingredient with the formulas that use it and who changed it last. */
export async function getIngredient(db: Db, _actor: Actor, id: string) {
  const row = await db
    .selectFrom('ingredient')
    .select([...lineColumns, ...nameColumns, ...figureColumns])
    .select(['ingredient.note', 'ingredient.version', 'ingredient.createdAt'])
    .where('ingredient.id', '=', id)
    .executeTakeFirst()
  if (!row) throw refuse.notFound('That ingredient is not in the book. Look for it in the list.')
  const [formulas, changes] = await Promise.all([
    db
      .selectFrom('formulaLine')
      .innerJoin('formulaVersion', 'formulaVersion.id', 'formulaLine.formulaVersionId')
      .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
      .select(['formula.code', 'formula.name'])
      .where('formulaLine.ingredientId', '=', id)
      .groupBy(['formula.code', 'formula.name'])
      .orderBy('formula.code')
      .limit(200)
      .execute(),
    db
      .selectFrom('trail')
      .innerJoin('person', 'person.id', 'trail.actorId')
      .select(['person.name as by', 'trail.at', 'trail.operation'])
      .where('trail.tableName', '=', 'ingredient')
      .where('trail.rowId', '=', id)
      .orderBy('trail.id', 'desc')
      .limit(1)
      .execute(),
  ])
  return { ...row, formulas, lastChange: changes[0] ?? null }
}

export type IngredientPage = Awaited<ReturnType<typeof getIngredient>>

/** Of the rows on the page alone: beside every row that is passed over to reach it, it would cost seconds. */
async function countFormulas(db: Db, ids: string[]): Promise<Map<string | null, number>> {
  if (!ids.length) return new Map()
  const rows = await db
    .selectFrom('formulaLine')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'formulaLine.formulaVersionId')
    .select('formulaLine.ingredientId')
    .select((eb) => eb.fn.count<number>('formulaVersion.formulaId').distinct().as('formulas'))
    .where('formulaLine.ingredientId', 'in', ids)
    .groupBy('formulaLine.ingredientId')
    .execute()
  return new Map(rows.map((row) => [row.ingredientId, row.formulas]))
}

async function listFunctions(db: Db): Promise<string[]> {
  const rows = await db
    .selectFrom('ingredient')
    .select('function')
    .distinct()
    .where('function', '!=', '')
    .orderBy('function')
    .limit(300)
    .execute()
  return rows.map((row) => row.function)
}

function namedLike(typed: string): Expression<SqlBool> {
  return sql<SqlBool>`(lower(inci_name) like ${typed} or lower(supplier_name) like ${typed}
    or lower(array_to_string(synonyms, chr(10))) like ${typed})`
}

/** As `comparable` has it. */
function compared(name: Expression<unknown>) {
  return sql<string>`lower(regexp_replace(btrim(${name}), '\\s+', ' ', 'g'))`
}

function likeText(q: string): string {
  return comparable(q).replace(/[\\%_]/g, '\\$&')
}
