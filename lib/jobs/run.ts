import PgBoss from 'pg-boss'
import { systemActor } from '@/lib/auth/actor'
import { db } from '@/lib/db/client'
import { databaseUrl } from '@/lib/env'
import { log } from '@/lib/http/log'
import { queues, type QueueName } from './queues'
import { registry } from './registry'

/** Works until stopped. Jobs that were running when the process died come back after their time has run out. */
export async function runJobs(): Promise<{ stop: () => Promise<void> }> {
  const boss = new PgBoss({
    connectionString: databaseUrl('app'),
    max: 4,
    migrate: false,
    cronWorkerIntervalSeconds: 5,
  })
  boss.on('error', (error) => log.error({ err: error }, 'the job queue reports'))
  await boss.start()
  for (const { queue, handle } of registry) {
    await boss.work<unknown>(queue, { batchSize: 1, pollingIntervalSeconds: 2 }, async ([job]) => {
      if (!job) return
      try {
        await handle({ db, actor: systemActor(job.id), jobId: job.id }, job.data)
      } catch (error) {
        log.error({ err: error, queue, jobId: job.id }, 'a job failed and is tried again')
        throw error
      }
    })
  }
  for (const [name, queue] of Object.entries(queues))
    if ('cron' in queue) await boss.schedule(name as QueueName, queue.cron, {}, { tz: 'UTC' })
  return { stop: () => boss.stop({ graceful: true, timeout: 8_000 }) }
}
