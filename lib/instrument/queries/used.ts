import { sql, type RawBuilder, type SqlBool } from 'kysely'
import type { InstrumentEvent } from '../rules/trust'

export type UsedInstrument = {
  id: string
  code: string
  kind: string
  spindles: { name: string; constant: number }[]
  /** Newest calibrations and daily checks, the oldest first. */
  events: InstrumentEvent[]
}

/** Within another statement: instruments `i` with what their readings are judged by. */
export function usedInstruments(which: RawBuilder<SqlBool>): RawBuilder<UsedInstrument[]> {
  return sql<
    UsedInstrument[]
  >`(select coalesce(jsonb_agg(jsonb_build_object('id', i.id, 'code', i.code, 'kind', i.kind,
      'spindles', i.spindles, 'events', (select coalesce(jsonb_agg(jsonb_build_object('kind', e.kind, 'at', e.at,
          'result', e.result, 'sentence', e.sentence, 'dueOn', e.due_on) order by e.at, e.id), '[]') from (
        (select 'calibration' as kind, id, calibrated_at as at, result, coalesce(detail ->> 'sentence', '') as sentence, due_on
          from calibration where instrument_id = i.id order by calibrated_at desc, id desc limit 20)
        union all
        (select 'check', id, checked_at, result, coalesce(detail ->> 'sentence', ''), null::date
          from instrument_check where instrument_id = i.id order by checked_at desc, id desc limit 60)) e))), '[]')
    from instrument i where ${which})`
}
