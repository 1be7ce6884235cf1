import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { Standing } from '@/lib/science/series'
import { studiesOf } from '@/lib/study/queries/scope'
import { comparisonFinding, shelvesOf, type ComparedSeries } from '../rules/comparison'
import { formulaTotals } from '../rules/totals'
import type { Level } from '../rules/variants'
import { mostCompared, type EmulsionType } from '../schema'
import { amountsOfVersions } from './amounts-of-versions'

/** Formulas against their studies' results so far: four statements whatever their number. */
export async function getComparison(db: Db, actor: Actor, picked: readonly string[]) {
  const codes = [...new Set(picked)]
  if (codes.length > mostCompared) {
    throw refuse.invalid(
      `That are ${codes.length} formulas, and at most ${mostCompared} fit beside each other. Pick fewer.`,
      { code: `At most ${mostCompared} formulas.` },
    )
  }
  const found = codes.length ? await findFormulas(db, codes) : []
  const formulas = codes.flatMap((code) => found.find((one) => one.code === code) ?? [])
  const ids = formulas.map((one) => one.id)
  const amounts = await amountsOfVersions(
    db,
    formulas.map((one) => one.versionId),
  )
  const series = ids.length ? await listSeries(db, actor, ids) : []
  const studies = ids.length ? await listStudiesOf(db, actor, ids) : []
  return {
    formulas: formulas.map((formula) => {
      const totals = formulaTotals(amounts.get(formula.versionId) ?? [])
      return {
        ...formula,
        internalVolumePercent: totals.internalVolumePercent,
        isHighInternalPhase: totals.isHighInternalPhase,
        costCentsPerKg: totals.costCentsPerKg,
        studies: studies
          .filter((study) => study.formulaId === formula.id)
          .map(({ code, batchCode, versionNumber }) => ({ code, batchCode, versionNumber })),
      }
    }),
    missing: codes.filter((code) => !found.some((one) => one.code === code)),
    shelves: shelvesOf(ids, series),
    finding: comparisonFinding(formulas, series),
  }
}

export type ComparisonPage = Awaited<ReturnType<typeof getComparison>>

async function findFormulas(db: Db, codes: string[]) {
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
    .select(['formula.id', 'formula.code', 'formula.name', 'formula.emulsionType'])
    .select(['latest.versionId', 'latest.number as versionNumber'])
    .select((eb) => eb.ref('formula.levels').$castTo<Level[]>().as('levels'))
    .where('formula.code', 'in', codes)
    .where('formula.isReference', '=', false)
    .execute()
  return rows.map((row) => ({ ...row, emulsionType: row.emulsionType as EmulsionType }))
}

async function listSeries(db: Db, actor: Actor, formulaIds: string[]): Promise<ComparedSeries[]> {
  return db
    .selectFrom('series')
    .innerJoin('study', 'study.id', 'series.studyId')
    .innerJoin('batch', 'batch.id', 'series.batchId')
    .innerJoin('studyBatch', (join) =>
      join
        .onRef('studyBatch.studyId', '=', 'series.studyId')
        .onRef('studyBatch.batchId', '=', 'series.batchId')
        .on('studyBatch.isReference', '=', false),
    )
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('studyStation', 'studyStation.id', 'series.studyStationId')
    .innerJoin('station', 'station.id', 'studyStation.stationId')
    .select(['formulaVersion.formulaId', 'study.code as studyCode', 'series.batchId'])
    .select(['batch.code as batchCode', 'series.studyStationId', 'station.kind', 'studyStation.temperatureC'])
    .select(['studyStation.voice', 'series.attribute', 'series.outSinceWeeks', 'series.leavesAtWeeks'])
    .select(['series.latestWeeks', 'study.endWeeks'])
    .select(
      sql<number[]>`coalesce(study.plan->'stations'->study_station.position->'timePoints', '[]')`.as(
        'timePoints',
      ),
    )
    .select((eb) => eb.ref('series.standing').$castTo<Standing>().as('standing'))
    .where(sql<boolean>`formula_version.formula_id = any(${formulaIds}::uuid[])`)
    .where(studiesOf(actor))
    .execute()
}

async function listStudiesOf(db: Db, actor: Actor, formulaIds: string[]) {
  return db
    .selectFrom('studyBatch')
    .innerJoin('study', 'study.id', 'studyBatch.studyId')
    .innerJoin('batch', 'batch.id', 'studyBatch.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .select(['formulaVersion.formulaId', 'study.code', 'batch.code as batchCode'])
    .select('formulaVersion.number as versionNumber')
    .where(sql<boolean>`formula_version.formula_id = any(${formulaIds}::uuid[])`)
    .where('studyBatch.isReference', '=', false)
    .where(studiesOf(actor))
    .orderBy('study.code')
    .execute()
}
