import { createHash } from 'node:crypto'
import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import type { ReportInput } from '@/lib/report/document/report'
import { studiesOf } from '@/lib/study/queries/scope'
import { getCase, signatureBelongs } from '@/lib/shelf-case/queries/read'

type Query = ListQuery<'state' | 'from' | 'to'>

/** One page of the signed reports, newest first: for a client those of its shared studies. */
export async function listReports(db: Db, actor: Actor, query: Query) {
  return pageOf(db, reportSource(db, actor, query), query)
}
export type ReportsPage = Awaited<ReturnType<typeof listReports>>

export function reportSource(db: Db, actor: Actor, { q, filters }: Query): Source<ReportRow> {
  const { state, from, to } = filters
  const typed = likeTyped(q)
  return {
    from: sql`shelf_case c join study on study.id = c.study_id
      join signature on signature.shelf_case_id = c.id and signature.meaning = 'approve'`,
    where: [
      studiesOf(actor),
      sql<SqlBool>`c.state in ('signed', 'superseded')`,
      ...(q
        ? [
            sql<SqlBool>`(c.code ilike ${typed} or study.code ilike ${typed} or study.title ilike ${typed}
              or c.storage_statement ilike ${typed} or signature.person_name ilike ${typed})`,
          ]
        : []),
      ...(state ? [sql<SqlBool>`c.state = ${state}`] : []),
      ...onDays(sql`signature.signed_at`, from, to),
    ],
    id: sql`signature.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('c.code'),
      study: naturally('study.code'),
      title: naturally('study.title'),
      months: { by: sql`c.proposed_months`, kind: 'number' },
      by: naturally('signature.personName'),
      signed: { by: sql`signature.signed_at`, kind: 'instant' },
      state: { by: sql`c.state`, kind: 'text' },
    },
    rows: (ids) => reportRows(db, ids),
    idOf: (row) => row.signatureId,
    // Each brings its frozen content, from which its hash is made again.
    atOnce: 50,
  }
}

async function reportRows(db: Db, signatureIds: string[]) {
  const rows = await db
    .selectFrom('shelfCase as c')
    .innerJoin('study as s', 's.id', 'c.studyId')
    .innerJoin('signature as g', 'g.shelfCaseId', 'c.id')
    .select(['c.id', 'c.code', 'c.state', 'c.proposedMonths', 'c.storageStatement', 'c.content'])
    .select(['s.code as studyCode', 's.title as studyTitle', 'g.id as signatureId', 'g.shelfCaseId'])
    .select(['g.personId', 'g.personName', 'g.meaning', 'g.comment', 'g.contentSha256', 'g.zone'])
    .select(['g.signedAt', 'g.signatureSha256'])
    .where(sql<SqlBool>`g.id = any(${signatureIds}::uuid[])`)
    .execute()
  return rows.map(({ content, personId, signatureSha256, ...row }) => ({
    ...row,
    belongs: signatureBelongs({ ...row, personId, signatureSha256 }, row.code, hashOf(content ?? '')),
  }))
}
export type ReportRow = Awaited<ReturnType<typeof reportRows>>[number]

/** What the PDF is made from: the frozen content and its signatures, refused where they no longer fit. */
export async function getReportInput(db: Db | Trx, actor: Actor, code: string): Promise<ReportInput> {
  const found = await getCase(db, actor, code)
  if (found.state !== 'signed' && found.state !== 'superseded')
    throw refuse.conflict(`Case ${code} is ${found.state}. Its report is made when QA has signed it.`)
  if (
    !found.content ||
    !found.contentSha256 ||
    !found.isContentWhole ||
    found.signatures.some((s) => !s.belongs)
  )
    throw refuse.conflict(
      `The signature of case ${code} does not belong to its content, so no report is made. Tell the lab manager.`,
    )
  return {
    content: found.content,
    contentSha256: found.contentSha256,
    signatures: found.signatures.map((s) => ({
      id: s.id,
      personName: s.personName,
      meaning: s.meaning,
      comment: s.comment,
      zone: s.zone,
      signedAt: s.signedAt,
    })),
  }
}

function hashOf(content: string): string {
  return createHash('sha256').update(content, 'utf8').digest('hex')
}
