import { sql } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'

export type Photo = Awaited<ReturnType<typeof listPhotos>>[number]

/** Photos of a study, or of one of its jars, in the order they were taken. */
export async function listPhotos(db: Db, actor: Actor, studyCode: string, jarCode?: string) {
  return visiblePhotos(db, actor)
    .innerJoin('jar', 'jar.id', 'photo.jarId')
    .leftJoin('pullJar', 'pullJar.id', 'photo.pullJarId')
    .leftJoin('pull', 'pull.id', 'pullJar.pullId')
    .leftJoin('photoCopy as copy', 'copy.photoId', 'photo.id')
    .innerJoin('person', 'person.id', 'photo.takenBy')
    .select([
      'photo.id',
      'photo.width',
      'photo.height',
      'photo.takenAt',
      'photo.pullJarId',
      'photo.shows',
      'copy.width as copyWidth',
      'copy.height as copyHeight',
      'jar.id as jarId',
      'jar.code as jarCode',
      'jar.batchId',
      'jar.studyStationId',
      'pull.timeWeeks',
      'pull.label',
      'person.initials as takenBy',
    ])
    .select(measured)
    .where('study.code', '=', studyCode)
    .$if(jarCode !== undefined, (query) => query.where('jar.code', '=', jarCode!))
    .orderBy('photo.takenAt')
    .orderBy('photo.id')
    .execute()
}

type Measured = Pick<PhotoLinesOfReading, 'width' | 'height' | 'lines' | 'axisX' | 'tiltDegrees'> & {
  percent: number
}

/** The lines of the reading that counts, where one was measured on this photo. */
const measured =
  sql<Measured | null>`(select r.detail -> 'photoLines' || jsonb_build_object('percent', r.value)
  from reading r
  where r.pull_jar_id = photo.pull_jar_id and r.detail -> 'photoLines' ->> 'photoId' = photo.id::text and not r.is_void
    and not exists (select from reading newer where newer.supersedes_id = r.id)
  order by r.replicate limit 1)`.as('measured')

/** Those of studies the actor may see. */
export function visiblePhotos(db: Db, actor: Actor) {
  return db
    .selectFrom('photo')
    .innerJoin('study', 'study.id', 'photo.studyId')
    .$if(isClientOnly(actor), (query) =>
      query.where('study.isShared', '=', true).where('study.clientId', '=', actor.clientId),
    )
}
