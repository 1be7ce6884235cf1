import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type { SeriesFinding } from '@/lib/science/series'
import { studiesOf } from './scope'

// A batch of another study that this person may see, named as it stands in the address: "S-003 SI82-1".

/** What may be drawn beside a study's curves: batches of the other studies that have readings. */
export async function listBesideOffers(db: Db, actor: Actor, studyId: string) {
  const rows = await db
    .selectFrom('studyBatch')
    .innerJoin('study', 'study.id', 'studyBatch.studyId')
    .innerJoin('batch', 'batch.id', 'studyBatch.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['study.code as studyCode', 'batch.code as batchCode', 'formula.name as formulaName'])
    .where('study.id', '<>', studyId)
    .where(studiesOf(actor))
    .where((eb) =>
      eb.exists(
        eb
          .selectFrom('series')
          .select('series.id')
          .whereRef('series.studyId', '=', 'studyBatch.studyId')
          .whereRef('series.batchId', '=', 'studyBatch.batchId')
          .where('series.latestWeeks', '>', 0),
      ),
    )
    .orderBy('study.startedOn', 'desc')
    .orderBy('studyBatch.position')
    .limit(200)
    .execute()
  return rows.map(({ studyCode, batchCode, formulaName }) => ({
    key: `${studyCode} ${batchCode}`,
    label: `${batchCode} in ${studyCode}, ${formulaName}`,
  }))
}

/** The series of the batch that the address names; null where this person sees no such batch. */
export async function findBeside(db: Db, actor: Actor, beside: string) {
  const [studyCode = '', ...rest] = beside.split(' ')
  const batchCode = rest.join(' ')
  const series = await db
    .selectFrom('series')
    .innerJoin('study', 'study.id', 'series.studyId')
    .innerJoin('batch', 'batch.id', 'series.batchId')
    .innerJoin('studyStation', 'studyStation.id', 'series.studyStationId')
    .select(['series.id', 'series.attribute'])
    .select(['studyStation.temperatureC', 'studyStation.isFreezeThaw', 'studyStation.variant'])
    .select((eb) => eb.ref('series.finding').$castTo<SeriesFinding>().as('finding'))
    .where('study.code', '=', studyCode)
    .where('batch.code', '=', batchCode)
    .where(studiesOf(actor))
    .execute()
  if (series.length === 0) return null
  return {
    name: `${batchCode} in ${studyCode}`,
    series: series.map(({ finding, ...one }) => ({ ...one, points: finding.points })),
  }
}
