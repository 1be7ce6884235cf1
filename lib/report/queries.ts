import { createHash } from 'node:crypto'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { ReportInput } from '@/lib/report/document/report'
import { getCase, signatureBelongs } from '@/lib/shelf-case/queries/read'
import { isClientOnly } from '@/lib/auth/actor'

export type ReportRow = Awaited<ReturnType<typeof listReports>>[number]

/** Signed reports, newest first: for a client those of its shared studies. */
export async function listReports(db: Db | Trx, actor: Actor) {
  let query = db
    .selectFrom('shelfCase as c')
    .innerJoin('study as s', 's.id', 'c.studyId')
    .innerJoin('signature as g', (join) =>
      join.onRef('g.shelfCaseId', '=', 'c.id').on('g.meaning', '=', 'approve'),
    )
    .select([
      'c.id',
      'c.code',
      'c.state',
      'c.proposedMonths',
      'c.storageStatement',
      'c.content',
      's.code as studyCode',
      's.title as studyTitle',
      'g.shelfCaseId',
      'g.personId',
      'g.personName',
      'g.meaning',
      'g.comment',
      'g.contentSha256',
      'g.zone',
      'g.signedAt',
      'g.signatureSha256',
    ])
    .where('c.state', 'in', ['signed', 'superseded'])
    .orderBy('g.signedAt', 'desc')
    .limit(200)
  if (isClientOnly(actor))
    query = query.where('s.isShared', '=', true).where('s.clientId', '=', actor.clientId)
  const rows = await query.execute()
  return rows.map(({ content, personId, signatureSha256, ...row }) => ({
    ...row,
    belongs: signatureBelongs({ ...row, personId, signatureSha256 }, row.code, hashOf(content ?? '')),
  }))
}

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
