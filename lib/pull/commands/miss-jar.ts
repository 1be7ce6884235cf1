import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudyOfPullJar } from '@/lib/series/commands'
import { findPullJar } from '../queries/pull-jar'
import { refuseDone, refuseOver, refuseStale } from '../rules/refusals'
import type { MissedJar } from '../schema'

/** Nothing will be read of this jar in this pull, and why. A lost jar is missing from its later pulls as well. */
export async function missJar(trx: Trx, actor: Actor, pullJarId: string, input: MissedJar) {
  await lockStudyOfPullJar(trx, pullJarId)
  const jar = await findPullJar(trx, pullJarId)
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  refuseOver(jar)
  refuseDone(jar)
  refuseStale(jar, input.version)
  const jarState = input.isJarLost ? 'lost' : 'stored'
  const { rows } = await sql<{ id: string; version: number }>`
    with moved as (
      update jar set state = ${jarState}, version = version + 1
        where id = ${jar.jarId} and state <> ${jarState}
    )
    update pull_jar set state = 'missed', version = version + 1, closed_at = app_now(),
        closed_by = ${actor.personId}, missed_reason = ${input.reason}
      where (id = ${jar.id} and version = ${input.version})
        or (${input.isJarLost} and jar_id = ${jar.jarId} and state in ('due', 'resting') and id <> ${jar.id})
      returning id, version
  `.execute(trx)
  const own = rows.find((row) => row.id === jar.id)
  if (!own) refuseStale(jar, -1)
  return { version: own!.version, state: 'missed' as const, alsoMissed: rows.length - 1 }
}
