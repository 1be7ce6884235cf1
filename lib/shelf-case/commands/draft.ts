import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { computeFor } from '@/lib/shelf-case/queries/read'
import { assertProposal, assertState } from '@/lib/shelf-case/rules/refusals'
import type { CaseProposal, CaseState, EditedCase, NewCase } from '@/lib/shelf-case/schema'
import { expectOne } from '@/lib/trail/queries'

/** Begins a case on a study. Proposing more than the evidence supports is refused here already. */
export async function draftCase(trx: Trx, actor: Actor, input: NewCase) {
  const { id, studyId, studyStationId, ...proposal } = input
  const basis = await computeFor(trx, actor, studyId, studyStationId)
  assertProposal(proposal, basis.computed.supportedMonths)
  return trx
    .insertInto('shelfCase')
    .values({
      id,
      code: await nextCode(trx),
      studyId,
      studyStationId: basis.studyStationId,
      createdBy: actor.personId,
      ...proposal,
    })
    .returning(['id', 'code', 'version'])
    .executeTakeFirstOrThrow()
}

export async function editCase(trx: Trx, actor: Actor, code: string, input: EditedCase) {
  const { version, ...proposal } = input
  const found = await findForUpdate(trx, code)
  assertState(code, found.state, 'drafting', 'changed')
  const basis = await computeFor(trx, actor, found.studyId, found.studyStationId)
  assertProposal(proposal, basis.computed.supportedMonths)
  await assertVersion(trx, found, version)
  return trx
    .updateTable('shelfCase')
    .set({ ...proposal, version: version + 1 })
    .where('id', '=', found.id)
    .returning(['id', 'code', 'version'])
    .executeTakeFirstOrThrow()
}

/** The row, locked, so that what is judged is what is written. */
export async function findForUpdate(trx: Trx, code: string) {
  const found = await trx
    .selectFrom('shelfCase')
    .selectAll()
    .where('code', '=', code)
    .forUpdate()
    .executeTakeFirst()
  if (!found) throw refuse.notFound(`There is no case ${code}.`)
  return { ...found, state: found.state as CaseState, kind: found.kind as CaseProposal['kind'] }
}

export async function assertVersion(
  trx: Trx,
  found: { id: string; code: string; version: number },
  version: number,
): Promise<void> {
  await expectOne(trx, found.version === version ? found : undefined, {
    table: 'shelf_case',
    id: found.id,
    thing: `case ${found.code}`,
  })
}

async function nextCode(trx: Trx): Promise<string> {
  await sql`select pg_advisory_xact_lock(hashtext('shelf_case.code'))`.execute(trx)
  const { last } = await trx
    .selectFrom('shelfCase')
    .select(sql<number>`coalesce(max(substring(code from 3)::integer), 0)`.as('last'))
    .executeTakeFirstOrThrow()
  return `C-${String(last + 1).padStart(3, '0')}`
}
