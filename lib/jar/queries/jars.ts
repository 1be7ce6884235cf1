import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { isJarCode, readJarCode } from '@/lib/jar/rules/code'
import { studiesOf } from '@/lib/study/queries/scope'

function jars(db: Db, actor: Actor) {
  return db
    .selectFrom('jar')
    .innerJoin('study', 'study.id', 'jar.studyId')
    .innerJoin('batch', 'batch.id', 'jar.batchId')
    .innerJoin('studyBatch', (join) =>
      join.onRef('studyBatch.studyId', '=', 'jar.studyId').onRef('studyBatch.batchId', '=', 'jar.batchId'),
    )
    .leftJoin('studyStation', 'studyStation.id', 'jar.studyStationId')
    .leftJoin('station', 'station.id', 'jar.stationId')
    .select([
      'jar.id',
      'jar.code',
      'jar.kind',
      'jar.state',
      'jar.shelf',
      'jar.place',
      'jar.tareG',
      'jar.grossG',
      'jar.fillHeightMm',
      'jar.setAsideFor',
      'jar.version',
      'study.id as studyId',
      'study.code as studyCode',
      'study.title as studyTitle',
      'study.startedOn',
      'batch.code as batchCode',
      'studyBatch.isReference',
      'studyStation.id as studyStationId',
      'studyStation.temperatureC',
      'studyStation.isFreezeThaw',
      'studyStation.position',
      'studyStation.variant',
      'station.id as stationId',
      'station.name as stationName',
      'station.walkOrder',
    ])
    .select((eb) =>
      eb
        .selectFrom('pullJar')
        .innerJoin('pull', 'pull.id', 'pullJar.pullId')
        .whereRef('pullJar.jarId', '=', 'jar.id')
        .where('pullJar.state', 'in', ['due', 'resting'])
        .select((min) => min.fn.min('pull.dueOn').as('dueOn'))
        .as('nextDueOn'),
    )
    .where(studiesOf(actor))
}

/** One jar by what was scanned or typed. */
export async function getJar(db: Db, actor: Actor, scanned: string) {
  const code = readJarCode(scanned)
  if (!code || !isJarCode(code)) {
    throw refuse.notFound(`${scanned.slice(0, 20)} is no jar code. Read the label again: five characters.`)
  }
  const jar = await jars(db, actor).where('jar.code', '=', code).executeTakeFirst()
  if (!jar) throw refuse.notFound(`No jar has the code ${code}. Read the label again.`)
  return jar
}

/** Jars by their ids, in any order. */
export async function listJarsOf(db: Db, actor: Actor, ids: string[]) {
  return jars(db, actor)
    .where('jar.id', '=', sql<string>`any(${ids}::uuid[])`)
    .execute()
}

/** All jars of a study in the order in which they stand: by station, shelf and place. */
export async function listJars(db: Db, actor: Actor, studyId: string) {
  return jars(db, actor)
    .where('jar.studyId', '=', studyId)
    .orderBy('studyStation.position')
    .orderBy('jar.shelf')
    .orderBy('jar.place')
    .orderBy('jar.code')
    .execute()
}
export type JarRow = Awaited<ReturnType<typeof listJars>>[number]
