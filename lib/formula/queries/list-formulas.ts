import { sql } from 'kysely'
import { jsonArrayFrom } from 'kysely/helpers/postgres'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { formulaTotals } from '../rules/totals'
import { amountsOfVersions } from './amounts-of-versions'
import type { EmulsionType, FormulaListQuery } from '../schema'

/** Each formula with its latest version: two statements, whatever the number of lines. */
export async function listFormulas(db: Db, _actor: Actor, query: FormulaListQuery) {
  const typed = `%${query.q
    .trim()
    .toLowerCase()
    .replace(/[\\%_]/g, '\\$&')}%`
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
    .leftJoin('client', 'client.id', 'formula.clientId')
    .select((eb) => [
      'formula.id',
      'formula.code',
      'formula.name',
      'formula.emulsionType',
      'client.name as clientName',
      'latest.versionId',
      'latest.number as versionNumber',
      'latest.state',
      jsonArrayFrom(
        eb
          .selectFrom('batch')
          .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
          .select(['batch.code', 'batch.state'])
          .whereRef('formulaVersion.formulaId', '=', 'formula.id')
          .orderBy('batch.createdAt'),
      ).as('batches'),
    ])
    .where((eb) =>
      eb.or([
        eb(sql<string>`lower(formula.code)`, 'like', typed),
        eb(sql<string>`lower(formula.name)`, 'like', typed),
        eb(sql<string>`formula.emulsion_type`, 'like', typed),
        eb.exists(
          eb
            .selectFrom('formulaLine')
            .select('formulaLine.id')
            .whereRef('formulaLine.formulaVersionId', '=', 'latest.versionId')
            .where(sql<string>`lower(formula_line.inci_name)`, 'like', typed),
        ),
      ]),
    )
    .orderBy('formula.code')
    .execute()
  const amounts = await amountsOfVersions(
    db,
    rows.map((row) => row.versionId),
  )
  const formulas = rows.map((row) => {
    const totals = formulaTotals(amounts.get(row.versionId) ?? [])
    return {
      ...row,
      emulsionType: row.emulsionType as EmulsionType,
      state: row.state as 'draft' | 'locked',
      internalVolumePercent: totals.internalVolumePercent,
      isHighInternalPhase: totals.isHighInternalPhase,
      missingThousandths: totals.missingThousandths,
      costCentsPerKg: totals.costCentsPerKg,
    }
  })
  return sorted(formulas, query)
}

export type FormulaRow = Awaited<ReturnType<typeof listFormulas>>[number]

function sorted<Row extends { code: string; internalVolumePercent: number | null; batches: unknown[] }>(
  rows: Row[],
  { sort, order }: FormulaListQuery,
): Row[] {
  const direction = order === 'asc' ? 1 : -1
  const value = (row: Row): string | number => {
    if (sort === 'internal') return row.internalVolumePercent ?? -1
    if (sort === 'batches') return row.batches.length
    return String(row[sort as keyof Row])
  }
  return rows.toSorted((a, b) => {
    const [x, y] = [value(a), value(b)]
    const by = typeof x === 'number' && typeof y === 'number' ? x - y : compare(String(x), String(y))
    return direction * by || compare(a.code, b.code)
  })
}

const compare = new Intl.Collator('en', { numeric: true }).compare
