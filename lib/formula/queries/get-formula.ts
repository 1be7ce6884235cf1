import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { getGround } from '@/lib/formula-answer/queries'
import { refuse } from '@/lib/http/errors'
import type { EmulsionType } from '../schema'
import { findDrops } from './find-drops'
import { listFamilies } from './list-families'

/** One version of a formula (the latest unless a number is given) with what its page shows: eleven statements. */
export async function getFormula(db: Db, _actor: Actor, code: string, number?: number) {
  const versions = await db
    .selectFrom('formula')
    .innerJoin('formulaVersion', 'formulaVersion.formulaId', 'formula.id')
    .innerJoin('person', 'person.id', 'formulaVersion.createdBy')
    .leftJoin('client', 'client.id', 'formula.clientId')
    .select([
      'formula.id as formulaId',
      'formula.code',
      'formula.name',
      'formula.emulsionType',
      'formula.familyOfVersionId',
      'client.name as clientName',
      'formulaVersion.id',
      'formulaVersion.number',
      'formulaVersion.state',
      'formulaVersion.note',
      'formulaVersion.targetPhLow',
      'formulaVersion.targetPhHigh',
      'formulaVersion.version',
      'formulaVersion.createdAt',
      'person.initials as createdBy',
    ])
    .where('formula.code', '=', code)
    .where('formula.isReference', '=', false)
    .orderBy('formulaVersion.number')
    .execute()
  const shown = number ? versions.find((version) => version.number === number) : versions.at(-1)
  if (!shown) {
    throw refuse.notFound(
      versions.length
        ? `${code} has no version ${number}. Its latest is version ${versions.at(-1)?.number}.`
        : `There is no formula ${code}. Look for it in the list of formulas.`,
    )
  }
  const before = versions.filter((version) => version.number < shown.number).at(-1)
  const [lines, steps, batches, families, drops, ground] = await Promise.all([
    listLines(db, before ? [shown.id, before.id] : [shown.id]),
    listSteps(db, shown.id),
    listBatchesMade(db, shown.formulaId),
    listFamilies(db, shown.familyOfVersionId, shown.formulaId),
    findDrops(db, shown.formulaId),
    getGround(db, { formulaId: shown.formulaId, versionId: shown.id, number: shown.number }),
  ])
  return {
    id: shown.formulaId,
    code: shown.code,
    name: shown.name,
    emulsionType: shown.emulsionType as EmulsionType,
    clientName: shown.clientName,
    versionId: shown.id,
    number: shown.number,
    state: shown.state as 'draft' | 'locked',
    note: shown.note,
    targetPhLow: shown.targetPhLow,
    targetPhHigh: shown.targetPhHigh,
    version: shown.version,
    createdBy: shown.createdBy,
    createdAt: shown.createdAt,
    batches,
    families,
    /** Of the last batch whose drops were measured. */
    drops,
    ground,
    lines: lines.filter((line) => line.formulaVersionId === shown.id),
    steps,
    /** The version before, for "was". */
    before: before
      ? { number: before.number, lines: lines.filter((line) => line.formulaVersionId === before.id) }
      : null,
    versions: versions.map(({ id, number: n, state, note, createdBy, createdAt }) => ({
      id,
      number: n,
      state,
      note,
      createdBy,
      createdAt,
      batchCodes: batches.filter((batch) => batch.versionNumber === n).map((batch) => batch.code),
    })),
  }
}

export type FormulaPage = Awaited<ReturnType<typeof getFormula>>

function listLines(db: Db, versionIds: string[]) {
  return db
    .selectFrom('formulaLine')
    .select([
      'id',
      'formulaVersionId',
      'phase',
      'ingredientId',
      'inciName',
      'function',
      'percentThousandths',
      'density',
      'isInternal',
      'isRemainder',
      'priceCentsPerKg',
    ])
    .where('formulaVersionId', 'in', versionIds)
    .orderBy('position')
    .execute()
}

function listSteps(db: Db, versionId: string) {
  return db
    .selectFrom('formulaStep')
    .select(['id', 'phase', 'instruction', 'speedRpm', 'minutes', 'temperatureC', 'lookFor', 'caution'])
    .where('formulaVersionId', '=', versionId)
    .orderBy('position')
    .execute()
}

/** Of all versions, oldest first. */
function listBatchesMade(db: Db, formulaId: string) {
  return db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .select(['batch.code', 'batch.state', 'batch.sizeG', 'batch.yieldG', 'batch.createdAt'])
    .select('formulaVersion.number as versionNumber')
    .where('formulaVersion.formulaId', '=', formulaId)
    .orderBy('batch.createdAt')
    .execute()
}
