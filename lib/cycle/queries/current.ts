import { sql } from 'kysely'

/** A half in force: neither taken back nor superseded. */
export function isCurrentStep(step: string) {
  return sql<boolean>`(not ${sql.ref(`${step}.is_void`)}
    and not exists (select from cycle_step newer where newer.supersedes_id = ${sql.ref(`${step}.id`)}))`
}

/** A press in force, likewise. */
export function isCurrentPress(press: string) {
  return sql<boolean>`(not ${sql.ref(`${press}.is_void`)}
    and not exists (select from cycle_press newer where newer.supersedes_id = ${sql.ref(`${press}.id`)}))`
}
