import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { getStudyHead, listStudyBatches } from './head'
import { headOf } from './sheet'
import type { ReadingDetail } from './parts'

/** Every reading of a study, what was superseded and voided too: a correction hides nothing. */
export async function getStudyReadings(db: Db, actor: Actor, code: string) {
  const study = await getStudyHead(db, actor, code)
  const batches = await listStudyBatches(db, study.id)
  const readings = await listReadings(db, study.id)
  return { study: headOf(study), batches, readings: inChains(readings) }
}
export type StudyReadings = Awaited<ReturnType<typeof getStudyReadings>>
export type ReadingChain = StudyReadings['readings'][number]

async function listReadings(db: Db, studyId: string) {
  return db
    .selectFrom('reading')
    .innerJoin('person', 'person.id', 'reading.recordedBy')
    .innerJoin('batch', 'batch.id', 'reading.batchId')
    .leftJoin('studyStation', 'studyStation.id', 'reading.studyStationId')
    .leftJoin('station', 'station.id', 'studyStation.stationId')
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
      eb.ref('reading.doubts').$castTo<{ reason: string; sentence: string }[]>().as('doubts'),
    ])
    .where('reading.studyId', '=', studyId)
    .orderBy('reading.recordedAt')
    .orderBy('reading.replicate')
    .orderBy('reading.id')
    .execute()
}
type Reading = Awaited<ReturnType<typeof listReadings>>[number]

/** A reading with all that it superseded, the first one first; the chains in the order of their first entry. */
function inChains(readings: Reading[]): { current: Reading; entries: Reading[] }[] {
  const next = new Map(
    readings.flatMap((reading) => (reading.supersedesId ? [[reading.supersedesId, reading]] : [])),
  )
  return readings
    .filter((reading) => reading.supersedesId === null)
    .map((first) => {
      const entries = [first]
      for (let newer = next.get(first.id); newer; newer = next.get(newer.id)) entries.push(newer)
      return { current: entries.at(-1)!, entries }
    })
}
