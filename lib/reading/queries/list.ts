import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { stationWhenRead } from '@/lib/station/queries/stood'
import { studiesOf } from '@/lib/study/queries/scope'
import { doubtsOf } from './doubts'

export type ReadingOfStudy = Awaited<ReturnType<typeof listReadings>>[number]

/** Every entry of a study, the superseded and the void ones too: a correction hides nothing. */
export async function listReadings(db: Db, actor: Actor, studyCode: string, attribute?: string) {
  const study = await db
    .selectFrom('study')
    .select('id')
    .where('code', '=', studyCode)
    .where(studiesOf(actor))
    .executeTakeFirst()
  if (!study) throw refuse.notFound()
  return db
    .selectFrom('reading as r')
    .innerJoin('batch', 'batch.id', 'r.batchId')
    .innerJoin('person', 'person.id', 'r.recordedBy')
    .leftJoin('studyStation as ss', 'ss.id', 'r.studyStationId')
    .leftJoin('station', (join) => join.on('station.id', '=', stationWhenRead('r', 'ss')))
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .leftJoin('pullJar as pj', 'pj.id', 'r.pullJarId')
    .leftJoin('pull', 'pull.id', 'pj.pullId')
    .leftJoin('instrument', 'instrument.id', 'r.instrumentId')
    .leftJoin('reading as newer', 'newer.supersedesId', 'r.id')
    .select([
      'r.id',
      'r.batchId',
      'batch.code as batchCode',
      'r.studyStationId',
      'station.name as stationName',
      'ss.temperatureC',
      'jar.code as jarCode',
      'pj.asks',
      'pull.label',
      'pull.timeWeeks',
      'r.attribute',
      'r.replicate',
      'r.value',
      'r.word',
      'r.typed',
      'instrument.code as instrumentCode',
      'r.isVoid',
      'r.supersedesId',
      'newer.id as supersededById',
      'r.reason',
      'r.measuredAt',
      'r.claimedAt',
      'r.recordedAt',
      'r.recordedBy',
      'person.initials as by',
      'person.name as byName',
    ])
    .select((eb) => [
      eb.ref('r.detail').$castTo<Record<string, unknown>>().as('detail'),
      doubtsOf('r').as('doubts'),
    ])
    .where('r.studyId', '=', study.id)
    .$if(attribute !== undefined, (query) => query.where('r.attribute', '=', attribute!))
    .orderBy('r.measuredAt')
    .orderBy('r.recordedAt')
    .orderBy('r.id')
    .execute()
}
