import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudyOfPullJar } from '@/lib/series/commands'
import { findPullJar } from '../queries/pull-jar'
import { refuseDone, refuseOver, refuseStale } from '../rules/refusals'
import type { TakingOut } from '../schema'

/** A measuring jar leaves its station and rests closed for the protocol's hours before it is opened. */
export async function takeOut(trx: Trx, actor: Actor, pullJarId: string, input: TakingOut) {
  await lockStudyOfPullJar(trx, pullJarId)
  const jar = await findPullJar(trx, pullJarId)
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  refuseOver(jar)
  refuseDone(jar)
  if (jar.asks === 'watch') {
    throw refuse.conflict(`Jar ${jar.code} is a watch jar: it stays at its station and is looked at there.`)
  }
  if (jar.state === 'resting') {
    throw refuse.conflict(`Jar ${jar.code} is out and resting already. Reload to see until when.`, {
      version: jar.version,
      restUntil: jar.restUntil,
    })
  }
  refuseStale(jar, input.version)
  const { rows } = await sql<{ version: number; restUntil: string }>`
    with moved as (update jar set state = 'resting', version = version + 1 where id = ${jar.jarId})
    update pull_jar set state = 'resting', version = version + 1, taken_at = app_now(),
        opened_by = ${actor.personId}, opened_at = app_now(),
        rest_until = app_now() + ${jar.plan.restHours}::float8 * interval '1 hour'
      where id = ${jar.id} and version = ${input.version}
      returning version, rest_until
  `.execute(trx)
  if (!rows[0]) refuseStale(jar, -1)
  return { ...rows[0]!, state: 'resting' as const }
}
