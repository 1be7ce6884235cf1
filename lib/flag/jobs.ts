import type { Db } from '@/lib/db/client'
import { transact } from '@/lib/db/transact'
import { env } from '@/lib/env'
import * as z from '@/lib/http/zod'
import { job } from '@/lib/jobs/job'
import { sendMail } from '@/lib/mail/send'
import { lockStudy } from '@/lib/series/commands'
import { flagMail } from './mail'

const raised = z.object({ studyId: z.uuid(), since: z.iso.datetime({ offset: true }) })

export const jobs = [
  job('flag.mail', raised, async ({ db, actor, jobId }, { studyId, since }) => {
    // A save that found this job waiting has sent none of its own: it is waited for, so that its flags are told.
    await transact(db, actor, { requestId: jobId }, (trx) => lockStudy(trx, studyId))
    const told = await findTold(db, studyId, since)
    if (!told || told.flags.length === 0) return
    for (const follower of told.followers) {
      await sendMail(flagMail(follower, told.study, told.flags, env().publicUrl), `${jobId}.${follower.id}`)
    }
  }),
]

/** What is still open of what was raised since; what was settled meanwhile troubles nobody. */
async function findTold(db: Db, studyId: string, since: string) {
  const study = await db
    .selectFrom('study')
    .select(['code', 'title'])
    .where('id', '=', studyId)
    .executeTakeFirst()
  if (!study) return null
  const flags = await db
    .selectFrom('flag')
    .select(['number', 'sentence'])
    .where('studyId', '=', studyId)
    .where('state', '=', 'open')
    .where('raisedAt', '>=', since)
    .orderBy('number')
    .execute()
  const followers = await db
    .selectFrom('studyFollower as follower')
    .innerJoin('person', 'person.id', 'follower.personId')
    .select(['person.id', 'person.name', 'person.email'])
    .where('follower.studyId', '=', studyId)
    .where('person.isActive', '=', true)
    .execute()
  return { study, flags, followers }
}
