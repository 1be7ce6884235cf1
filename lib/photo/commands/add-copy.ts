import { readFile } from 'node:fs/promises'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { Received } from '@/lib/http/upload'
import { findFile } from '../queries/file'
import { copyKey } from '../rules/keys'
import { orientationOf } from '../rules/orientation'
import { imageSize } from '../rules/size'
import { wrongWith } from '../rules/whole'
import { withoutPlace } from '../rules/without-place'
import { copyPixels } from '../schema'
import { keepWhole } from './keep-whole'

/** The measuring copy that the browser made of a photo. The first one stays: lines on record are drawn on it. */
export async function addCopy(trx: Trx, actor: Actor, id: string, file: Received) {
  const photo = await findFile(trx, actor, id)
  const known = await trx
    .selectFrom('photoCopy')
    .select(['width', 'height'])
    .where('photoId', '=', id)
    .executeTakeFirst()
  if (known) return known
  return keepCopy(trx, actor, { ...photo, id }, file)
}

/** Checked against its photo, stored under its hash, and a row of it. */
export async function keepCopy(trx: Trx, actor: Actor, photo: Size & { id: string }, file: Received) {
  const bytes = await readFile(file.path)
  const size = wrongWith(bytes) === null ? imageSize(bytes) : null
  if (!size || withoutPlace(bytes) !== bytes)
    throw refuse.unsupported('The measuring copy is a plain JPEG without anything beside its pixels.')
  if (Math.max(size.width, size.height) > copyPixels)
    throw refuse.tooLarge(`A measuring copy has at most ${copyPixels} pixels along its longer side.`)
  if (!isSameShape(size, photo, orientationOf(bytes)))
    throw refuse.invalid(
      'The measuring copy has another shape than its photo. Open the photo and measure anew.',
    )
  await keepWhole(trx, copyKey(file.sha256), bytes, 'image/jpeg')
  await trx
    .insertInto('photoCopy')
    .values({ photoId: photo.id, sha256: file.sha256, bytes: file.bytes, ...size, madeBy: actor.personId })
    .execute()
  return size
}

type Size = { width: number; height: number }

/** Upright or as the camera held it: the copy is turned, the original need not be. */
function isSameShape(copy: Size, photo: Size, orientation: number): boolean {
  const near = (a: Size, b: Size) =>
    Math.abs(a.width * b.height - a.height * b.width) <= 2 * (b.width + b.height)
  return orientation === 1 && (near(copy, photo) || near(copy, { width: photo.height, height: photo.width }))
}
