import { readFile } from 'node:fs/promises'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { AppError, refuse } from '@/lib/http/errors'
import type { Received } from '@/lib/http/upload'
import { enqueue } from '@/lib/jobs/enqueue'
import { claimedInstant } from '@/lib/reading/rules/claimed-time'
import { previewQueue } from '../jobs'
import { originalKey } from '../rules/keys'
import { imageSize } from '../rules/size'
import { wrongWith } from '../rules/whole'
import { maxPhotoPixels, type PhotoFields } from '../schema'
import { keepCopy } from './add-copy'
import { keepWhole } from './keep-whole'

const heic = ['image/heic', 'image/heif', 'image/heic-sequence', 'image/heif-sequence']
/** What the upload lets through to here, the last of them only to be refused with a way out. */
export const photoTypes = ['image/jpeg', 'image/png', ...heic]

/**
 * The file is stored whole under its hash before the row names it, the measuring copy that came along likewise. Sending it
 * twice keeps one.
 */
export async function addPhoto(
  trx: Trx,
  actor: Actor,
  file: Received,
  copy: Received | null,
  fields: PhotoFields,
  now: string,
) {
  const jar = await findJar(trx, fields.pullJarId)
  const known = await trx
    .selectFrom('photo')
    .select(['id', 'sha256'])
    .where('id', '=', fields.id)
    .executeTakeFirst()
  if (known) {
    if (known.sha256 !== file.sha256)
      throw refuse.conflict('Another photo was sent under this id. Send this one anew.')
    return { id: known.id }
  }
  const picture = await keepPicture(trx, file)
  await trx
    .insertInto('photo')
    .values({
      id: fields.id,
      studyId: jar.studyId,
      jarId: jar.jarId,
      pullJarId: fields.pullJarId,
      shows: fields.shows,
      ...picture,
      takenBy: actor.personId,
      takenAt: claimedInstant(fields, now).measuredAt,
    })
    .execute()
  if (copy) await keepCopyIfSound(trx, actor, { ...picture, id: fields.id }, copy)
  return { id: fields.id }
}

/** The photo is what must not be lost: with a copy that is none it goes without, and measuring makes another. */
async function keepCopyIfSound(
  trx: Trx,
  actor: Actor,
  photo: Parameters<typeof keepCopy>[2],
  copy: Received,
) {
  try {
    await keepCopy(trx, actor, photo, copy)
  } catch (thrown) {
    if (!(thrown instanceof AppError)) throw thrown
  }
}

/** A picture checked and stored whole, and what of it a row keeps. Its small picture is made ahead by a job. */
export async function keepPicture(trx: Trx, { sha256, bytes, type, originalName, path }: Received) {
  const size = await checkPicture({ path, type })
  await keepWhole(trx, originalKey(sha256), path, type)
  await enqueue(trx, previewQueue, { sha256, type })
  return { sha256, bytes, type, ...size, originalName }
}

async function findJar(trx: Trx, pullJarId: string) {
  const jar = await trx
    .selectFrom('pullJar')
    .innerJoin('jar', 'jar.id', 'pullJar.jarId')
    .innerJoin('study', 'study.id', 'pullJar.studyId')
    .select(['study.id as studyId', 'study.code as studyCode', 'study.state', 'jar.id as jarId', 'jar.code'])
    .where('pullJar.id', '=', pullJarId)
    .executeTakeFirst()
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  if (jar.state === 'closed') {
    throw refuse.conflict(`Study ${jar.studyCode} is closed, so jar ${jar.code} takes no more photos.`)
  }
  return jar
}

async function checkPicture(
  file: Pick<Received, 'path' | 'type'>,
): Promise<{ width: number; height: number }> {
  if (heic.includes(file.type)) {
    throw refuse.unsupported(
      'This photo is HEIC, which browsers cannot show. Set the camera to the most compatible format (JPEG), or save the photo as JPEG, and send it again.',
    )
  }
  const bytes = await readFile(file.path)
  const size = imageSize(bytes)
  if (!size) throw refuse.unsupported('This file starts like a picture but is none. Take the photo again.')
  if (size.width * size.height > maxPhotoPixels) {
    const megapixels = Math.round((size.width * size.height) / 1e6)
    throw refuse.tooLarge(
      `The photo has ${megapixels} megapixels; at most ${maxPhotoPixels / 1e6} can be taken. Take it at a lower resolution.`,
    )
  }
  const wrong = wrongWith(bytes)
  if (wrong === 'cut short')
    throw refuse.unsupported('The photo breaks off before its end. Take it again, or send the whole file.')
  if (wrong === 'two files in one')
    throw refuse.unsupported(
      'A file of another kind is hidden in this photo. Send the photo as the camera made it.',
    )
  return size
}
