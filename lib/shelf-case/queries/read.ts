import { createHash } from 'node:crypto'
import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import { refuse } from '@/lib/http/errors'
import { caseStation, computeCase } from '@/lib/shelf-case/rules/build'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { assertApprovedProtocol } from '@/lib/shelf-case/rules/refusals'
import { signatureHash, type SignedFacts } from '@/lib/shelf-case/queries/signature'
import { loadEvidence, loadStays } from '@/lib/shelf-case/queries/evidence'

export type CaseDetail = Awaited<ReturnType<typeof getCase>>
export type ComputedCase = Awaited<ReturnType<typeof computeFor>>

const columns = [
  'c.id',
  'c.code',
  'c.kind',
  'c.state',
  'c.proposedMonths',
  'c.storageStatement',
  'c.putForwardAt',
  'c.createdAt',
  'c.version',
  's.code as studyCode',
  's.title as studyTitle',
  'p.initials as putForwardBy',
] as const

/** One case with its frozen content, its signatures and whether each still belongs to that content. */
export async function getCase(db: Db | Trx, actor: Actor, code: string) {
  let query = db
    .selectFrom('shelfCase as c')
    .innerJoin('study as s', 's.id', 'c.studyId')
    .leftJoin('person as p', 'p.id', 'c.putForwardBy')
    .select(columns)
    .select([
      'c.studyId',
      'c.studyStationId',
      'c.whyFewer',
      'c.provisionalRule',
      'c.reviewOn',
      'c.periodAfterOpeningMonths',
      'c.periodAfterOpeningEvidence',
      'c.content',
      'c.contentSha256',
      'c.putForwardBy as putForwardById',
      'c.createdBy as createdById',
    ])
    .where('c.code', '=', code)
  if (isClientOnly(actor))
    query = query
      .where('c.state', 'in', ['signed', 'superseded'])
      .where('s.isShared', '=', true)
      .where('s.clientId', '=', actor.clientId)
  const found = await query.executeTakeFirst()
  if (!found) throw refuse.notFound(`There is no case ${code}.`)
  const signatures = await db
    .selectFrom('signature')
    .select([
      'id',
      'shelfCaseId',
      'personId',
      'personName',
      'meaning',
      'comment',
      'contentSha256',
      'zone',
      'signedAt',
      'signatureSha256',
    ])
    .where('shelfCaseId', '=', found.id)
    .orderBy('signedAt')
    .execute()
  const { content, ...facts } = found
  const since = found.putForwardAt === null ? null : await readSince(db, found.studyId, found.putForwardAt)
  const contentHash = content === null ? null : createHash('sha256').update(content, 'utf8').digest('hex')
  return {
    ...facts,
    since,
    content: content === null ? null : (JSON.parse(content) as CaseContent),
    isContentWhole: content === null || contentHash === found.contentSha256,
    signatures: signatures.map((s) => ({ ...s, belongs: signatureBelongs(s, found.code, contentHash) })),
  }
}

/** What the study's record took on after its content was frozen; the content stays as it was. */
async function readSince(db: Db | Trx, studyId: string, frozenAt: string) {
  const { rows } = await sql<{ changed: number; added: number }>`
    select count(*) filter (where supersedes_id is not null)::int as changed,
      count(*) filter (where supersedes_id is null)::int as added
    from reading where study_id = ${studyId} and recorded_at > ${frozenAt}
  `.execute(db)
  return rows[0] ?? { changed: 0, added: 0 }
}

/** The content's very bytes, of whatever case the actor may see that was put forward. */
export async function getFrozenContent(db: Db | Trx, actor: Actor, code: string): Promise<string> {
  const { id, state } = await getCase(db, actor, code)
  const { content } = await db
    .selectFrom('shelfCase')
    .select('content')
    .where('id', '=', id)
    .executeTakeFirstOrThrow()
  if (content === null)
    throw refuse.conflict(`Case ${code} is ${state}. Its content is frozen when it is put forward.`)
  return content
}

/** A signature belongs to a content if both its own hash and the content's hash can be made again. */
export function signatureBelongs(
  signature: SignedFacts & { signatureSha256: string },
  caseCode: string,
  contentHash: string | null,
): boolean {
  return (
    signature.contentSha256 === contentHash &&
    signatureHash(signature, caseCode) === signature.signatureSha256
  )
}

/** What the study's evidence supports now; the same figures that putting forward would freeze. */
export async function computeFor(db: Db | Trx, actor: Actor, studyId: string, studyStationId: string | null) {
  const evidence = await loadEvidence(db, actor, studyId)
  assertApprovedProtocol(evidence.study)
  const station = caseStation(evidence, studyStationId)
  const left = evidence.amendments.find((one) => one.kind === 'not started')
  if (!station)
    throw refuse.conflict(
      left
        ? `Study ${evidence.study.code} began in part: ${left.sentence} What is left cannot carry a shelf life.`
        : `Study ${evidence.study.code} has no station at 15 to 30 °C that decides, so it cannot carry a shelf life.`,
    )
  const stays = await loadStays(db, station.id)
  return {
    studyId,
    studyStationId: station.id,
    stations: evidence.stations.map((s) => ({
      id: s.id,
      name: s.name,
      temperatureC: s.temperatureC,
      voice: s.voice,
    })),
    readingAuthors: [...new Set(evidence.readings.map((r) => r.recordedBy))],
    openOut: evidence.flags.filter(
      (f) => f.level === 'out' && f.state === 'open' && f.studyStationId === station.id,
    ),
    computed: computeCase(evidence, station, stays),
  }
}

/** The study that a case is begun on. */
export async function findStudyForCase(db: Db | Trx, code: string) {
  return db
    .selectFrom('study')
    .select(['id', 'code', 'title', 'startedOn'])
    .where('code', '=', code)
    .executeTakeFirst()
}

/** Who logged, corrected or voided a reading of the study: none of them may sign it. */
export async function readingAuthors(db: Db | Trx, studyId: string): Promise<string[]> {
  const rows = await db
    .selectFrom('reading')
    .select('recordedBy')
    .distinct()
    .where('studyId', '=', studyId)
    .execute()
  return rows.map((r) => r.recordedBy)
}
