import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { namedJar } from '@/lib/jar/rules/code'
import { plannedFor } from '@/lib/bench/rules'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { consequences } from '../rules/consequences'

/** A jar that could take the place of one that is not read. */
export type Substitute = {
  jarId: string
  code: string
  name: string
  kind: 'spare' | 'retain'
  shelf: number | null
  place: number | null
}
export type WhatFollows = Awaited<ReturnType<typeof whatFollows>>

type Found = {
  asks: string
  attribute: string | null
  state: string
  label: string
  timeWeeks: number
  position: number
  plan: ProtocolPlan
  temperatureC: number | null
  isFreezeThaw: boolean
  variant: string
  stationName: string
  others: number
  later: number
  points: Record<string, number>
  takenBy: { code: string; pullJarId: string } | null
  free: Omit<Substitute, 'name'>[]
}

/** What a jar that is not read means for the statistics, and which jars could be read in its place. */
export async function whatFollows(db: Db | Trx, pullJarId: string) {
  const { rows } = await sql<Found>`
    select pj.asks, pj.attribute, pj.state, pull.label, pull.time_weeks, ss.position, study.plan, ss.temperature_c,
      ss.is_freeze_thaw, ss.variant, station.name as station_name,
      (select count(*)::int from pull_jar o join jar oj on oj.id = o.jar_id
        where o.pull_id = pj.pull_id and o.id <> pj.id and o.asks = pj.asks and oj.batch_id = jar.batch_id
          and o.state <> 'missed') as others,
      (select count(*)::int from pull_jar o where o.jar_id = pj.jar_id and o.id <> pj.id and o.state = 'missed'
          and o.closed_at = pj.closed_at) as later,
      (select coalesce(jsonb_object_agg(p.attribute, p.points), '{}') from (
          select r.attribute, count(distinct coalesce(rp.pull_id::text, r.measured_at::text))::int as points from reading r
            left join pull_jar rp on rp.id = r.pull_jar_id
          where r.batch_id = jar.batch_id and r.study_id = pj.study_id and not r.is_void
            and (r.study_station_id = ss.id or r.study_station_id is null)
            and not exists (select from reading newer where newer.supersedes_id = r.id)
          group by r.attribute) p) as points,
      (select jsonb_build_object('code', sj.code, 'pullJarId', s.id) from pull_jar s join jar sj on sj.id = s.jar_id
        where s.stands_in_for = pj.id and s.state <> 'missed' limit 1) as taken_by,
      (select coalesce(jsonb_agg(jsonb_build_object('jarId', j.id, 'code', j.code, 'kind', j.kind, 'shelf', j.shelf,
          'place', j.place) order by j.kind = 'retain', j.shelf, j.place, j.code), '[]')
        from jar j where j.study_id = pj.study_id and j.batch_id = jar.batch_id and j.set_aside_for is null
          and ((j.kind = 'spare' and j.state = 'stored' and j.study_station_id = ss.id)
            or (j.kind = 'retain' and j.state = 'kept'))
          and not exists (select from pull_jar o where o.jar_id = j.id and o.state <> 'missed')) as free
    from pull_jar pj
      join pull on pull.id = pj.pull_id
      join study on study.id = pj.study_id
      join study_station ss on ss.id = pull.study_station_id
      join station on station.id = ss.station_id
      join jar on jar.id = pj.jar_id
    where pj.id = ${pullJarId}
  `.execute(db)
  const [found] = rows
  if (!found) throw refuse.notFound('There is no such jar in a pull.')
  const isOver = found.state === 'missed' && found.takenBy === null
  const planned = plannedFor(found)
  return {
    sentences: found.takenBy
      ? []
      : consequences(
          found,
          planned.map((one) => one.attribute),
        ),
    takenBy: found.takenBy,
    substitutes: isOver
      ? found.free.map((one): Substitute => ({
          ...one,
          name: one.kind === 'spare' ? namedJar(one.code, found) : one.code,
        }))
      : [],
  }
}
