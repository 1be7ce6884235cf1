import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { lockStudyOfPullJar } from '@/lib/series/commands'
import { findPullJar, type PullJar } from '../queries/pull-jar'
import { whatFollows } from '../queries/what-follows'
import type { StandIn } from '../schema'

/**
 * A spare or a retain is asked for in a pull in place of a jar that was not read; of a watch jar that is gone also in
 * its later pulls, so that one jar is looked at from then on.
 */
export async function takePlace(trx: Trx, _actor: Actor, pullJarId: string, input: StandIn) {
  await lockStudyOfPullJar(trx, pullJarId)
  const jar = await findPullJar(trx, pullJarId)
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  const { takenBy, substitutes } = await whatFollows(trx, pullJarId)
  if (takenBy?.pullJarId === input.id) return { pullJarId: input.id, code: takenBy.code }
  if (jar.studyState === 'closed') {
    throw refuse.conflict(`Study ${jar.studyCode} is closed, so no jar takes the place of ${jar.code}.`)
  }
  if (jar.state !== 'missed') {
    throw refuse.conflict(
      `Jar ${jar.code} is still asked for. Note first why it is not read; then another can take its place.`,
    )
  }
  if (takenBy) {
    throw refuse.conflict(`Jar ${takenBy.code} takes the place of ${jar.code} already. Read that one.`)
  }
  const substitute = substitutes.find((one) => one.jarId === input.jarId)
  if (!substitute) {
    throw refuse.conflict('That jar is not free to take its place. Reload to see which ones are.')
  }
  const places = [{ id: input.id, pullJarId }, ...(await laterPlaces(trx, jar))]
  await trx
    .insertInto('pullJar')
    .columns(['id', 'pullId', 'jarId', 'studyId', 'asks', 'attribute', 'repeatOf', 'standsInFor'])
    .expression(
      sql`select v.id, pj.pull_id, ${substitute.jarId}::uuid, pj.study_id, pj.asks, pj.attribute, pj.repeat_of, pj.id
        from (select unnest(${places.map((one) => one.id)}::uuid[]) as id,
          unnest(${places.map((one) => one.pullJarId)}::uuid[]) as original) v
        join pull_jar pj on pj.id = v.original` as never,
    )
    .execute()
  // A retain stood nowhere in the plan; from now on it stands where the jar did.
  if (substitute.kind === 'retain') {
    await sql`
      update jar set state = 'stored', version = jar.version + 1, station_id = original.station_id,
          study_station_id = original.study_station_id
        from jar original where original.id = ${jar.jarId} and jar.id = ${substitute.jarId}
    `.execute(trx)
  }
  return { pullJarId: input.id, code: substitute.code }
}

/** Later pulls that the jar was given up for together with this one. */
async function laterPlaces(trx: Trx, jar: PullJar): Promise<{ id: string; pullJarId: string }[]> {
  if (jar.asks !== 'watch') return []
  const rows = await trx
    .selectFrom('pullJar')
    .select('id')
    .where('jarId', '=', jar.jarId)
    .where('id', '!=', jar.id)
    .where('state', '=', 'missed')
    .where('closedAt', '=', jar.closedAt)
    .execute()
  return rows.map((row) => ({ id: newId(), pullJarId: row.id }))
}
