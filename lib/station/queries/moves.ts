import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'

/** The newest move of each of these jars, the newest of all first. */
export async function listLastMoves(db: Db | Trx, jarIds: string[]) {
  return db
    .selectFrom('jarMove')
    .innerJoin('stationMove as m', 'm.id', 'jarMove.stationMoveId')
    .innerJoin('station as target', 'target.id', 'm.toStationId')
    .innerJoin('person', 'person.id', 'm.movedBy')
    .innerJoin('jar', 'jar.id', 'jarMove.jarId')
    .select(['jar.code', 'target.name as toName', 'person.name as movedBy', 'm.movedAt'])
    .where('jarMove.jarId', '=', sql<string>`any(${jarIds}::uuid[])`)
    .orderBy('m.movedAt', 'desc')
    .execute()
}

export type MoveRow = {
  id: string
  fromName: string
  toName: string
  reason: string
  movedAt: string
  movedBy: string
  jars: number
  studies: string[]
}

/** Moves from or to a station, the newest first. */
export async function listMoves(db: Db, stationId: string): Promise<MoveRow[]> {
  const { rows } = await sql<MoveRow>`
    select m.id, origin.name as "fromName", target.name as "toName", m.reason, m.moved_at as "movedAt",
      p.name as "movedBy", count(*)::integer as jars, array_agg(distinct s.code order by s.code) as studies
    from station_move m
      join station origin on origin.id = m.from_station_id
      join station target on target.id = m.to_station_id
      join person p on p.id = m.moved_by
      join jar_move jm on jm.station_move_id = m.id
      join study_station ss on ss.id = jm.study_station_id
      join study s on s.id = ss.study_id
    where m.from_station_id = ${stationId} or m.to_station_id = ${stationId}
    group by m.id, origin.name, target.name, p.name
    order by m.moved_at desc limit 50
  `.execute(db)
  return rows
}
