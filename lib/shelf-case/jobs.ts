import { sql, type SqlBool } from 'kysely'
import * as z from '@/lib/http/zod'
import { env } from '@/lib/env'
import { job } from '@/lib/jobs/job'
import { sendMail } from '@/lib/mail/send'
import { caseMail } from '@/lib/shelf-case/mail'

const about = z.object({ caseId: z.uuid(), event: z.enum(['put forward', 'sent back', 'signed']) })

export const jobs = [
  job('shelf-case.mail', about, async ({ db, jobId }, { caseId, event }) => {
    const found = await db
      .selectFrom('shelfCase as c')
      .innerJoin('study as s', 's.id', 'c.studyId')
      .innerJoin('person as p', 'p.id', 'c.putForwardBy')
      .select([
        'c.code',
        'c.proposedMonths',
        'c.storageStatement',
        'c.studyId',
        's.code as studyCode',
        's.title as studyTitle',
        'p.name as putForwardByName',
        'p.id as putForwardById',
      ])
      .where('c.id', '=', caseId)
      .executeTakeFirst()
    if (!found) return
    const signature = await db
      .selectFrom('signature')
      .select(['personName', 'meaning', 'signedAt', 'zone', 'comment'])
      .where('shelfCaseId', '=', caseId)
      .orderBy('signedAt', 'desc')
      .executeTakeFirst()
    // Put forward: whoever may sign. Signed or sent back: who put it forward and who follows the study.
    const people = await db
      .selectFrom('person as p')
      .select(['p.id', 'p.name', 'p.email', 'p.roles'])
      .where('p.isActive', '=', true)
      .where('p.isSystem', '=', false)
      .where((eb) =>
        event === 'put forward'
          ? sql<SqlBool>`'qa' = any (p.roles)`
          : eb.or([
              eb('p.id', '=', found.putForwardById),
              eb.exists(
                eb
                  .selectFrom('studyFollower as f')
                  .select('f.id')
                  .whereRef('f.personId', '=', 'p.id')
                  .where('f.studyId', '=', found.studyId),
              ),
            ]),
      )
      .execute()
    const link = `${env().publicUrl}/cases/${found.code}`
    for (const person of people)
      await sendMail(caseMail(person, event, found, signature ?? null, link), `${jobId}-${person.id}`)
  }),
]
