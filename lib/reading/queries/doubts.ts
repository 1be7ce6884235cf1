import { sql } from 'kysely'

export type ReadingDoubt = { reason: string; sentence: string }

/** What was doubted when the reading was taken, and what was found of its instrument afterwards. */
export function doubtsOf(reading: 'r' | 'reading') {
  return sql<ReadingDoubt[]>`(${sql.ref(`${reading}.doubts`)} || coalesce((
    select jsonb_agg(jsonb_build_object('reason', later.reason, 'sentence', later.sentence)
      order by later.recorded_at, later.id)
    from reading_doubt later where later.reading_id = ${sql.ref(`${reading}.id`)}), '[]'))`
}
