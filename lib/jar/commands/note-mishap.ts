import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { whatFollows } from '@/lib/pull/queries/what-follows'
import { claimedInstant } from '@/lib/reading/rules/claimed-time'
import { lockStudy } from '@/lib/series/commands'
import { findJarOfMishap, type JarOfMishap } from '../queries/of-mishap'
import { readJarCode } from '../rules/code'
import { missedBecause, refuseMishap, stateAfter } from '../rules/mishap'
import type { JarMishap, NotedMishap } from '../schema'

/**
 * What happened to a jar besides being read. A jar that is gone or opened is missing from its later pulls as well; one
 * that is pulled early stays to be read.
 */
export async function noteMishap(
  trx: Trx,
  actor: Actor,
  scanned: string,
  input: JarMishap,
): Promise<NotedMishap> {
  const code = readJarCode(scanned)
  const found = code ? await findJarOfMishap(trx, code, input.id) : undefined
  if (!found) throw refuse.notFound(`No jar has the code ${scanned.slice(0, 20)}. Read the label again.`)
  await lockStudy(trx, found.studyId)
  const jar = (await findJarOfMishap(trx, found.code, input.id))!
  if (jar.before) return answerAgain(trx, actor, jar)

  const asked = refuseMishap(jar, input)
  const { measuredAt } = claimedInstant(input, jar.now)
  await trx
    .insertInto('jarMishap')
    .values({
      id: input.id,
      studyId: jar.studyId,
      jarId: jar.id,
      pullJarId: asked?.id ?? null,
      kind: input.kind,
      reason: input.reason,
      happenedAt: measuredAt,
      claimedAt: input.claimedAt,
      recordedBy: actor.personId,
    })
    .execute()
  if (input.kind === 'pulled early') {
    return { id: input.id, pullJarId: asked!.id, version: asked!.version, alsoMissed: 0, follows: null }
  }
  const missed = await giveUp(trx, actor, jar, asked?.id ?? null, input)
  const own = missed.find((row) => row.id === asked?.id) ?? null
  return {
    id: input.id,
    pullJarId: own?.id ?? null,
    version: own?.version ?? null,
    alsoMissed: missed.length - (own ? 1 : 0),
    follows: own ? await whatFollows(trx, own.id) : null,
  }
}

/** In one statement: where the jar is now, and what will not be read of it. */
async function giveUp(trx: Trx, actor: Actor, jar: JarOfMishap, pullJarId: string | null, input: JarMishap) {
  const state = stateAfter(jar, input.kind)
  const isWhole = input.kind !== 'missed'
  const { rows } = await sql<{ id: string; version: number }>`
    with moved as (
      update jar set state = ${state}, version = version + 1 where id = ${jar.id} and state <> ${state}
    )
    update pull_jar set state = 'missed', version = version + 1, closed_at = app_now(),
        closed_by = ${actor.personId}, missed_reason = ${missedBecause(input)}
      where state in ('due', 'resting')
        and (id = ${pullJarId} or (${isWhole} and jar_id = ${jar.id}))
      returning id, version
  `.execute(trx)
  return rows
}

async function answerAgain(trx: Trx, actor: Actor, jar: JarOfMishap): Promise<NotedMishap> {
  const before = jar.before!
  if (before.recordedBy !== actor.personId || before.jarId !== jar.id) {
    throw refuse.conflict('Another entry has this id. Reload, then note it anew.')
  }
  const asked = jar.asked.find((one) => one.id === before.pullJarId) ?? null
  const also = jar.asked.filter((one) => one.id !== asked?.id && one.closedAt === asked?.closedAt)
  return {
    id: before.id,
    pullJarId: asked?.id ?? null,
    version: asked?.version ?? null,
    alsoMissed: asked?.state === 'missed' ? also.length : 0,
    follows: asked?.state === 'missed' ? await whatFollows(trx, asked.id) : null,
  }
}
