import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { HandoverNote } from './schema'

export async function writeNote(trx: Trx, actor: Actor, { id, text, claimedAt }: HandoverNote) {
  await trx
    .insertInto('handoverNote')
    .values({ id, text, claimedAt, writtenBy: actor.personId })
    .onConflict((conflict) => conflict.column('id').doNothing())
    .execute()
  const note = await trx
    .selectFrom('handoverNote')
    .select(['id', 'text', 'writtenAt', 'writtenBy'])
    .where('id', '=', id)
    .executeTakeFirstOrThrow()
  if (note.writtenBy !== actor.personId || note.text !== text) {
    throw refuse.conflict('Another note has this id. Reload, then write it anew.')
  }
  return { id: note.id, writtenAt: note.writtenAt }
}

/** Who pressed first counts; a second press is told so and changes nothing. */
export async function markRead(trx: Trx, actor: Actor, noteId: string, id: string) {
  const note = await trx.selectFrom('handoverNote').select('id').where('id', '=', noteId).executeTakeFirst()
  if (!note) throw refuse.notFound('There is no such note.')
  await trx
    .insertInto('handoverRead')
    .values({ id, handoverNoteId: noteId, readBy: actor.personId })
    .onConflict((conflict) => conflict.column('handoverNoteId').doNothing())
    .execute()
  return trx
    .selectFrom('handoverRead as r')
    .innerJoin('person', 'person.id', 'r.readBy')
    .select(['r.id', 'r.readAt', 'person.name as readBy'])
    .where('r.handoverNoteId', '=', noteId)
    .executeTakeFirstOrThrow()
}
