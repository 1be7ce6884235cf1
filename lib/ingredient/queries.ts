import { sql, type Expression, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { comparable, matchOf } from './rules'
import { fromMemory, ingredientPageSize, type IngredientBookQuery } from './schema'

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

/** Those of the names that are among the ingredients, whatever their capitals. */
export async function listIngredientsNamed(db: Db, _actor: Actor, names: readonly string[]) {
  const wanted = names.map(comparable)
  if (!wanted.length) return []
  return db
    .selectFrom('ingredient')
    .select(lineColumns)
    .where(sql<string>`lower(inci_name)`, 'in', wanted)
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

/** One page of the book, how many there are, and the functions to filter by: four statements, whatever its size. */
export async function listIngredientBook(db: Db, _actor: Actor, query: IngredientBookQuery) {
  const found = bookRows(db, query)
  const [{ count, memory }, functions] = await Promise.all([
    found
      .select((eb) => [
        eb.fn.countAll<number>().as('count'),
        eb.fn.countAll<number>().filterWhere('densitySource', '=', fromMemory).as('memory'),
      ])
      .executeTakeFirstOrThrow(),
    listFunctions(db),
  ])
  const pages = Math.max(1, Math.ceil(count / ingredientPageSize))
  const page = Math.min(query.page, pages)
  const direction = query.order === 'desc' ? ('desc' as const) : ('asc' as const)
  const rows = await found
    .select([...lineColumns, ...nameColumns, ...figureColumns])
    .select(['ingredient.note', 'ingredient.version'])
    .orderBy(sortColumn[query.sort], (order) =>
      direction === 'desc' ? order.desc().nullsLast() : order.asc().nullsLast(),
    )
    .orderBy(sql`lower(inci_name)`)
    .limit(ingredientPageSize)
    .offset((page - 1) * ingredientPageSize)
    .execute()
  const usedIn = await countFormulas(
    db,
    rows.map((row) => row.id),
  )
  return {
    rows: rows.map((row) => ({ ...row, usedIn: usedIn.get(row.id) ?? 0, match: matchOf(row, query.q) })),
    count,
    fromMemory: memory,
    page,
    pages,
    functions,
  }
}

export type IngredientBook = Awaited<ReturnType<typeof listIngredientBook>>
export type BookRow = IngredientBook['rows'][number]

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

const sortColumn = {
  inciName: sql`lower(inci_name)`,
  function: sql`lower(ingredient.function)`,
  density: sql`ingredient.density`,
  price: sql`ingredient.price_cents_per_kg`,
  supplierName: sql`nullif(lower(supplier_name), '')`,
} as const

function bookRows(db: Db, query: IngredientBookQuery) {
  return db
    .selectFrom('ingredient')
    .$if(query.q.trim() !== '', (rows) => rows.where(namedLike(`%${likeText(query.q)}%`)))
    .$if(query.phase !== 'any', (rows) => rows.where('ingredient.isOilPhase', '=', query.phase === 'oil'))
    .$if(query.function !== '', (rows) => rows.where('ingredient.function', '=', query.function))
}

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

function likeText(q: string): string {
  return comparable(q).replace(/[\\%_]/g, '\\$&')
}
