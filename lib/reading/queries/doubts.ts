import { sql } from 'kysely'
import { isCurrentStep } from '@/lib/cycle/queries/current'

export type ReadingDoubt = { reason: string; sentence: string; cycleStepIds?: string[] }

/**
 * What was doubted when the reading was taken, and what was found afterwards of its instrument or of the cycles before
 * it. What rested on a half of a cycle is gone once that half was corrected or taken back.
 */
export function doubtsOf(reading: 'r' | 'reading') {
  return sql<
    ReadingDoubt[]
  >`(select coalesce(jsonb_agg(found.doubt order by found.place, found.id), '[]') from (
      select d.doubt, d.place::text as place, null::uuid as id
        from jsonb_array_elements(${sql.ref(`${reading}.doubts`)}) with ordinality d (doubt, place)
      union all
      select jsonb_strip_nulls(jsonb_build_object('reason', later.reason, 'sentence', later.sentence,
          'cycleStepIds', case when later.cycle_step_id is not null then jsonb_build_array(later.cycle_step_id) end)),
        later.recorded_at::text, later.id
        from reading_doubt later where later.reading_id = ${sql.ref(`${reading}.id`)}) found
    where not found.doubt ? 'cycleStepIds' or exists (select from cycle_step step
      where found.doubt -> 'cycleStepIds' ? step.id::text and ${isCurrentStep('step')}))`
}
