import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type { FlagLevel } from '../rules/wanted'

export type FlagLine = Awaited<ReturnType<typeof listFlags>>[number]

/** Open ones first, the gravest and then the oldest at the top. */
export async function listFlags(
  db: Db,
  _actor: Actor,
  filter: { state?: string | undefined; study?: string | undefined } = {},
) {
  return db
    .selectFrom('flag')
    .innerJoin('study', 'study.id', 'flag.studyId')
    .innerJoin('batch', 'batch.id', 'flag.batchId')
    .leftJoin('studyStation as ss', 'ss.id', 'flag.studyStationId')
    .leftJoin('station', 'station.id', 'ss.stationId')
    .leftJoin('instrument', 'instrument.id', 'flag.instrumentId')
    .leftJoin('reading', 'reading.id', 'flag.readingId')
    .leftJoin('jar', 'jar.id', 'reading.jarId')
    .innerJoin('person as raiser', 'raiser.id', 'flag.raisedBy')
    .leftJoin('person as answerer', 'answerer.id', 'flag.answeredBy')
    .leftJoin('person as closer', 'closer.id', 'flag.closedBy')
    .select([
      'flag.number',
      'flag.attribute',
      'flag.rule',
      'flag.state',
      'flag.sentence',
      'flag.atWeeks',
      'flag.raisedAt',
      'flag.cause',
      'flag.action',
      'flag.why',
      'flag.answeredAt',
      'flag.closedAt',
      'flag.closingNote',
      'flag.settles',
      'flag.onDay',
      'flag.version',
      'study.code as studyCode',
      'study.title as studyTitle',
      'batch.code as batchCode',
      'ss.temperatureC',
      'ss.isFreezeThaw',
      'ss.voice',
      'station.name as stationName',
      'instrument.code as instrumentCode',
      'jar.code as jarCode',
      'raiser.initials as raisedBy',
      'answerer.initials as answeredBy',
      'closer.initials as closedBy',
    ])
    .select(sql<FlagLevel>`flag.level`.as('level'))
    .$if(filter.state !== undefined, (query) => query.where('flag.state', '=', filter.state!))
    .$if(filter.study !== undefined, (query) => query.where('study.code', '=', filter.study!))
    .orderBy(sql`array_position(array['open', 'answered', 'closed'], flag.state)`)
    .orderBy(sql`array_position(array['out', 'leaning', 'flag', 'doubt'], flag.level)`)
    .orderBy('flag.number')
    .limit(1000)
    .execute()
}
