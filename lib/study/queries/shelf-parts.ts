import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { SeriesFinding, Standing } from '@/lib/science/series'
import type { ReadingDetail } from './parts'

/** What the ledger draws of many studies at once: seven statements whatever their number. */
export async function listShelfParts(db: Db, studyIds: string[]) {
  const isOfThem = sql<boolean>`study_id = any(${studyIds}::uuid[])`
  const stations = await db
    .selectFrom('studyStation')
    .innerJoin('station', 'station.id', 'studyStation.stationId')
    .select(['studyStation.id', 'studyStation.studyId', 'studyStation.temperatureC', 'studyStation.voice'])
    .select('station.kind')
    .where(sql<boolean>`study_station.study_id = any(${studyIds}::uuid[])`)
    .orderBy('studyStation.position')
    .execute()
  const batches = await db
    .selectFrom('studyBatch')
    .innerJoin('batch', 'batch.id', 'studyBatch.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['studyBatch.studyId', 'batch.id', 'batch.code', 'formula.name as formulaName'])
    .select('studyBatch.isReference')
    .where(isOfThem)
    .orderBy('studyBatch.position')
    .execute()
  const series = await db
    .selectFrom('series')
    .select(['studyId', 'batchId', 'studyStationId', 'attribute', 'used', 'latestValue', 'leavesAtWeeks'])
    .select((eb) => [
      eb.ref('standing').$castTo<Standing>().as('standing'),
      eb.ref('finding').$castTo<SeriesFinding>().as('finding'),
    ])
    .where(isOfThem)
    .execute()
  const pullJars = await db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('jar', 'jar.id', 'pullJar.jarId')
    .select(['pullJar.studyId', 'pullJar.asks', 'pullJar.state', 'pull.id as pullId', 'pull.studyStationId'])
    .select(['pull.timeWeeks', 'pull.label', 'pull.dueOn', 'pull.windowFrom', 'pull.windowTo'])
    .select(['jar.code', 'jar.batchId', 'jar.state as jarState'])
    .where(sql<boolean>`pull_jar.study_id = any(${studyIds}::uuid[])`)
    .orderBy('pull.timeWeeks')
    .execute()
  const readings = await db
    .selectFrom('reading')
    .innerJoin('pullJar', 'pullJar.id', 'reading.pullJarId')
    .select(['reading.studyId', 'reading.id', 'reading.batchId', 'reading.studyStationId', 'pullJar.pullId'])
    .select(['reading.attribute', 'reading.value'])
    .select((eb) => eb.ref('reading.detail').$castTo<ReadingDetail>().as('detail'))
    .where(
      sql<boolean>`reading.study_id = any(${studyIds}::uuid[]) and not reading.is_void
      and not exists (select from reading newer where newer.supersedes_id = reading.id)`,
    )
    .execute()
  const flags = await db
    .selectFrom('flag')
    .select(['studyId', 'studyStationId', 'batchId', 'attribute', 'rule'])
    .where('state', '=', 'open')
    .where(isOfThem)
    .execute()
  const cases = await db
    .selectFrom('shelfCase')
    .select(['studyId', 'code'])
    .where('state', '=', 'put forward')
    .where(isOfThem)
    .execute()
  const by = {
    stations: grouped(stations),
    batches: grouped(batches),
    series: grouped(series),
    pullJars: grouped(pullJars),
    readings: grouped(readings),
    flags: grouped(flags),
    cases: grouped(cases),
  }
  return {
    of: (studyId: string) => {
      const all = by.batches.get(studyId) ?? []
      const beside = new Set(all.filter((batch) => batch.isReference).map((batch) => batch.id))
      const isOwn = ({ batchId }: { batchId: string }) => !beside.has(batchId)
      return {
        stations: by.stations.get(studyId) ?? [],
        // What stands beside a study as a reference has no part in how the study stands.
        batches: all.filter((batch) => !batch.isReference),
        references: all.filter((batch) => batch.isReference),
        series: (by.series.get(studyId) ?? []).filter(isOwn),
        pullJars: by.pullJars.get(studyId) ?? [],
        readings: (by.readings.get(studyId) ?? []).map((reading) => ({ ...reading, readBy: '' })),
        flags: by.flags.get(studyId) ?? [],
        caseToSign: by.cases.get(studyId)?.[0]?.code ?? null,
      }
    },
  }
}

function grouped<T extends { studyId: string }>(rows: T[]): Map<string, T[]> {
  const groups = new Map<string, T[]>()
  for (const row of rows) {
    const group = groups.get(row.studyId)
    if (group) group.push(row)
    else groups.set(row.studyId, [row])
  }
  return groups
}
