import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { doubtsOf } from '@/lib/reading/queries/doubts'
import type { ProtocolPlan } from '@/lib/protocol/schema'

/** A doubt that was found when the reading was taken; whether it is settled is on its flag. */
export type EntryDoubt = { reason: string; sentence: string }

export type FrameStation = {
  id: string
  name: string
  temperatureC: number | null
  isFreezeThaw: boolean
  /** "inverted": what sets its jars apart from upright ones beside them. */
  variant?: string
  voice: 'decides' | 'informs' | 'supports'
}
export type FrameBatch = {
  id: string
  code: string
  madeAt: string | null
  isReference?: boolean
  /** As its test found it, else as its formula states it. */
  emulsionType?: string | null
  lines: { percent: number; density: number; internal: boolean }[]
}
export type FrameRepeat = { id: string; repeatOf: string; attribute: string; state: string; jarCode: string }
export type FrameSpare = {
  id: string
  code: string
  batchId: string
  studyStationId: string
  shelf: number | null
  place: number | null
  /** Pulls in which it was asked for and given up. */
  missedIn: string[]
}
export type FrameReading = Awaited<ReturnType<typeof listFrameReadings>>[number]
export type FrameFlag = Awaited<ReturnType<typeof listFrameFlags>>[number]
export type Frame = Awaited<ReturnType<typeof loadFrame>>

/** Everything that the series of a study are computed from, in three statements whatever its size. */
export async function loadFrame(db: Db | Trx, studyId: string) {
  const study = await getFrameStudy(db, studyId)
  const readings = await listFrameReadings(db, studyId)
  const flags = await listFrameFlags(db, studyId)
  return { study, readings, flags }
}

async function getFrameStudy(db: Db | Trx, studyId: string) {
  const { rows } = await sql<{
    id: string
    code: string
    title: string
    plan: ProtocolPlan
    startedAt: string
    endWeeks: number
    zone: string
    now: string
    stations: FrameStation[]
    batches: FrameBatch[]
    repeats: FrameRepeat[]
    spares: FrameSpare[]
  }>`
    select s.id, s.code, s.title, s.plan, s.started_at, s.end_weeks,
      coalesce((select time_zone from lab limit 1), 'UTC') as zone, app_now() as now,
      (select coalesce(jsonb_agg(jsonb_build_object('id', ss.id, 'name', st.name, 'temperatureC', ss.temperature_c,
          'isFreezeThaw', ss.is_freeze_thaw, 'variant', ss.variant, 'voice', ss.voice) order by ss.position), '[]')
        from study_station ss
          join study_station_stay stay on stay.study_station_id = ss.id and stay.until_at is null
          join station st on st.id = stay.station_id where ss.study_id = s.id) as stations,
      (select coalesce(jsonb_agg(jsonb_build_object('id', b.id, 'code', b.code, 'madeAt', b.made_at, 'isReference', sb.is_reference,
          'emulsionType', coalesce(nullif(b.emulsion_type_found, 'not clear'), (select f.emulsion_type
            from formula_version fv join formula f on f.id = fv.formula_id where fv.id = b.formula_version_id)),
          'lines', (select coalesce(jsonb_agg(jsonb_build_object('percent', l.percent_thousandths / 1000.0,
              'density', l.density, 'internal', l.is_internal)), '[]')
            from formula_line l where l.formula_version_id = b.formula_version_id)) order by sb.position), '[]')
        from study_batch sb join batch b on b.id = sb.batch_id where sb.study_id = s.id) as batches,
      (select coalesce(jsonb_agg(jsonb_build_object('id', pj.id, 'repeatOf', pj.repeat_of, 'attribute', pj.attribute,
          'state', pj.state, 'jarCode', j.code)), '[]')
        from pull_jar pj join jar j on j.id = pj.jar_id
        where pj.study_id = s.id and pj.repeat_of is not null) as repeats,
      (select coalesce(jsonb_agg(jsonb_build_object('id', j.id, 'code', j.code, 'batchId', j.batch_id,
          'studyStationId', j.study_station_id, 'shelf', j.shelf, 'place', j.place,
          'missedIn', (select coalesce(jsonb_agg(pj.pull_id), '[]') from pull_jar pj where pj.jar_id = j.id))
          order by j.shelf, j.place, j.code), '[]')
        from jar j where j.study_id = s.id and s.state <> 'closed' and j.kind = 'spare' and j.state = 'stored'
          and not exists (select 1 from pull_jar pj where pj.jar_id = j.id and pj.state <> 'missed')) as spares
    from study s where s.id = ${studyId}
  `.execute(db)
  return rows[0]!
}

/** What counts as the record: neither superseded nor void. */
async function listFrameReadings(db: Db | Trx, studyId: string) {
  return db
    .selectFrom('reading as r')
    .leftJoin('pullJar as pj', 'pj.id', 'r.pullJarId')
    .leftJoin('pull', 'pull.id', 'pj.pullId')
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .select([
      'r.id',
      'r.batchId',
      'r.studyStationId',
      'r.pullJarId',
      'r.jarId',
      'jar.code as jarCode',
      'r.attribute',
      'r.replicate',
      'r.value',
      'r.word',
      'r.typed',
      'r.instrumentId',
      'r.measuredAt',
      'r.claimedAt',
      'r.recordedAt',
      'r.recordedBy',
      'pull.id as pullId',
      'pull.dueOn',
      'pj.repeatOf',
    ])
    .select((eb) => [
      eb.ref('r.detail').$castTo<Record<string, unknown>>().as('detail'),
      doubtsOf('r').as('doubts'),
    ])
    .where('r.studyId', '=', studyId)
    .where('r.isVoid', '=', false)
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(selectFrom('reading as newer').select('newer.id').whereRef('newer.supersedesId', '=', 'r.id')),
      ),
    )
    .orderBy('r.measuredAt')
    .orderBy('r.replicate')
    .orderBy('r.id')
    .execute()
}

async function listFrameFlags(db: Db | Trx, studyId: string) {
  return db
    .selectFrom('flag')
    .select([
      'id',
      'number',
      'batchId',
      'studyStationId',
      'attribute',
      'rule',
      'level',
      'readingId',
      'instrumentId',
      'onDay',
      'atWeeks',
      'raisedAt',
      'state',
      'settles',
      'closedBy',
    ])
    .select(sql<string | null>`evidence ->> 'wants'`.as('wants'))
    .where('studyId', '=', studyId)
    .orderBy('number')
    .execute()
}
