import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listJars } from '@/lib/jar/queries'
import { getStudyHead, listStudyBatches } from './head'
import { headOf } from './sheet'

export async function getStudyJars(db: Db, actor: Actor, code: string) {
  const study = await getStudyHead(db, actor, code)
  const batches = await listStudyBatches(db, study.id)
  const jars = await listJars(db, actor, study.id)
  return { study: headOf(study), batches, jars }
}
export type StudyJars = Awaited<ReturnType<typeof getStudyJars>>
