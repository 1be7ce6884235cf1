import { ownOf } from '@/lib/study/queries/own'
import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { namedJar } from '@/lib/jar/rules/code'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { methodText } from '@/lib/reading/rules/conditions'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { SeriesFinding } from '@/lib/science/series'
import { stationWhenRead } from '@/lib/station/queries/stood'
import { dayIn } from '@/lib/study/rules/calendar'
import { needsQuality } from '../rules/closing'
import { againstTrend } from '../rules/against-trend'
import type { FlagLevel } from '../rules/wanted'

export type FlagPage = Awaited<ReturnType<typeof getFlag>>
export type FlagRow = NonNullable<Awaited<ReturnType<typeof findFlag>>>

/** The flag with where it stands and who did what about it. */
export async function findFlag(db: Db | Trx, number: number) {
  return db
    .selectFrom('flag')
    .innerJoin('study', 'study.id', 'flag.studyId')
    .innerJoin('batch', 'batch.id', 'flag.batchId')
    .innerJoin('formulaVersion as fv', 'fv.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'fv.formulaId')
    .leftJoin('studyStation as ss', 'ss.id', 'flag.studyStationId')
    .leftJoin('reading as r', 'r.id', 'flag.readingId')
    .leftJoin('station', (join) => join.on('station.id', '=', stationWhenRead('r', 'ss')))
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .leftJoin('pullJar as pj', 'pj.id', 'r.pullJarId')
    .leftJoin('pull', 'pull.id', 'pj.pullId')
    .leftJoin('person as reader', 'reader.id', 'r.recordedBy')
    .leftJoin('instrument as own', (join) =>
      join.on((eb) => eb('own.id', '=', eb.fn.coalesce('flag.instrumentId', 'r.instrumentId'))),
    )
    .innerJoin('person as raiser', 'raiser.id', 'flag.raisedBy')
    .leftJoin('person as answerer', 'answerer.id', 'flag.answeredBy')
    .leftJoin('person as closer', 'closer.id', 'flag.closedBy')
    .select([
      'flag.id',
      'flag.number',
      'flag.studyId',
      'flag.batchId',
      'flag.studyStationId',
      'flag.attribute',
      'flag.rule',
      'flag.readingId',
      'flag.atWeeks',
      'flag.sentence',
      'flag.state',
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
      'study.startedAt',
      'study.startedOn',
      'study.endWeeks',
      'study.state as studyState',
      'batch.code as batchCode',
      'formula.name as formulaName',
      'station.name as stationName',
      'station.caution',
      'ss.temperatureC',
      'ss.isFreezeThaw',
      'ss.voice',
      'r.measuredAt',
      'r.typed',
      'r.value as readingValue',
      'r.pullJarId',
      'jar.id as jarId',
      'jar.code as jarCode',
      'pull.id as pullId',
      'pull.label as pullLabel',
      'pj.note as pullNote',
      'reader.initials as readBy',
      'own.id as instrumentId',
      'own.code as instrumentCode',
      'own.name as instrumentName',
      'raiser.name as raisedByName',
      'raiser.initials as raisedBy',
      'answerer.name as answeredByName',
      'answerer.initials as answeredBy',
      'closer.name as closedByName',
      'closer.initials as closedBy',
    ])
    .select([
      sql<FlagLevel>`flag.level`.as('level'),
      sql<Record<string, unknown>>`flag.evidence`.as('evidence'),
      sql<ProtocolPlan>`study.plan`.as('plan'),
      sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'),
      sql<string>`app_now()`.as('now'),
      sql<string | null>`(select due_on::text from calibration where instrument_id = own.id
        order by calibrated_at desc, id desc limit 1)`.as('calibrationDueOn'),
    ])
    .where('flag.number', '=', number)
    .executeTakeFirst()
}

/** All that a person needs to say what it was: the curve, the same jar, the same instrument, what is left to repeat on. */
export async function getFlag(db: Db, _actor: Actor, number: number) {
  const flag = await findFlag(db, number)
  if (!flag) throw refuse.notFound('There is no flag with this number.')
  const series = await listSeriesThere(db, flag)
  const { plan, ...rest } = flag
  const attribute = attributeOf(flag.attribute, plan)
  const planned = plan.attributes.find((one) => one.attribute === flag.attribute)
  const station = flag.studyStationId
    ? { temperatureC: flag.temperatureC, isFreezeThaw: flag.isFreezeThaw ?? false }
    : null
  return {
    ...rest,
    label: attribute.label,
    unit: attribute.unit,
    decimals: attribute.decimals,
    words: attribute.words ?? null,
    method: planned ? methodText(planned) : '',
    jarName: flag.jarCode && namedJar(flag.jarCode, station),
    readOn: flag.measuredAt && dayIn(flag.zone, flag.measuredAt),
    today: dayIn(flag.zone, flag.now),
    /** Out at a station that decides: an answer leaves it to QA. */
    needsQuality: needsQuality(flag),
    series: series.find((row) => row.attribute === flag.attribute) ?? null,
    separation: series.find((row) => row.attribute === 'separation') ?? null,
    sameJar: againstTrend(await listOfSameJar(db, flag), flag),
    sameInstrument: againstTrend(await listOfSameInstrument(db, flag), flag),
    spares: await listSpares(db, flag),
    comments: await listComments(db, flag.id),
    others: await listOthersOpen(db, number),
  }
}

async function listSeriesThere(db: Db, flag: FlagRow) {
  if (!flag.studyStationId) return []
  return db
    .selectFrom('series')
    .select(['attribute', 'standing', 'used', 'outSinceWeeks', 'leavesAtWeeks', 'latestValue', 'latestWeeks'])
    .select((eb) => eb.ref('finding').$castTo<SeriesFinding>().as('finding'))
    .where('studyId', '=', flag.studyId)
    .where('batchId', '=', flag.batchId)
    .where('studyStationId', '=', flag.studyStationId)
    .execute()
}

function readingsWithTrend(db: Db) {
  return db
    .selectFrom('reading as r')
    .innerJoin('study', 'study.id', 'r.studyId')
    .innerJoin('batch', 'batch.id', 'r.batchId')
    .innerJoin('studyStation as ss', 'ss.id', 'r.studyStationId')
    .innerJoin('station', (join) => join.on('station.id', '=', stationWhenRead('r', 'ss')))
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .leftJoin('series', (join) =>
      join
        .onRef('series.studyId', '=', 'r.studyId')
        .onRef('series.batchId', '=', 'r.batchId')
        .onRef('series.studyStationId', '=', 'r.studyStationId')
        .onRef('series.attribute', '=', 'r.attribute'),
    )
    .select([
      'r.id',
      'r.attribute',
      'r.value',
      'r.measuredAt',
      'r.batchId',
      'study.code as studyCode',
      'study.startedAt',
      'batch.code as batchCode',
      'ss.id as studyStationId',
      'ss.temperatureC',
      'ss.isFreezeThaw',
      'station.name as stationName',
      'jar.code as jarCode',
      'series.standing',
    ])
    .select((eb) => eb.ref('series.finding').$castTo<SeriesFinding | null>().as('finding'))
    .select(ownOf('study', 'r'))
    .where('r.isVoid', '=', false)
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(selectFrom('reading as newer').select('newer.id').whereRef('newer.supersedesId', '=', 'r.id')),
      ),
    )
}
export type ReadingWithTrend = Awaited<ReturnType<ReturnType<typeof readingsWithTrend>['execute']>>[number]

/** What the jars of the same batch gave at the same station in the same pull. */
async function listOfSameJar(db: Db, flag: FlagRow): Promise<ReadingWithTrend[]> {
  if (!flag.pullId) return []
  return readingsWithTrend(db)
    .innerJoin('pullJar as pj', 'pj.id', 'r.pullJarId')
    .where('pj.pullId', '=', flag.pullId)
    .where('r.batchId', '=', flag.batchId)
    .orderBy('r.attribute')
    .orderBy('r.replicate')
    .execute()
}

/** What the same instrument read of the same attribute on that day of the lab, in every study. */
async function listOfSameInstrument(db: Db, flag: FlagRow): Promise<ReadingWithTrend[]> {
  const day = flag.onDay ?? (flag.measuredAt && dayIn(flag.zone, flag.measuredAt))
  if (!flag.instrumentId || !day) return []
  return readingsWithTrend(db)
    .where('r.instrumentId', '=', flag.instrumentId)
    .where('r.attribute', '=', flag.attribute)
    .where(sql<string>`(r.measured_at at time zone ${flag.zone})::date`, '=', day)
    .orderBy('study.code')
    .orderBy('ss.temperatureC', 'desc')
    .orderBy('r.replicate')
    .limit(200)
    .execute()
}

async function listSpares(db: Db, flag: FlagRow) {
  if (!flag.studyStationId) return []
  return db
    .selectFrom('jar')
    .select(['id', 'code', 'shelf', 'place'])
    .where('studyId', '=', flag.studyId)
    .where('batchId', '=', flag.batchId)
    .where('studyStationId', '=', flag.studyStationId)
    .where('kind', '=', 'spare')
    .where('state', '=', 'stored')
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(
          selectFrom('pullJar')
            .select('pullJar.id')
            .whereRef('pullJar.jarId', '=', 'jar.id')
            .where('pullJar.state', '<>', 'missed'),
        ),
      ),
    )
    .orderBy('shelf')
    .orderBy('place')
    .execute()
}

async function listComments(db: Db, flagId: string) {
  return db
    .selectFrom('flagComment as c')
    .innerJoin('person', 'person.id', 'c.writtenBy')
    .select(['c.id', 'c.text', 'c.writtenAt', 'person.name', 'person.initials'])
    .where('c.flagId', '=', flagId)
    .orderBy('c.writtenAt')
    .orderBy('c.id')
    .execute()
}

/** The other flags that wait, for "next of three". */
async function listOthersOpen(db: Db, number: number) {
  return db
    .selectFrom('flag')
    .select(['number'])
    .select(sql<FlagLevel>`level`.as('level'))
    .where('state', '=', 'open')
    .where('number', '<>', number)
    .orderBy(sql`array_position(array['out', 'leaning', 'flag', 'doubt'], level)`)
    .orderBy('number')
    .limit(50)
    .execute()
}
