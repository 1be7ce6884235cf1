import { createToken, type TokenKind } from '@/lib/auth/token'
import { transact } from '@/lib/db/transact'
import { env } from '@/lib/env'
import * as z from '@/lib/http/zod'
import { job, type JobContext } from '@/lib/jobs/job'
import { findLab } from '@/lib/lab/queries'
import { sendMail } from '@/lib/mail/send'
import { invitationMail, resetMail } from './mail'

const invitation = z.object({ personId: z.uuid(), invitedBy: z.string() })
const reset = z.object({ personId: z.uuid() })

export const jobs = [
  job('person.mail-invitation', invitation, async (context, { personId, invitedBy }) => {
    const found = await prepare(context, 'invitation', personId)
    if (!found) return
    const link = `${env().publicUrl}/invitation/${found.secret}`
    await sendMail(invitationMail(found.person, invitedBy, found.labName, link), context.jobId)
  }),
  job('person.mail-reset', reset, async (context, { personId }) => {
    const found = await prepare(context, 'reset', personId)
    if (!found) return
    const link = `${env().publicUrl}/reset/${found.secret}`
    await sendMail(resetMail(found.person, found.labName, link), context.jobId)
  }),
]

/**
 * The link is made here, at the moment of sending: its secret never lies in a job's row or a backup. When
 * sending fails the next try makes a new one.
 */
async function prepare({ db, actor, jobId }: JobContext, kind: TokenKind, personId: string) {
  const person = await db
    .selectFrom('person')
    .select(['name', 'email'])
    .where('id', '=', personId)
    .where('isActive', '=', true)
    .executeTakeFirst()
  if (!person) return null
  const labName = (await findLab(db))?.name ?? 'the lab'
  const secret = await transact(db, actor, { requestId: jobId }, (trx) => createToken(trx, kind, personId))
  return { person, labName, secret }
}
