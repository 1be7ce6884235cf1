import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listJarsOf, type JarRow } from '@/lib/jar/queries/jars'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { getStudyHead, listStudyBatches } from './head'
import { headOf } from './sheet'

type Query = ListQuery<'station' | 'batch' | 'kind' | 'state'>

/** One page of a study's jars in the order in which they stand, and how many there are of each kind. */
export async function listStudyJars(db: Db, actor: Actor, code: string, query: Query) {
  const study = await getStudyHead(db, actor, code)
  const batches = await listStudyBatches(db, study.id)
  const page = await pageOf(db, jarSource(db, actor, study.id, query), query)
  const counts = await countJars(db, study.id)
  const { station } = await listChoices(db, actor)
  const choices = { station, batch: batches.map((batch) => batch.code) }
  return { study: headOf(study), batches, ...page, counts, choices }
}
export type StudyJarsPage = Awaited<ReturnType<typeof listStudyJars>>

export function jarSource(db: Db, actor: Actor, studyId: string, { q, filters }: Query): Source<JarRow> {
  const { station, batch, kind, state } = filters
  const typed = likeTyped(q.replace(/^[^·]{1,3}·/, ''))
  return {
    from: sql`jar join batch on batch.id = jar.batch_id
      left join study_station on study_station.id = jar.study_station_id
      left join station on station.id = jar.station_id`,
    where: [
      sql<SqlBool>`jar.study_id = ${studyId}`,
      ...(q
        ? [
            sql<SqlBool>`(jar.code ilike ${typed} or batch.code ilike ${typed} or station.name ilike ${typed}
              or jar.set_aside_for ilike ${typed})`,
          ]
        : []),
      ...(station ? [sql<SqlBool>`station.name = ${station}`] : []),
      ...(batch ? [sql<SqlBool>`batch.code = ${batch}`] : []),
      ...(kind ? [sql<SqlBool>`jar.kind = ${kind}`] : []),
      ...(state ? [sql<SqlBool>`jar.state = ${state}`] : []),
    ],
    id: sql`jar.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('jar.code'),
      kind: { by: sql`jar.kind`, kind: 'text' },
      batch: naturally('batch.code'),
      station: { by: sql`study_station.temperature_c`, kind: 'number' },
      state: { by: sql`jar.state`, kind: 'text' },
      // As one walks: the stations of the study, their shelves from the top, what stands nowhere at the end.
      place: {
        by: sql`(coalesce(study_station.position, 999) || ' ' || coalesce(jar.shelf, 999) || ' '
          || coalesce(jar.place, 999) || ' ' || jar.code) collate natural_order`,
        kind: 'text',
      },
      next: {
        by: sql`(select min(pull.due_on) from pull_jar join pull on pull.id = pull_jar.pull_id
          where pull_jar.jar_id = jar.id and pull_jar.state in ('due', 'resting'))`,
        kind: 'day',
      },
      fill: { by: sql`jar.gross_g - jar.tare_g`, kind: 'number' },
      tare: { by: sql`jar.tare_g`, kind: 'number' },
      gross: { by: sql`jar.gross_g`, kind: 'number' },
    },
    rows: (ids) => listJarsOf(db, actor, ids),
    idOf: (jar) => jar.id,
  }
}

async function countJars(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('jar')
    .select((eb) => [
      'kind',
      eb.fn.countAll<number>().as('count'),
      eb.fn.countAll<number>().filterWhere('state', 'in', ['stored', 'resting']).as('standing'),
    ])
    .where('studyId', '=', studyId)
    .groupBy('kind')
    .execute()
  const sum = (of: 'count' | 'standing') => rows.reduce((all, row) => all + row[of], 0)
  return { all: sum('count'), standing: sum('standing'), kinds: rows }
}
