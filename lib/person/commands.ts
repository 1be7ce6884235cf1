import type { Actor } from '@/lib/auth/actor'
import { endSessionsOf } from '@/lib/auth/session'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { enqueue } from '@/lib/jobs/enqueue'
import { expectOne } from '@/lib/trail/queries'
import { getPerson, type PersonRow } from './queries'
import type { PersonToChange, PersonToInvite } from './schema'

export async function invitePerson(trx: Trx, actor: Actor, input: PersonToInvite): Promise<PersonRow> {
  await refuseTaken(trx, input.email)
  await refuseUnknownClient(trx, input.clientId)
  await trx
    .insertInto('person')
    .values({ ...input, clientId: clientOf(input) })
    .execute()
  await enqueue(trx, 'person.mail-invitation', { personId: input.id, invitedBy: actor.name })
  return getPerson(trx, actor, input.id)
}

/** Sends the link again; the worker ends the earlier one when it makes the new one. */
export async function inviteAgain(trx: Trx, actor: Actor, id: string): Promise<PersonRow> {
  const person = await getPerson(trx, actor, id)
  if (!person.isActive) throw refuse.conflict(`${person.name} is not active. Make the account active first.`)
  if (person.hasPassword)
    throw refuse.conflict(
      `${person.name} has a password already. Let them ask for a new one at the sign-in page.`,
    )
  await enqueue(trx, 'person.mail-invitation', { personId: id, invitedBy: actor.name })
  return person
}

export async function changePerson(
  trx: Trx,
  actor: Actor,
  id: string,
  input: PersonToChange,
): Promise<PersonRow> {
  const before = await getPerson(trx, actor, id)
  refuseOnOneself(actor, before, input)
  await refuseUnknownClient(trx, input.clientId)
  const { name, initials, roles, isActive, version } = input
  const changed = await trx
    .updateTable('person')
    .set({ name, initials, roles, isActive, clientId: clientOf(input), version: version + 1 })
    .where('id', '=', id)
    .where('version', '=', version)
    .returning('id')
    .executeTakeFirst()
  await expectOne(trx, changed, { table: 'person', id, thing: `the account of ${before.name}` })
  // Whoever may do less from now on does so from now on.
  if (!isActive || !sameRoles(before.roles, roles)) await endSessionsOf(trx, id)
  return getPerson(trx, actor, id)
}

function refuseOnOneself(actor: Actor, before: PersonRow, input: PersonToChange): void {
  if (before.id !== actor.personId) return
  if (!sameRoles(before.roles, input.roles))
    throw refuse.forbidden('Nobody changes their own roles. Ask another manager to do it.')
  if (!input.isActive)
    throw refuse.forbidden('Nobody closes their own account. Ask another manager to do it.')
}

function sameRoles(one: readonly string[], other: readonly string[]): boolean {
  return [...one].sort().join() === [...other].sort().join()
}

const clientOf = (input: { roles: readonly string[]; clientId: string | null }) =>
  input.roles.includes('client') ? input.clientId : null

/** An address names one person for ever, also after the account was closed. */
async function refuseTaken(trx: Trx, email: string): Promise<void> {
  const holder = await trx
    .selectFrom('person')
    .select(['name', 'isActive'])
    .where((eb) => eb(eb.fn('lower', ['email']), '=', email))
    .executeTakeFirst()
  if (!holder) return
  throw refuse.conflict(
    holder.isActive
      ? `${holder.name} has this address already. Change their account instead.`
      : `This address belonged to ${holder.name}, whose account is closed, and stays theirs. Use another address, or open the account again.`,
  )
}

async function refuseUnknownClient(trx: Trx, clientId: string | null): Promise<void> {
  if (!clientId) return
  const client = await trx.selectFrom('client').select('id').where('id', '=', clientId).executeTakeFirst()
  if (!client)
    throw refuse.invalid('This client is not there. Choose one of the list.', {
      clientId: 'Choose a client.',
    })
}
