import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { storage } from '@/lib/files/storage'
import { makePreview } from '@/lib/files/preview'
import { refuse } from '@/lib/http/errors'
import type { Download } from '@/lib/http/route'
import { originalKey, previewKey } from './rules'
import { previewWidth } from './schema'

export type Photo = Awaited<ReturnType<typeof listPhotos>>[number]

/** Photos of a study, or of one of its jars, in the order they were taken. */
export async function listPhotos(db: Db, actor: Actor, studyCode: string, jarCode?: string) {
  return visiblePhotos(db, actor)
    .innerJoin('jar', 'jar.id', 'photo.jarId')
    .leftJoin('pullJar', 'pullJar.id', 'photo.pullJarId')
    .leftJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('person', 'person.id', 'photo.takenBy')
    .select([
      'photo.id',
      'photo.width',
      'photo.height',
      'photo.takenAt',
      'photo.pullJarId',
      'jar.id as jarId',
      'jar.code as jarCode',
      'jar.batchId',
      'jar.studyStationId',
      'pull.timeWeeks',
      'pull.label',
      'person.initials as takenBy',
    ])
    .where('study.code', '=', studyCode)
    .$if(jarCode !== undefined, (query) => query.where('jar.code', '=', jarCode!))
    .orderBy('photo.takenAt')
    .orderBy('photo.id')
    .execute()
}

/** The file as it came, byte for byte. */
export async function getOriginal(db: Db, actor: Actor, id: string): Promise<Download> {
  const photo = await findFile(db, actor, id)
  return originalOf(photo, photo.jarCode)
}

/** The small picture; made now where the job has not come to it. */
export async function getPreview(db: Db, actor: Actor, id: string): Promise<Download> {
  const photo = await findFile(db, actor, id)
  return previewOf(photo, photo.jarCode)
}

type File = { sha256: string; type: string; originalName: string }

/** `of` is the jar or batch that is on it. */
export async function originalOf({ sha256, type, originalName }: File, of: string): Promise<Download> {
  const body = await storage().get(originalKey(sha256))
  if (!body) throw notStored(of)
  return { body, type, fileName: originalName || `${of}.${extensionOf(type)}` }
}

export async function previewOf({ sha256 }: Pick<File, 'sha256'>, of: string): Promise<Download> {
  const body = await keptPreview(sha256)
  if (!body) throw notStored(of)
  return { body, type: 'image/jpeg', inline: true }
}

function notStored(of: string) {
  return refuse.notFound(`The file of this photo of ${of} is not in the store. Tell the manager.`)
}

/** From the store, or made from the original and kept there; null where there is no original. */
export async function keptPreview(sha256: string): Promise<Uint8Array | null> {
  const files = storage()
  const kept = await files.get(previewKey(sha256))
  if (kept) return kept
  const original = await files.get(originalKey(sha256))
  if (!original) return null
  const made = await makePreview(original, previewWidth).catch(() => {
    throw refuse.unsupported(
      'This photo cannot be shown small: it cannot be decoded. Open the original instead.',
    )
  })
  await files.put(previewKey(sha256), made, 'image/jpeg')
  return made
}

async function findFile(db: Db, actor: Actor, id: string) {
  const photo = await visiblePhotos(db, actor)
    .innerJoin('jar', 'jar.id', 'photo.jarId')
    .select(['photo.sha256', 'photo.type', 'photo.originalName', 'jar.code as jarCode'])
    .where('photo.id', '=', id)
    .executeTakeFirst()
  if (!photo) throw refuse.notFound()
  return photo
}

function visiblePhotos(db: Db, actor: Actor) {
  return db
    .selectFrom('photo')
    .innerJoin('study', 'study.id', 'photo.studyId')
    .$if(isClientOnly(actor), (query) =>
      query.where('study.isShared', '=', true).where('study.clientId', '=', actor.clientId),
    )
}

function extensionOf(type: string): string {
  return type === 'image/png' ? 'png' : 'jpg'
}
