import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { Entry } from '@/lib/reading/schema/entry'

/**
 * Refuses lines drawn on a photo of another jar. A photo that has not arrived yet is no reason to refuse a reading: it
 * waits on the device that took it.
 */
export async function refusePhotosOfOthers(db: Db, jar: { jarId: string; code: string }, entries: Entry[]) {
  const ids = entries.flatMap(({ detail }) => (detail.photoLines ? [detail.photoLines.photoId] : []))
  if (ids.length === 0) return
  const other = await db
    .selectFrom('photo')
    .select('id')
    .where('id', 'in', ids)
    .where('jarId', '<>', jar.jarId)
    .executeTakeFirst()
  if (other)
    throw refuse.invalid(`These lines were drawn on a photo of another jar than ${jar.code}. Measure anew.`, {
      'detail.photoLines': 'A photo of another jar.',
    })
}
