import { sql, type RawBuilder, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { doubtsOf } from '@/lib/reading/queries/doubts'
import { attributeName, attributes } from '@/lib/reading/schema/attributes'
import { ownKeyOf } from '@/lib/reading/schema/own-key'
import { stationWhenRead } from '@/lib/station/queries/stood'
import { getStudyHead, listStudyBatches } from './head'
import { ownOf } from './own'
import { headOf } from './sheet'
import type { ReadingDetail } from './parts'

type Query = ListQuery<'attribute' | 'station' | 'batch' | 'by' | 'changed' | 'from' | 'to'>

/** One page of a study's readings, each with all that it superseded: a correction hides nothing. */
export async function listStudyReadings(db: Db, actor: Actor, code: string, query: Query) {
  const study = await getStudyHead(db, actor, code)
  const batches = await listStudyBatches(db, study.id)
  const source = readingSource(db, study.id, query)
  const chains: Source<ReadingChain> = {
    ...source,
    where: [sql<SqlBool>`reading.supersedes_id is null`, ...source.where],
    rows: (ids) => chainsOf(db, ids),
    idOf: (chain) => chain.entries[0]!.id,
  }
  const page = await pageOf(db, chains, query)
  const counts = await countReadings(db, study.id)
  const { station, by } = await listChoices(db, actor)
  const attribute = study.plan.attributes.map((one) => attributeName(one.attribute))
  const choices = { station, by, attribute, batch: batches.map((batch) => batch.code) }
  return { study: headOf(study), batches, ...page, counts, choices }
}
export type StudyReadings = Awaited<ReturnType<typeof listStudyReadings>>
export type ReadingChain = { current: ReadingEntry; entries: ReadingEntry[] }

/** Every entry by itself, as files have them. */
export function readingSource(db: Db, studyId: string, { q, filters }: Query): Source<ReadingEntry> {
  const { attribute, station, batch, by, changed, from, to } = filters
  const typed = likeTyped(q)
  return {
    from: sql`reading join person on person.id = reading.recorded_by join batch on batch.id = reading.batch_id
      left join study_station on study_station.id = reading.study_station_id
      left join station on station.id = ${stationWhenRead('reading', 'studyStation')}
      left join pull_jar on pull_jar.id = reading.pull_jar_id left join pull on pull.id = pull_jar.pull_id
      left join jar on jar.id = reading.jar_id left join instrument on instrument.id = reading.instrument_id`,
    where: [
      sql<SqlBool>`reading.study_id = ${studyId}`,
      ...(q
        ? [
            sql<SqlBool>`(jar.code ilike ${typed} or reading.attribute ilike ${typed} or reading.typed ilike ${typed}
              or reading.reason ilike ${typed} or pull.label ilike ${typed} or person.name ilike ${typed}
              or instrument.code ilike ${typed})`,
          ]
        : []),
      ...(attribute ? [sql<SqlBool>`reading.attribute = ${attributeNamed(attribute)}`] : []),
      ...(station ? [sql<SqlBool>`station.name = ${station}`] : []),
      ...(batch ? [sql<SqlBool>`batch.code = ${batch}`] : []),
      ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
      ...(changed ? [isChanged] : []),
      ...onDays(sql`reading.measured_at`, from, to),
    ],
    id: sql`reading.id`,
    idKind: 'uuid',
    sorts: {
      jar: naturally('jar.code'),
      time: { by: sql`pull.time_weeks`, kind: 'number' },
      attribute: naturally('reading.attribute'),
      value: { by: sql`reading.value`, kind: 'number' },
      by: naturally('person.name'),
      measured: { by: sql`reading.measured_at`, kind: 'instant' },
      batch: naturally('batch.code'),
      station: naturally('station.name'),
      instrument: naturally('instrument.code'),
      recorded: { by: sql`reading.recorded_at`, kind: 'instant' },
    },
    rows: (ids) => entriesOf(db, ids),
    idOf: (entry) => entry.id,
  }
}

const isChanged: RawBuilder<SqlBool> = sql<SqlBool>`(reading.supersedes_id is not null
  or exists (select from reading newer where newer.supersedes_id = reading.id))`

/** The key of what the filter calls by its name. */
function attributeNamed(name: string): string {
  return Object.keys(attributes).find((key) => attributeName(key) === name) ?? ownKeyOf(name) ?? name
}

async function countReadings(db: Db, studyId: string) {
  const { rows } = await sql<{ all: number; changed: number }>`
    select count(*) as "all", count(*) filter (where ${isChanged}) as changed
    from reading where study_id = ${studyId} and supersedes_id is null
  `.execute(db)
  return rows[0]!
}

async function entriesOf(db: Db, ids: string[]) {
  return db
    .selectFrom('reading')
    .innerJoin('person', 'person.id', 'reading.recordedBy')
    .innerJoin('batch', 'batch.id', 'reading.batchId')
    .innerJoin('study', 'study.id', 'reading.studyId')
    .leftJoin('studyStation', 'studyStation.id', 'reading.studyStationId')
    .leftJoin('station', (join) => join.on('station.id', '=', stationWhenRead('reading', 'studyStation')))
    .leftJoin('pullJar', 'pullJar.id', 'reading.pullJarId')
    .leftJoin('pull', 'pull.id', 'pullJar.pullId')
    .leftJoin('jar', 'jar.id', 'reading.jarId')
    .leftJoin('instrument', 'instrument.id', 'reading.instrumentId')
    .select([
      'reading.id',
      'reading.attribute',
      'reading.replicate',
      'reading.value',
      'reading.word',
      'reading.typed',
      'reading.isVoid',
      'reading.supersedesId',
      'reading.reason',
      'reading.measuredAt',
      'reading.claimedAt',
      'reading.recordedAt',
      'reading.recordedBy',
      'person.name as readByName',
      'person.initials as readBy',
      'batch.code as batchCode',
      'studyStation.temperatureC',
      'studyStation.isFreezeThaw',
      'station.name as stationName',
      'pull.label',
      'pull.timeWeeks',
      'jar.code as jarCode',
      'instrument.code as instrumentCode',
    ])
    .select((eb) => [
      eb.ref('reading.detail').$castTo<ReadingDetail>().as('detail'),
      doubtsOf('reading').as('doubts'),
    ])
    .select(ownOf('study', 'reading'))
    .select(
      sql<boolean>`exists (select from reading newer where newer.supersedes_id = reading.id)`.as(
        'isSuperseded',
      ),
    )
    .where(sql<SqlBool>`reading.id = any(${ids}::uuid[])`)
    .execute()
}
export type ReadingEntry = Awaited<ReturnType<typeof entriesOf>>[number]

/** A reading with all that it superseded, the first one first. */
async function chainsOf(db: Db, firstIds: string[]): Promise<ReadingChain[]> {
  const { rows: steps } = await sql<{ id: string; first: string }>`
    with recursive chain as (
      select id, id as first, 1 as step from reading where id = any(${firstIds}::uuid[])
      union all
      select newer.id, chain.first, chain.step + 1 from chain join reading newer on newer.supersedes_id = chain.id)
    select id, first from chain order by step
  `.execute(db)
  const entries = await entriesOf(
    db,
    steps.map((step) => step.id),
  )
  const byId = new Map(entries.map((entry) => [entry.id, entry]))
  return firstIds.map((first) => {
    const own = steps.flatMap((step) => (step.first === first ? (byId.get(step.id) ?? []) : []))
    return { current: own.at(-1)!, entries: own }
  })
}
