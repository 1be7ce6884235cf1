import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { readPixels } from '@/lib/files/picture'
import { storage } from '@/lib/files/storage'
import { refuse } from '@/lib/http/errors'
import { proposeLines } from '@/lib/science/photo-layers/propose'
import { copyKey } from '../rules/keys'
import { scaledProposal } from '../rules/proposal'
import { findFile } from './file'

/** As many rows as the proposal reads; a copy of more is made smaller beside the server's own thread. */
const rowsRead = 840

/** Where the layers of the jar on a photo seem to end, in pixels of its measuring copy, and how sure that is. */
export async function getProposal(db: Db, actor: Actor, id: string) {
  const { copySha256, jarCode } = await findFile(db, actor, id)
  const bytes = copySha256 && (await storage().get(copyKey(copySha256)))
  if (!bytes) throw refuse.notFound(`This photo of ${jarCode} has no copy to measure on yet. Send it first.`)
  const pixels = await readPixels({ bytes, type: 'image/jpeg', orientation: 1 }, rowsRead).catch(() => {
    throw refuse.unsupported('This photo cannot be read. Set the lines by hand.')
  })
  const copy = await db
    .selectFrom('photoCopy')
    .select(['width', 'height'])
    .where('photoId', '=', id)
    .executeTakeFirstOrThrow()
  return { ...scaledProposal(proposeLines({ ...pixels, channels: 4 }), copy.height / pixels.height), ...copy }
}
