import { sql } from 'kysely'
import * as z from '@/lib/http/zod'
import { job } from '@/lib/jobs/job'

export const jobs = [
  job('session.sweep', z.object({}), async ({ db }) => {
    await db
      .deleteFrom('session')
      .where('expiresAt', '<', sql<string>`now()`)
      .execute()
    await db
      .deleteFrom('token')
      .where('expiresAt', '<', sql<string>`now() - interval '30 days'`)
      .execute()
    await db.deleteFrom('rateLimit').where('expire', '<', Date.now()).execute()
    // First answers are kept 90 days.
    await db
      .deleteFrom('idempotencyAnswer')
      .where('at', '<', sql<string>`now() - interval '90 days'`)
      .execute()
  }),
]
