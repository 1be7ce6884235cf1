import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { studiesOf } from '@/lib/study/queries/scope'
import { dayIn } from '@/lib/study/rules/calendar'
import type { changedStudy, endedStudy } from '@/lib/study/schema'
import { expectOne } from '@/lib/trail/queries'

/** Title, and whose study it is: what of a running study may still change. */
export async function changeStudy(
  trx: Trx,
  actor: Actor,
  code: string,
  input: z.output<typeof changedStudy>,
) {
  const study = await findStudy(trx, actor, code)
  if (input.isShared && input.clientId === null) {
    throw refuse.invalid('A study is shared with its client, and this one has none. Choose a client first.', {
      isShared: 'Choose a client first.',
    })
  }
  if (input.clientId !== null) {
    const client = await trx
      .selectFrom('client')
      .select('id')
      .where('id', '=', input.clientId)
      .executeTakeFirst()
    if (!client) throw refuse.notFound('There is no such client. Choose one from the list.')
  }
  const { version, ...fields } = input
  const written = await trx
    .updateTable('study')
    .set({ ...fields, version: version + 1 })
    .where('id', '=', study.id)
    .where('version', '=', version)
    .returning('version')
    .executeTakeFirst()
  return expectOne(trx, written, { table: 'study', id: study.id, thing: code })
}

/** Ends a study early or at its end; nothing is pulled or logged any more, all that was read stays. */
export async function endStudy(
  trx: Trx,
  actor: Actor,
  code: string,
  input: z.output<typeof endedStudy>,
  now: string,
) {
  const study = await findStudy(trx, actor, code)
  if (study.state === 'closed')
    throw refuse.conflict(`${code} has already ended. There is nothing left to end.`)
  const lab = await trx.selectFrom('lab').select('timeZone').executeTakeFirst()
  const written = await trx
    .updateTable('study')
    .set({ state: 'closed', endedOn: dayIn(lab?.timeZone ?? 'UTC', now), version: input.version + 1 })
    .where('id', '=', study.id)
    .where('version', '=', input.version)
    .returning('version')
    .executeTakeFirst()
  return expectOne(trx, written, { table: 'study', id: study.id, thing: code })
}

/** Those who follow a study get mails about its flags; everybody who may read it may follow it. */
export async function followStudy(trx: Trx, actor: Actor, code: string, isFollowing: boolean) {
  const study = await findStudy(trx, actor, code)
  if (isFollowing) {
    await trx
      .insertInto('studyFollower')
      .values({ id: newId(), studyId: study.id, personId: actor.personId })
      .onConflict((conflict) => conflict.columns(['studyId', 'personId']).doNothing())
      .execute()
  } else {
    await trx
      .deleteFrom('studyFollower')
      .where('studyId', '=', study.id)
      .where('personId', '=', actor.personId)
      .execute()
  }
  return { isFollowing }
}

async function findStudy(trx: Trx, actor: Actor, code: string) {
  const study = await trx
    .selectFrom('study')
    .select(['id', 'state'])
    .where('code', '=', code)
    .where(studiesOf(actor))
    .executeTakeFirst()
  if (!study) throw refuse.notFound()
  return study
}
