import { sql, type SqlBool } from 'kysely'
import { jsonArrayFrom } from 'kysely/helpers/postgres'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import type { EmulsionType } from '../schema'

type Query = ListQuery<'type' | 'packing' | 'state' | 'client' | 'by' | 'from' | 'to'>

/** One page of the formulas, what its filters offer, and what the headline counts: the same statements whatever their number. */
export async function listFormulas(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, formulaSource(db, actor, query), query)
  const counts = await countFormulas(db)
  return { ...page, counts, choices: await listChoices(db, actor) }
}

export type FormulasPage = Awaited<ReturnType<typeof listFormulas>>

export function formulaSource(db: Db, _actor: Actor, { q, filters }: Query): Source<FormulaRow> {
  const { type, packing, state, client, by, from, to } = filters
  const typed = likeTyped(q)
  return {
    from: sql`formula left join formula_figure figure on figure.formula_id = formula.id
      left join formula_version latest on latest.id = figure.formula_version_id
      left join client on client.id = formula.client_id join person on person.id = formula.created_by`,
    where: [
      sql<SqlBool>`not formula.is_reference`,
      ...(q ? [isNamed(typed)] : []),
      ...(type ? [sql<SqlBool>`formula.emulsion_type = ${type}`] : []),
      ...(packing ? [sql<SqlBool>`figure.is_high_internal_phase = ${packing === 'past the closest'}`] : []),
      ...(state ? [sql<SqlBool>`latest.state = ${state}`] : []),
      ...(client ? [sql<SqlBool>`client.name = ${client}`] : []),
      ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
      ...onDays(sql`formula.created_at`, from, to),
    ],
    id: sql`formula.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('formula.code'),
      name: naturally('formula.name'),
      emulsionType: { by: sql`formula.emulsion_type`, kind: 'text' },
      internal: { by: sql`figure.internal_volume_percent`, kind: 'number' },
      batches: {
        by: sql`(select count(*) from batch join formula_version made on made.id = batch.formula_version_id
          where made.formula_id = formula.id)`,
        kind: 'number',
      },
      state: { by: sql`latest.state || lpad(latest.number::text, 6, '0')`, kind: 'text' },
      client: naturally('client.name'),
      cost: { by: sql`figure.cost_cents_per_kg`, kind: 'number' },
      by: naturally('person.name'),
      begun: { by: sql`formula.created_at`, kind: 'instant' },
    },
    rows: (ids) => formulaRows(db, ids),
    idOf: (row) => row.id,
  }
}

/** What the search looks in: each part by itself, so that none makes the others read every row. */
function isNamed(typed: string) {
  return sql<SqlBool>`formula.id in (
    select id from formula where code ilike ${typed} or name ilike ${typed} or emulsion_type ilike ${typed}
    union all
    select figure.formula_id from formula_line join formula_figure figure
      on figure.formula_version_id = formula_line.formula_version_id where formula_line.inci_name ilike ${typed})`
}

async function formulaRows(db: Db, ids: string[]) {
  const rows = await db
    .selectFrom('formula')
    .innerJoinLateral(
      (eb) =>
        eb
          .selectFrom('formulaVersion')
          .select(['formulaVersion.id as versionId', 'formulaVersion.number', 'formulaVersion.state'])
          .whereRef('formulaVersion.formulaId', '=', 'formula.id')
          .orderBy('formulaVersion.number', 'desc')
          .limit(1)
          .as('latest'),
      (join) => join.onTrue(),
    )
    .leftJoin('formulaFigure as figure', 'figure.formulaId', 'formula.id')
    .leftJoin('client', 'client.id', 'formula.clientId')
    .innerJoin('person', 'person.id', 'formula.createdBy')
    .select((eb) => [
      'formula.id',
      'formula.code',
      'formula.name',
      'formula.emulsionType',
      'formula.createdAt',
      'client.name as clientName',
      'person.name as createdBy',
      'latest.versionId',
      'latest.number as versionNumber',
      'latest.state',
      'figure.internalVolumePercent',
      'figure.isHighInternalPhase',
      'figure.missingThousandths',
      'figure.costCentsPerKg',
      jsonArrayFrom(
        eb
          .selectFrom('batch')
          .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
          .select(['batch.code', 'batch.state'])
          .whereRef('formulaVersion.formulaId', '=', 'formula.id')
          .orderBy('batch.createdAt'),
      ).as('batches'),
    ])
    .where(sql<SqlBool>`formula.id = any(${ids}::uuid[])`)
    .execute()
  return rows.map((row) => ({
    ...row,
    emulsionType: row.emulsionType as EmulsionType,
    state: row.state as 'draft' | 'locked',
  }))
}

export type FormulaRow = Awaited<ReturnType<typeof formulaRows>>[number]

/** Of all formulas, whatever is searched for. */
async function countFormulas(db: Db) {
  const { rows } = await sql<{ all: number; high: number; drafts: number }>`
    select (select count(*) from formula where not is_reference) as "all",
      (select count(*) from formula_figure where is_high_internal_phase) as high,
      (select count(*) from formula_version where state = 'draft') as drafts
  `.execute(db)
  return rows[0]!
}

/** What a batch can be made of: each formula's latest version. */
export async function listLatestVersions(db: Db, _actor: Actor) {
  return db
    .selectFrom('formula')
    .innerJoin('formulaFigure as figure', 'figure.formulaId', 'formula.id')
    .innerJoin('formulaVersion as latest', 'latest.id', 'figure.formulaVersionId')
    .select(['formula.code', 'formula.name', 'latest.id as versionId', 'latest.number as versionNumber'])
    .select('latest.state')
    .orderBy(sql`formula.code collate natural_order`)
    .execute()
}
