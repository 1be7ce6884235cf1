import type { Actor } from '@/lib/auth/actor'
import { may } from '@/lib/auth/permissions'
import type { Db } from '@/lib/db/client'
import { makePreview } from '@/lib/files/picture'
import { storage } from '@/lib/files/storage'
import { refuse } from '@/lib/http/errors'
import type { Download } from '@/lib/http/route'
import { copyKey, originalKey, previewKey } from '../rules/keys'
import { orientationOf } from '../rules/orientation'
import { withoutPlace } from '../rules/without-place'
import { previewWidth } from '../schema'
import { visiblePhotos } from './list'

/** The whole picture; only who audits gets it byte for byte, with what the camera wrote into it. */
export async function getOriginal(db: Db, actor: Actor, id: string): Promise<Download> {
  const photo = await findFile(db, actor, id)
  return originalOf(actor, photo, photo.jarCode)
}

/** The small picture; made now where the job has not come to it. */
export async function getPreview(db: Db, actor: Actor, id: string): Promise<Download> {
  const photo = await findFile(db, actor, id)
  return previewOf(photo, photo.jarCode)
}

/** The copy that lines are measured on. */
export async function getCopy(db: Db, actor: Actor, id: string): Promise<Download> {
  const { copySha256, jarCode } = await findFile(db, actor, id)
  const body = copySha256 && (await storage().get(copyKey(copySha256)))
  if (!body)
    throw refuse.notFound(`This photo of ${jarCode} has no copy to measure on yet. Open it to measure.`)
  return { body, type: 'image/jpeg', inline: true }
}

type File = { sha256: string; type: string; originalName: string }

/** `of` is the jar or batch that is on it. */
export async function originalOf(
  actor: Actor,
  { sha256, type, originalName }: File,
  of: string,
): Promise<Download> {
  const whole = await storage().get(originalKey(sha256))
  if (!whole) throw notStored(of)
  const body = may(actor, 'photo.audit') ? whole : withoutPlace(whole)
  return { body, type, fileName: originalName || `${of}.${extensionOf(type)}` }
}

export async function previewOf({ sha256, type }: Omit<File, 'originalName'>, of: string): Promise<Download> {
  const body = await keptPreview(sha256, type)
  if (!body) throw notStored(of)
  return { body, type: 'image/jpeg', inline: true }
}

function notStored(of: string) {
  return refuse.notFound(`The file of this photo of ${of} is not in the store. Tell the manager.`)
}

/** From the store, or made from the original and kept there; null where there is no original. */
export async function keptPreview(sha256: string, type: string): Promise<Uint8Array | null> {
  const files = storage()
  const kept = await files.get(previewKey(sha256))
  if (kept) return kept
  const bytes = await files.get(originalKey(sha256))
  if (!bytes) return null
  const made = await makePreview({ bytes, type, orientation: orientationOf(bytes) }, previewWidth).catch(
    () => {
      throw refuse.unsupported(
        'This photo cannot be shown small: it cannot be decoded. Open the original instead.',
      )
    },
  )
  await files.put(previewKey(sha256), made, 'image/jpeg')
  return made
}

export async function findFile(db: Db, actor: Actor, id: string) {
  const photo = await visiblePhotos(db, actor)
    .innerJoin('jar', 'jar.id', 'photo.jarId')
    .leftJoin('photoCopy as copy', 'copy.photoId', 'photo.id')
    .select(['photo.sha256', 'photo.type', 'photo.originalName', 'photo.width', 'photo.height'])
    .select(['copy.sha256 as copySha256', 'jar.code as jarCode'])
    .where('photo.id', '=', id)
    .executeTakeFirst()
  if (!photo) throw refuse.notFound()
  return photo
}

function extensionOf(type: string): string {
  return type === 'image/png' ? 'png' : 'jpg'
}
