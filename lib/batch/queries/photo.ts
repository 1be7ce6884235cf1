import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { originalOf, previewOf } from '@/lib/photo/queries/file'

type Address = { code: string; id: string }

export async function getBatchOriginal(db: Db, actor: Actor, address: Address) {
  return originalOf(actor, await findPhoto(db, address), address.code)
}

export async function getBatchPreview(db: Db, _actor: Actor, address: Address) {
  return previewOf(await findPhoto(db, address), address.code)
}

async function findPhoto(db: Db, { code, id }: Address) {
  const photo = await db
    .selectFrom('batchPhoto')
    .innerJoin('batch', 'batch.id', 'batchPhoto.batchId')
    .select(['batchPhoto.sha256', 'batchPhoto.type', 'batchPhoto.originalName'])
    .where('batchPhoto.id', '=', id)
    .where('batch.code', '=', code)
    .executeTakeFirst()
  if (!photo) throw refuse.notFound(`${code} has no such photo. Load the page again.`)
  return photo
}
