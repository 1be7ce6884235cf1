import { createHash } from 'node:crypto'
import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import { verifyPassword } from '@/lib/auth/password'
import type { Trx } from '@/lib/db/client'
import { AppError, refuse } from '@/lib/http/errors'
import { enqueue } from '@/lib/jobs/enqueue'
import { assertVersion, findForUpdate } from '@/lib/shelf-case/commands/draft'
import { readingAuthors } from '@/lib/shelf-case/queries/read'
import { assertMaySign, assertState } from '@/lib/shelf-case/rules/refusals'
import { signatureHash } from '@/lib/shelf-case/queries/signature'
import type { CaseSignature } from '@/lib/shelf-case/schema'

/**
 * Signs the exact content that the signer saw, or sends it back. Every refusal is left on the trail: an
 * attempt to sign own work, or with a wrong password, is itself part of the record.
 */
export async function signCase(trx: Trx, actor: Actor, code: string, input: CaseSignature) {
  const found = await findForUpdate(trx, code)
  try {
    assertState(code, found.state, 'put forward', 'signed')
    assertMaySign(actor.personId, {
      putForwardById: found.putForwardBy,
      createdById: found.createdBy,
      readingAuthors: await readingAuthors(trx, found.studyId),
    })
    await assertVersion(trx, found, input.version)
    if (input.contentSha256 !== found.contentSha256)
      throw refuse.stale(`The content of case ${code} is not the one you saw. Reload it, read it, then sign.`)
    assertWhole(code, found)
    await assertPassword(trx, actor, input.password)
  } catch (error) {
    if (error instanceof AppError)
      throw error.onTrail({
        event: 'signature refused',
        table: 'shelf_case',
        id: found.id,
        detail: { code, meaning: input.meaning, why: error.sentence },
      })
    throw error
  }
  const { rows } = await sql<{ now: string; zone: string }>`
    select app_now() as now, (select time_zone from lab) as zone
  `.execute(trx)
  const facts = {
    shelfCaseId: found.id,
    personId: actor.personId,
    personName: actor.name,
    meaning: input.meaning,
    comment: input.comment,
    contentSha256: input.contentSha256,
    zone: rows[0]?.zone ?? 'UTC',
    signedAt: rows[0]?.now ?? '',
  }
  await trx
    .insertInto('signature')
    .values({ id: input.id, ...facts, signatureSha256: signatureHash(facts, code) })
    .execute()
  if (input.meaning === 'approve')
    await trx
      .updateTable('shelfCase')
      .set((eb) => ({ state: 'superseded', version: eb('version', '+', 1) }))
      .where('studyId', '=', found.studyId)
      .where('state', '=', 'signed')
      .execute()
  const saved = await trx
    .updateTable('shelfCase')
    .set({ state: input.meaning === 'approve' ? 'signed' : 'sent back', version: found.version + 1 })
    .where('id', '=', found.id)
    .returning(['id', 'code', 'state', 'version'])
    .executeTakeFirstOrThrow()
  await enqueue(trx, 'shelf-case.mail', { caseId: found.id, event: saved.state })
  return { ...saved, signedAt: facts.signedAt }
}

function assertWhole(code: string, found: { content: string | null; contentSha256: string | null }): void {
  const hash = createHash('sha256')
    .update(found.content ?? '', 'utf8')
    .digest('hex')
  if (hash !== found.contentSha256)
    throw refuse.conflict(
      `The content of case ${code} was changed below the application and no longer matches its hash. Do not sign it; tell the lab manager.`,
    )
}

async function assertPassword(trx: Trx, actor: Actor, password: string): Promise<void> {
  const stored = await trx
    .selectFrom('password')
    .select('hash')
    .where('personId', '=', actor.personId)
    .executeTakeFirst()
  if (!(await verifyPassword(stored?.hash, password)))
    throw refuse.invalid('That is not your password. Nothing was signed; type it once more.', {
      password: 'That is not your password.',
    })
}
