import { sql, type RawBuilder, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { all, likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { stationWhenRead } from '@/lib/station/queries/stood'
import type { FlagLevel } from '../rules/wanted'

type Query = ListQuery<'state' | 'study' | 'level' | 'station' | 'from' | 'to'>

/** One page of the flags, the gravest and then the oldest at the top, with what the headline counts of all of them. */
export async function listFlags(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, flagSource(db, actor, query), query)
  const counts = await countFlags(db, query)
  return { ...page, counts, choices: await listChoices(db, actor) }
}

export type FlagsPage = Awaited<ReturnType<typeof listFlags>>
export type FlagCounts = FlagsPage['counts']

const from = sql`flag join study on study.id = flag.study_id join batch on batch.id = flag.batch_id
  left join study_station on study_station.id = flag.study_station_id
  left join reading on reading.id = flag.reading_id
  left join station on station.id = ${stationWhenRead('reading', 'studyStation')}`

export function flagSource(db: Db, _actor: Actor, query: Query): Source<FlagLine> {
  return {
    from,
    where: whereOf(query),
    id: sql`flag.number`,
    idKind: 'bigint',
    sorts: {
      number: { by: sql`flag.number`, kind: 'number' },
      study: { by: sql`(study.code || ' ' || batch.code) collate natural_order`, kind: 'text' },
      station: { by: sql`study_station.temperature_c`, kind: 'number' },
      raised: { by: sql`flag.raised_at`, kind: 'instant' },
      level: {
        by: sql`array_position(array['out', 'leaning', 'flag', 'doubt'], flag.level)`,
        kind: 'number',
      },
      attribute: naturally('flag.attribute'),
      answered: { by: sql`flag.answered_at`, kind: 'instant' },
      closed: { by: sql`flag.closed_at`, kind: 'instant' },
    },
    rows: (numbers) => flagRows(db, numbers),
    idOf: (flag) => String(flag.number),
  }
}

function whereOf({ q, filters }: Query): RawBuilder<SqlBool>[] {
  const { state, study, level, station, from: first, to: last } = filters
  const typed = likeTyped(q)
  return [
    ...(q
      ? [
          sql<SqlBool>`(flag.sentence ilike ${typed} or flag.attribute ilike ${typed} or study.code ilike ${typed}
            or study.title ilike ${typed} or batch.code ilike ${typed} or flag.why ilike ${typed}
            or flag.number::text = ${q})`,
        ]
      : []),
    ...(state ? [sql<SqlBool>`flag.state = ${state}`] : []),
    ...(study ? [sql<SqlBool>`study.code = ${study}`] : []),
    ...(level ? [sql<SqlBool>`flag.level = ${level}`] : []),
    ...(station ? [sql<SqlBool>`station.name = ${station}`] : []),
    ...onDays(sql`flag.raised_at`, first, last),
  ]
}

/** By state, and of the open ones by level, of all that is searched for. */
async function countFlags(db: Db, query: Query) {
  const where = whereOf({ ...query, filters: { ...query.filters, state: '' } })
  const { rows } = await sql<{
    open: number
    answered: number
    closed: number
    out: number
    leaning: number
    doubts: number
    oldest: string | null
  }>`
    select count(*) filter (where flag.state = 'open') as open,
      count(*) filter (where flag.state = 'answered') as answered,
      count(*) filter (where flag.state = 'closed') as closed,
      count(*) filter (where flag.state = 'open' and flag.level = 'out') as "out",
      count(*) filter (where flag.state = 'open' and flag.level = 'leaning') as leaning,
      count(*) filter (where flag.state = 'open' and flag.level = 'doubt') as doubts,
      min(flag.raised_at) filter (where flag.state = 'open') as oldest
    from ${from} where ${all(where)}
  `.execute(db)
  return rows[0]!
}

async function flagRows(db: Db, numbers: string[]) {
  return db
    .selectFrom('flag')
    .innerJoin('study', 'study.id', 'flag.studyId')
    .innerJoin('batch', 'batch.id', 'flag.batchId')
    .leftJoin('studyStation as ss', 'ss.id', 'flag.studyStationId')
    .leftJoin('instrument', 'instrument.id', 'flag.instrumentId')
    .leftJoin('reading', 'reading.id', 'flag.readingId')
    .leftJoin('station', (join) => join.on('station.id', '=', stationWhenRead('reading', 'ss')))
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
    .where(sql<SqlBool>`flag.number = any(${numbers}::int[])`)
    .execute()
}

export type FlagLine = Awaited<ReturnType<typeof flagRows>>[number]
