import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { lockStudyOfPullJar, recomputeSeries } from '@/lib/series/commands'
import { findPullJar, type PullJar } from '../queries/pull-jar'
import { isUndone, noteWithout, refuseUndo, undoneReason, type SavedReading } from '../rules/undo'
import type { UndoneSave } from '../schema'
import { takeRepeatsBack } from './take-repeats-back'

/**
 * Takes one save back: its readings are voided and stay on record, the jar is due or resting again, spare jars that it
 * called for are called for no more where nothing was read of them, and what it touched is computed anew.
 */
export async function undoSave(trx: Trx, actor: Actor, pullJarId: string, input: UndoneSave) {
  await lockStudyOfPullJar(trx, pullJarId)
  const jar = await findPullJar(trx, pullJarId)
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  const saved = await listSaved(trx, pullJarId, input.readings)
  if (saved.length < new Set(input.readings).size)
    throw refuse.notFound(`These readings of ${jar.code} are not on record. Reload to see what is.`)
  if (saved.every(isUndone)) return { version: jar.version, state: jar.state, takenBack: [] }
  refuseUndo(actor, jar, saved)
  await trx
    .insertInto('reading')
    .values(
      saved.map(({ id, recordedAt: _at, isVoid: _void, newer: _newer, ...place }) => ({
        ...place,
        id: newId(),
        typed: '',
        isVoid: true,
        supersedesId: id,
        reason: undoneReason,
        recordedBy: actor.personId,
      })),
    )
    .execute()
  const touched = [...new Set(saved.map((reading) => reading.attribute))]
  const takenBack = await takeRepeatsBack(trx, jar, touched)
  const reopened = await reopenJar(trx, jar, await noteBefore(trx, jar, saved))
  const recomputed = await recomputeSeries(trx, actor, jar.studyId, { only: touched })
  return { ...reopened, takenBack, ...recomputed }
}

async function listSaved(trx: Trx, pullJarId: string, ids: readonly string[]) {
  return trx
    .selectFrom('reading as r')
    .select(['r.id', 'r.studyId', 'r.batchId', 'r.studyStationId', 'r.pullJarId', 'r.jarId'])
    .select(['r.attribute', 'r.replicate', 'r.measuredAt', 'r.claimedAt', 'r.recordedBy', 'r.recordedAt'])
    .select(['r.isVoid', 'r.supersedesId'])
    .select(
      sql<SavedReading['newer']>`(select jsonb_build_object('isVoid', newer.is_void, 'reason', newer.reason,
          'by', person.name) from reading newer join person on person.id = newer.recorded_by
        where newer.supersedes_id = r.id)`.as('newer'),
    )
    .where('r.pullJarId', '=', pullJarId)
    .where('r.id', 'in', [...ids])
    .execute()
}

/** The trail knows what the jar's note was before this save and what it made of it. */
async function noteBefore(trx: Trx, jar: PullJar, [first]: readonly SavedReading[]): Promise<string> {
  const { rows } = await sql<{ before: string; after: string }>`
    select jar.before ->> 'note' as before, jar.after ->> 'note' as after
      from trail saved join trail jar on jar.request_id = saved.request_id
      where saved.table_name = 'reading' and saved.row_id = ${first!.id} and saved.operation = 'insert'
        and jar.table_name = 'pull_jar' and jar.row_id = ${jar.id} and jar.operation = 'update'
  `.execute(trx)
  return rows[0] ? noteWithout(jar.note, rows[0]) : jar.note
}

/** As it was before the save: resting where it had been taken out, else due; nothing is spent; one still open stays so. */
async function reopenJar(trx: Trx, jar: PullJar, note: string): Promise<{ version: number; state: string }> {
  const wasDone = jar.state === 'done'
  if (!wasDone && note === jar.note) return { version: jar.version, state: jar.state }
  const [state, jarState] = jar.takenAt ? ['resting', 'resting'] : ['due', 'stored']
  const { rows } = await sql<{ version: number; state: string }>`
    with moved as (
      update jar set state = ${jarState}, version = version + 1
        where ${wasDone} and id = ${jar.jarId} and state <> ${jarState} and state <> 'lost'
    )
    update pull_jar set version = version + 1, note = ${note},
        state = case when ${wasDone} then ${state} else state end,
        closed_at = case when ${wasDone} then null else closed_at end,
        closed_by = case when ${wasDone} then null else closed_by end
      where id = ${jar.id}
      returning version, state
  `.execute(trx)
  return rows[0]!
}
