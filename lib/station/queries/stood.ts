import { sql, type RawBuilder } from 'kysely'

/**
 * The lab's station at which a reading's jar stood when it was read: where its last move until then took it, or
 * where its series began. Both are named as the query around it calls them; without a jar the series' own is told.
 */
export function stationWhenRead(reading: string, studyStation: string): RawBuilder<string | null> {
  return sql<string | null>`coalesce((select station_move.to_station_id from jar_move
    join station_move on station_move.id = jar_move.station_move_id
    where jar_move.jar_id = ${sql.ref(`${reading}.jarId`)}
      and station_move.moved_at <= ${sql.ref(`${reading}.measuredAt`)}
    order by station_move.moved_at desc limit 1), ${sql.ref(`${studyStation}.stationId`)})`
}
