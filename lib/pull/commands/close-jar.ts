import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import type { JarToLog } from '@/lib/reading/schema/entry'
import type { PullJar } from '../queries/pull-jar'
import { refuseStale } from '../rules/refusals'

/** In one statement: the jar of the pull is done, and a jar that was opened is spent. */
export async function closeJar(
  trx: Trx,
  actor: Actor,
  jar: PullJar,
  input: JarToLog,
  leftOut: readonly string[],
): Promise<number> {
  const jarState = jar.asks === 'watch' ? 'stored' : 'spent'
  const isFirst = jar.state !== 'done'
  const { rows } = await sql<{ version: number }>`
    with moved as (
      update jar set state = ${jarState}, version = version + 1
        where id = ${jar.jarId} and state <> ${jarState}
    )
    update pull_jar set state = 'done', version = version + 1,
        closed_at = case when ${isFirst} then app_now() else closed_at end,
        closed_by = case when ${isFirst} then ${actor.personId}::uuid else closed_by end,
        left_out = case when ${isFirst} then ${leftOut}::text[] else left_out end,
        note = ${noteOf(jar, input)}
      where id = ${jar.id} and version = ${jar.version}
      returning version
  `.execute(trx)
  if (!rows[0]) refuseStale(jar, -1)
  return rows[0]!.version
}

/** Some of it is read: it stays to be read, in this person's hands. */
export async function keepOpen(trx: Trx, actor: Actor, jar: PullJar, input: JarToLog): Promise<number> {
  const { rows } = await sql<{ version: number }>`
    update pull_jar set opened_by = ${actor.personId}, opened_at = app_now(), version = version + 1,
        note = ${noteOf(jar, input)}
      where id = ${jar.id} and version = ${jar.version}
      returning version
  `.execute(trx)
  if (!rows[0]) refuseStale(jar, -1)
  return rows[0]!.version
}

/** What was noted with one attribute is not lost to what is noted with the next. */
function noteOf(jar: PullJar, input: JarToLog): string {
  if (input.note === '' || jar.note === input.note) return jar.note
  return jar.note === '' || jar.note.includes(input.note) || input.note.startsWith(jar.note)
    ? longer(jar.note, input.note)
    : `${jar.note}\n${input.note}`
}

function longer(a: string, b: string): string {
  return a.length > b.length ? a : b
}
