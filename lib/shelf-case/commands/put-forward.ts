import { createHash } from 'node:crypto'
import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { enqueue } from '@/lib/jobs/enqueue'
import { assertVersion, findForUpdate } from '@/lib/shelf-case/commands/draft'
import { computeFor } from '@/lib/shelf-case/queries/read'
import { freeze } from '@/lib/shelf-case/rules/build'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'
import { assertProposal, assertState } from '@/lib/shelf-case/rules/refusals'

/** Freezes the case: its evidence, figures and proposal become canonical bytes under their SHA-256. */
export async function putCaseForward(trx: Trx, actor: Actor, code: string, input: { version: number }) {
  const found = await findForUpdate(trx, code)
  assertState(code, found.state, 'drafting', 'put forward')
  await assertVersion(trx, found, input.version)
  // The study's row, so that no reading is saved between reading the evidence and freezing it.
  await trx.selectFrom('study').select('id').where('id', '=', found.studyId).forUpdate().execute()
  const basis = await computeFor(trx, actor, found.studyId, found.studyStationId)
  const first = basis.openOut[0]
  if (first && found.kind === 'real time')
    throw refuse.conflict(
      `Flag ${first.number} says that a series is out at this station and is not answered. Answer it, then put the case forward.`,
    )
  const proposal = {
    kind: found.kind,
    proposedMonths: found.proposedMonths ?? 0,
    storageStatement: found.storageStatement,
    whyFewer: found.whyFewer,
    provisionalRule: found.provisionalRule,
    reviewOn: found.reviewOn,
    periodAfterOpeningMonths: found.periodAfterOpeningMonths,
    periodAfterOpeningEvidence: found.periodAfterOpeningEvidence,
  }
  assertProposal(proposal, basis.computed.supportedMonths)
  const { rows } = await sql<{ now: string }>`select app_now() as now`.execute(trx)
  const at = rows[0]?.now ?? ''
  const content = canonicalJson(
    freeze(basis.computed, code, proposal, {
      by: actor.name,
      initials: actor.initials,
      at,
      isInvented: actor.isDemo,
    }),
  )
  const contentSha256 = createHash('sha256').update(content, 'utf8').digest('hex')
  const saved = await trx
    .updateTable('shelfCase')
    .set({
      state: 'put forward',
      content,
      contentSha256,
      putForwardBy: actor.personId,
      putForwardAt: at,
      version: found.version + 1,
    })
    .where('id', '=', found.id)
    .returning(['id', 'code', 'version', 'contentSha256'])
    .executeTakeFirstOrThrow()
  await enqueue(trx, 'shelf-case.mail', { caseId: found.id, event: 'put forward' })
  return saved
}
