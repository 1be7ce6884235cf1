import type { Actor } from '@/lib/auth/actor'
import { hashPassword, judgePassword, verifyPassword } from '@/lib/auth/password'
import { endSession, endSessionsOf, openSession } from '@/lib/auth/session'
import { countAttempt, countRequest, forgiveAttempt } from '@/lib/auth/throttle'
import { spendToken, type TokenKind } from '@/lib/auth/token'
import type { Trx } from '@/lib/db/client'
import { env } from '@/lib/env'
import { refuse } from '@/lib/http/errors'
import { enqueue } from '@/lib/jobs/enqueue'
import { findLab } from '@/lib/lab/queries'
import { recordEvent } from '@/lib/trail/commands'
import type { InvitationToAccept, PasswordToChange, PersonToSignIn } from './schema'

type Door = { address: string; oldSessionId: string | null }

/** Returns the new session's secret. An earlier session of the same browser ends. */
export async function signIn(trx: Trx, input: PersonToSignIn, door: Door): Promise<string> {
  const isDemo = 'demoPersonId' in input
  const person = isDemo
    ? await admitDemo(trx, input.demoPersonId)
    : await admit(trx, input.email, input.password, door.address)
  if (door.oldSessionId) await endSession(trx, door.oldSessionId)
  await recordEvent(trx, { event: 'signed in', table: 'person', id: person.id, detail: { isDemo } })
  return openSession(trx, person.id, isDemo)
}

async function admit(trx: Trx, email: string, password: string, address: string) {
  const attempt = { account: email, address }
  await countAttempt(attempt)
  const person = await trx
    .selectFrom('person')
    .leftJoin('password', 'password.personId', 'person.id')
    .select(['person.id', 'person.isActive', 'password.hash'])
    .where((eb) => eb(eb.fn('lower', ['person.email']), '=', email))
    .where('person.isSystem', '=', false)
    .executeTakeFirst()
  const isRight = await verifyPassword(person?.hash ?? undefined, password)
  if (!person || !isRight || !person.isActive)
    throw refuse
      .signIn('The address or the password is not right. Check both, or ask for a new password.')
      .onTrail({ event: 'sign-in refused', table: 'person', ...(person ? { id: person.id } : {}) })
  await forgiveAttempt(attempt)
  return person
}

/** One click, and only where the demo is on and filling it left its mark in the database. */
async function admitDemo(trx: Trx, id: string) {
  const lab = await findLab(trx)
  const person = await trx
    .selectFrom('person')
    .select('id')
    .where('id', '=', id)
    .where('isDemo', '=', true)
    .where('isActive', '=', true)
    .executeTakeFirst()
  if (!env().demo || !lab?.demoFilledAt || !person)
    throw refuse.signIn('This is not a demo person. Sign in with address and password.')
  return person
}

export async function signOut(trx: Trx, actor: Actor): Promise<void> {
  await endSession(trx, actor.sessionId)
  await recordEvent(trx, { event: 'signed out', table: 'person', id: actor.personId })
}

/** Every session ends, this one too; returns the secret of a fresh one. */
export async function changePassword(
  trx: Trx,
  actor: Actor,
  input: PasswordToChange,
  address: string,
): Promise<string> {
  const attempt = { account: actor.email, address }
  await countAttempt(attempt)
  const stored = await trx
    .selectFrom('password')
    .select('hash')
    .where('personId', '=', actor.personId)
    .executeTakeFirst()
  if (!(await verifyPassword(stored?.hash, input.current)))
    throw refuse
      .invalid('The password you have now is not right. Type it again.', { current: 'Type it again.' })
      .onTrail({ event: 'password change refused', table: 'person', id: actor.personId })
  await forgiveAttempt(attempt)
  await setPassword(trx, actor.personId, input.next, 'next')
  await endSessionsOf(trx, actor.personId)
  return openSession(trx, actor.personId, actor.isDemo)
}

export function acceptInvitation(trx: Trx, input: InvitationToAccept, address: string): Promise<string> {
  return enterByLink(trx, 'invitation', input, address)
}

export function finishReset(trx: Trx, input: InvitationToAccept, address: string): Promise<string> {
  return enterByLink(trx, 'reset', input, address)
}

async function enterByLink(
  trx: Trx,
  kind: Extract<TokenKind, 'invitation' | 'reset'>,
  input: InvitationToAccept,
  address: string,
): Promise<string> {
  await countRequest(kind, address, 30)
  const spent = await spendToken(trx, kind, input.token)
  const person = spent?.personId
    ? await trx
        .selectFrom('person')
        .select('id')
        .where('id', '=', spent.personId)
        .where('isActive', '=', true)
        .executeTakeFirst()
    : undefined
  if (!person)
    throw refuse.conflict(
      kind === 'reset'
        ? 'This link was used already or is older than an hour. Ask for a new one at the sign-in page.'
        : 'This link was used already or is older than a week. Ask the manager to invite you again.',
    )
  await setPassword(trx, person.id, input.password)
  await endSessionsOf(trx, person.id)
  await recordEvent(trx, { event: 'signed in', table: 'person', id: person.id, detail: { by: kind } })
  return openSession(trx, person.id, false)
}

/** Answers the same whether or not anybody has this address. */
export async function askReset(trx: Trx, email: string, address: string): Promise<void> {
  await countRequest('reset-mail', address, 10)
  const person = await trx
    .selectFrom('person')
    .select('id')
    .where((eb) => eb(eb.fn('lower', ['email']), '=', email))
    .where('isActive', '=', true)
    .where('isSystem', '=', false)
    .executeTakeFirst()
  if (person) await enqueue(trx, 'person.mail-reset', { personId: person.id })
}

export async function setPassword(
  trx: Trx,
  personId: string,
  password: string,
  field = 'password',
): Promise<void> {
  const person = await trx
    .selectFrom('person')
    .select(['email', 'name'])
    .where('id', '=', personId)
    .executeTakeFirstOrThrow()
  const fault = judgePassword(password, person)
  if (fault) throw refuse.invalid(fault, { [field]: fault })
  const hash = await hashPassword(password)
  await trx
    .insertInto('password')
    .values({ personId, hash })
    .onConflict((conflict) =>
      conflict.column('personId').doUpdateSet((eb) => ({ hash, changedAt: eb.fn('app_now') })),
    )
    .execute()
  await recordEvent(trx, { event: 'password set', table: 'person', id: personId })
}
