import { sql } from 'kysely'

/** `label` is the pull it was taken in; null at the start itself. */
export type StartPhoto = { of: 'jar' | 'batch'; id: string; takenAt: string; label: string | null }

/**
 * What a jar of `jarsToRead` is looked at beside: the jar itself as its first pull showed it; else, and in that first
 * pull, its batch as it was when the study began. Within the statement that reads the jars.
 */
export const startPhoto = sql<StartPhoto | null>`coalesce(
  (select jsonb_build_object('of', 'jar', 'id', photo.id, 'takenAt', photo.taken_at,
      'label', case when seen.time_weeks > 0 then seen.label end)
    from photo join pull_jar asked on asked.id = photo.pull_jar_id join pull seen on seen.id = asked.pull_id
    where photo.jar_id = pj.jar_id and photo.shows = 'jar' and photo.pull_jar_id <> pj.id
      and seen.time_weeks = (select min(first.time_weeks) from pull_jar its join pull first on first.id = its.pull_id
        where its.jar_id = pj.jar_id)
    order by photo.taken_at desc, photo.id desc limit 1),
  (select jsonb_build_object('of', 'batch', 'id', photo.id, 'takenAt', photo.taken_at, 'label', null)
    from batch_photo photo
    where photo.batch_id = jar.batch_id and photo.taken_at < study.started_at + interval '1 day'
    order by photo.taken_at desc, photo.id desc limit 1))`.as('startPhoto')
