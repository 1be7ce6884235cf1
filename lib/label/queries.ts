import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listJars } from '@/lib/jar/queries/jars'
import { getStudyHead } from '@/lib/study/queries/head'
import type { LabelGrid } from './rules/grid'

/** Everything that labels of a study are made from; which of them are printed is chosen from it. */
export async function getLabels(db: Db, actor: Actor, studyCode: string) {
  const study = await getStudyHead(db, actor, studyCode)
  const jars = await listJars(db, actor, study.id)
  const { ownGrid, moved } = await getSheetAndMoved(db, study.id)
  const isMoved = new Set(moved)
  return {
    code: study.code,
    ownPack: study.plan.ownPack ?? null,
    jars: jars.map((jar) => ({ ...jar, isMoved: isMoved.has(jar.id) })),
    ownGrid,
  }
}
export type StudyLabels = Awaited<ReturnType<typeof getLabels>>

/** The lab's own sheet, and the jars whose first label names a place where they no longer stand. */
async function getSheetAndMoved(db: Db, studyId: string) {
  const { rows } = await sql<{ ownGrid: LabelGrid | null; moved: string[] }>`
    select (select label_grid from lab) as "ownGrid",
      coalesce((select jsonb_agg(distinct m.jar_id) from jar_move m join jar j on j.id = m.jar_id
        where j.study_id = ${studyId}), '[]') as moved
  `.execute(db)
  return rows[0]!
}
