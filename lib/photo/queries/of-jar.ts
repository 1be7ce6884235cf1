import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import { readPixels } from '@/lib/files/picture'
import { storage } from '@/lib/files/storage'
import { refuse } from '@/lib/http/errors'
import type { Entry } from '@/lib/reading/schema/entry'
import type { PhotoColourOfReading } from '@/lib/reading/schema/photo-colour'
import { ScienceError } from '@/lib/science/guard'
import { patchOf, type Patch } from '@/lib/science/patch'
import { copyKey } from '../rules/keys'
import { copyPixels } from '../schema'

const kinds = ['photoLines', 'photoColour', 'photoDrops'] as const

/**
 * Entries as their photos say: what was marked on a photo of another jar, or on another copy of it, is refused, and a
 * colour's patches are read from the copy itself. A photo that has not arrived yet is no reason to refuse a reading: it
 * waits on the device that took it, whose own patches count until somebody looks.
 */
export async function readOnPhotos<E extends Pick<Entry, 'detail'>>(
  db: Db,
  pullJarId: string,
  entries: E[],
  at = (index: number) => `readings.${index}.`,
): Promise<E[]> {
  const marks = entries.flatMap(({ detail }) => kinds.flatMap((kind) => detail[kind] ?? []))
  if (marks.length === 0) return entries
  const photos = await db
    .selectFrom('photo')
    .leftJoin('photoCopy as copy', 'copy.photoId', 'photo.id')
    .select(['photo.id', 'copy.sha256', 'copy.width', 'copy.height'])
    .select(
      sql<boolean>`photo.jar_id is distinct from (select jar_id from pull_jar where id = ${pullJarId})`.as(
        'isOther',
      ),
    )
    .where(
      'photo.id',
      'in',
      marks.map((mark) => mark.photoId),
    )
    .execute()
  const photoOf = (id: string) => photos.find((photo) => photo.id === id)
  entries.forEach(({ detail }, index) => {
    for (const kind of kinds) {
      const mark = detail[kind]
      const photo = mark && photoOf(mark.photoId)
      const path = `${at(index)}detail.${kind}`
      if (photo?.isOther)
        throw refuse.invalid('This was measured on a photo of another jar. Measure anew.', {
          [path]: 'A photo of another jar.',
        })
      if (mark && photo?.width && (photo.width !== mark.width || photo.height !== mark.height))
        throw refuse.invalid(
          `This was measured on a copy of ${mark.width} x ${mark.height} pixels, and the photo's has ${photo.width} x ${photo.height}. Measure anew.`,
          { [path]: 'Another copy of the photo.' },
        )
    }
  })
  return Promise.all(
    entries.map(async (entry) => {
      const { photoColour } = entry.detail
      if (!photoColour) return entry
      const patches = await patchesOn(photoOf(photoColour.photoId)?.sha256 ?? null, photoColour)
      return {
        ...entry,
        detail: {
          ...entry.detail,
          photoColour: patches
            ? { ...photoColour, patches, readBy: 'server' as const }
            : { ...photoColour, readBy: 'device' as const },
        },
      }
    }),
  )
}

/** Of the copy in the store; null where it has not come. */
async function patchesOn(
  sha256: string | null,
  { grey, sample }: PhotoColourOfReading,
): Promise<{ grey: Patch; sample: Patch } | null> {
  const bytes = sha256 && (await storage().get(copyKey(sha256)))
  if (!bytes) return null
  const pixels = await readPixels({ bytes, type: 'image/jpeg', orientation: 1 }, copyPixels).catch(() => {
    throw refuse.unsupported('This photo cannot be read. Take it again.')
  })
  try {
    return { grey: patchOf(pixels, grey), sample: patchOf(pixels, sample) }
  } catch (thrown) {
    if (!(thrown instanceof ScienceError)) throw thrown
    throw refuse.invalid('A patch leaves the photo. Move it, and take the colour again.')
  }
}
