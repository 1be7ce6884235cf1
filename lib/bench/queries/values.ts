import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { mean } from '@/lib/science/mean'
import type { SeriesFinding, Standing } from '@/lib/science/series'

export type CurrentSeries = Awaited<ReturnType<typeof listCurrentSeries>>[number]
export type LastReading = Awaited<ReturnType<typeof listLastReadings>>[number]
export type InitialMean = Awaited<ReturnType<typeof listInitialMeans>>[number]

export async function listCurrentSeries(db: Db | Trx, studyIds: string[]) {
  if (studyIds.length === 0) return []
  return db
    .selectFrom('series')
    .select(['studyId', 'batchId', 'studyStationId', 'attribute', 'used', 'leavesAtWeeks'])
    .select([
      sql<Standing>`standing`.as('standing'),
      sql<SeriesFinding['band']>`finding -> 'band'`.as('band'),
      sql<number | null>`(finding ->> 'initial')::numeric`.as('initial'),
    ])
    .where('studyId', 'in', studyIds)
    .execute()
}

/** The newest readings that count as the record of a series: neither superseded nor void. At most `most` each. */
export async function listLastReadings(
  db: Db | Trx,
  studyIds: string[],
  most: number,
  only?: { batchId: string; studyStationId: string },
) {
  if (studyIds.length === 0) return []
  const ranked = db
    .selectFrom('reading as r')
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .innerJoin('person', 'person.id', 'r.recordedBy')
    .select([
      'r.id',
      'r.studyId',
      'r.batchId',
      'r.studyStationId',
      'r.jarId',
      'r.attribute',
      'r.value',
      'r.word',
      'r.typed',
      'r.measuredAt',
      'jar.code as jarCode',
      'person.initials as by',
    ])
    .select(sql<Record<string, unknown>>`r.detail`.as('detail'))
    .select(
      sql<number>`row_number() over (partition by r.study_id, r.batch_id, r.study_station_id, r.attribute
        order by r.measured_at desc, r.replicate, r.id)`.as('place'),
    )
    .where('r.studyId', 'in', studyIds)
    .where('r.studyStationId', 'is not', null)
    .where('r.isVoid', '=', false)
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(selectFrom('reading as newer').select('newer.id').whereRef('newer.supersedesId', '=', 'r.id')),
      ),
    )
    .$if(only !== undefined, (query) =>
      query.where('r.batchId', '=', only!.batchId).where('r.studyStationId', '=', only!.studyStationId),
    )
  return db.selectFrom(ranked.as('last')).selectAll().where('place', '<=', most).execute()
}

/** Means of the initial's replicates per batch and attribute. */
export async function listInitialMeans(db: Db | Trx, studyIds: string[]) {
  if (studyIds.length === 0) return []
  const rows = await db
    .selectFrom('reading as r')
    .select(['r.studyId', 'r.batchId', 'r.attribute'])
    .select(sql<number[]>`jsonb_agg(r.value order by r.replicate, r.id)`.as('values'))
    .select(sql<Record<string, unknown>>`jsonb_agg(r.detail order by r.replicate, r.id) -> 0`.as('detail'))
    .where('r.studyId', 'in', studyIds)
    .where('r.studyStationId', 'is', null)
    .where('r.isVoid', '=', false)
    .where('r.value', 'is not', null)
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(selectFrom('reading as newer').select('newer.id').whereRef('newer.supersedesId', '=', 'r.id')),
      ),
    )
    .groupBy(['r.studyId', 'r.batchId', 'r.attribute'])
    .execute()
  return rows.map(({ values, ...row }) => ({ ...row, value: mean(values) }))
}
