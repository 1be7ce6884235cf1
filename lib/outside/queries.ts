import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { storage } from '@/lib/files/storage'
import { refuse } from '@/lib/http/errors'
import type { Download } from '@/lib/http/route'
import { originalKey } from '@/lib/photo/rules/keys'
import { getStudyHead } from '@/lib/study/queries/head'

/** All that outside laboratories reported of a study, what was superseded included, in order of the reports' days. */
export async function listOutsideResults(db: Db, actor: Actor, studyCode: string) {
  const study = await getStudyHead(db, actor, studyCode)
  return outsideResultsOf(db, study.id)
}
export type OutsideResult = Awaited<ReturnType<typeof outsideResultsOf>>[number]

export async function outsideResultsOf(db: Db | Trx, studyId: string) {
  return db
    .selectFrom('outsideResult as o')
    .innerJoin('person as p', 'p.id', 'o.recordedBy')
    .leftJoin('batch as b', 'b.id', 'o.batchId')
    .select(['o.id', 'o.what', 'o.test', 'o.outcome', 'o.value', 'o.labName', 'o.reportNumber', 'o.note'])
    .select([
      'o.reportedOn',
      'o.timeWeeks',
      'o.supersedesId',
      'o.reason',
      'o.recordedAt',
      'o.sha256',
      'o.type',
    ])
    .select(['b.code as batch', 'p.name as by', 'p.initials'])
    .select(
      sql<boolean>`exists (select from outside_result newer where newer.supersedes_id = o.id)`.as(
        'isSuperseded',
      ),
    )
    .where('o.studyId', '=', studyId)
    .orderBy('o.reportedOn')
    .orderBy('o.recordedAt')
    .orderBy('o.id')
    .execute()
}

/** The document as it came, to be saved and not shown by the application's own pages. */
export async function getOutsideDocument(db: Db, actor: Actor, id: string): Promise<Download> {
  const row = await db
    .selectFrom('outsideResult as o')
    .innerJoin('study', 'study.id', 'o.studyId')
    .select(['o.sha256', 'o.type', 'o.originalName', 'o.reportNumber', 'study.code as studyCode'])
    .where('o.id', '=', id)
    .executeTakeFirst()
  if (!row) throw refuse.notFound('There is no such result.')
  await getStudyHead(db, actor, row.studyCode)
  const body = await storage().get(originalKey(row.sha256))
  if (!body) throw refuse.notFound(`The document of report ${row.reportNumber} is not in the store of files.`)
  return { body, type: row.type, fileName: row.originalName || `report ${row.reportNumber}` }
}
