import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { Received } from '@/lib/http/upload'
import { keepPicture } from '@/lib/photo/commands/add-photo'
import type { BatchPhotoFields } from '../schema'
import { findBatch, whenDone } from './find-batch'

/** What the microscope or the eye saw of a batch, kept as it came. Sending it twice keeps one. */
export async function addBatchPhoto(
  trx: Trx,
  actor: Actor,
  code: string,
  file: Received,
  { id, note, ...claim }: BatchPhotoFields,
) {
  const batch = await findBatch(trx, code)
  const known = await trx.selectFrom('batchPhoto').select('sha256').where('id', '=', id).executeTakeFirst()
  if (known) {
    if (known.sha256 === file.sha256) return { id }
    throw refuse.conflict('Another photo was sent under this id. Send this one anew.')
  }
  if (batch.state === 'rejected') throw refuse.conflict(`${code} is rejected, so it takes no more photos.`)
  const picture = await keepPicture(trx, file)
  const takenAt = whenDone(batch, { ...claim, isFromPaper: false })
  await trx
    .insertInto('batchPhoto')
    .values({ id, batchId: batch.id, ...picture, note, takenAt, takenBy: actor.personId })
    .execute()
  return { id }
}
