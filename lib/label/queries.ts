import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listJars } from '@/lib/jar/queries'
import { getStudyHead } from '@/lib/study/queries/head'
import type { LabelGrid } from './rules/grid'

/** Everything that labels of a study are made from; which of them are printed is chosen from it. */
export async function getLabels(db: Db, actor: Actor, studyCode: string) {
  const study = await getStudyHead(db, actor, studyCode)
  const jars = await listJars(db, actor, study.id)
  const { ownGrid } = await getOwnGrid(db)
  return { code: study.code, title: study.title, ownPack: study.plan.ownPack ?? null, jars, ownGrid }
}
export type StudyLabels = Awaited<ReturnType<typeof getLabels>>

async function getOwnGrid(db: Db): Promise<{ ownGrid: LabelGrid | null }> {
  const { rows } = await sql<{ ownGrid: LabelGrid | null }>`
    select (select label_grid from lab) as "ownGrid"
  `.execute(db)
  return rows[0]!
}
