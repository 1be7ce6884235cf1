import { sql } from 'kysely'
import * as z from '@/lib/http/zod'
import { job } from '@/lib/jobs/job'

export const jobs = [
  // Where a writer takes longer than the lock waits, the next minute seals what this one left.
  job('trail.seal', z.object({}), ({ db }) => sql`select seal_trail()`.execute(db)),
]
