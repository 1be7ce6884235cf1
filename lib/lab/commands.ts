import { sql } from 'kysely'
import { systemActor, type Actor } from '@/lib/auth/actor'
import { openSession } from '@/lib/auth/session'
import { createToken, spendToken } from '@/lib/auth/token'
import type { Db, Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { refuse } from '@/lib/http/errors'
import { setPassword } from '@/lib/session/commands'
import { recordEvent } from '@/lib/trail/commands'
import { expectOne } from '@/lib/trail/queries'
import { isSetUp } from './queries'
import type { LabToChange, LabToSetUp } from './schema'

/** The first manager, by the code that stands on the server's console. Returns the new session's secret. */
export async function setUpLab(trx: Trx, input: LabToSetUp): Promise<string> {
  // Two set-ups at once: the second waits here and then finds the lab there.
  await sql`select pg_advisory_xact_lock(hashtext('stillstand set-up'))`.execute(trx)
  if (await isSetUp(trx))
    throw refuse.conflict('The lab is set up already. Sign in, or ask its manager to invite you.')
  if (!(await spendToken(trx, 'setup', input.code)))
    throw refuse.invalid('The code is not the one that the server printed. Copy it from the console.', {
      code: 'Copy the code from the server’s console.',
    })
  const id = newId()
  await trx.insertInto('lab').values({ id: newId(), name: input.labName, timeZone: input.timeZone }).execute()
  await trx
    .insertInto('person')
    .values({
      id,
      email: input.email,
      name: input.name,
      initials: input.initials,
      roles: [...new Set(input.roles), 'manager' as const],
    })
    .execute()
  await setPassword(trx, id, input.password)
  await recordEvent(trx, { event: 'lab set up', table: 'person', id })
  return openSession(trx, id, false)
}

export async function changeLab(trx: Trx, _actor: Actor, { version, labelGrid, ...fields }: LabToChange) {
  const changed = await trx
    .updateTable('lab')
    .set({
      ...fields,
      ...(labelGrid === undefined ? {} : { labelGrid: labelGrid && JSON.stringify(labelGrid) }),
      version: version + 1,
    })
    .where('version', '=', version)
    .returning(['id', 'name', 'timeZone', 'version'])
    .executeTakeFirst()
  if (changed) return changed
  const lab = await trx.selectFrom('lab').select('id').executeTakeFirst()
  return expectOne(trx, changed, { table: 'lab', id: lab?.id ?? '', thing: 'the lab' })
}

/** Null where somebody is there already. A new code ends the earlier one. */
export async function makeFirstCode(db: Db): Promise<string | null> {
  if (await isSetUp(db)) return null
  return transact(db, systemActor(), { reason: 'first set-up' }, (trx) => createToken(trx, 'setup', null))
}
