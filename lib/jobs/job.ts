import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type * as z from '@/lib/http/zod'
import type { QueueName } from './queues'

/** The actor is the system's own; its request id is the job's, so that the trail tells which job wrote. */
export type JobContext = { db: Db; actor: Actor; jobId: string }

export type Job = { queue: QueueName; handle: (context: JobContext, data: unknown) => Promise<void> }

/** A job may run again after a crash: what it does twice must be the same as once. */
export function job<T>(
  queue: QueueName,
  schema: z.ZodType<T>,
  handle: (context: JobContext, data: T) => Promise<unknown>,
): Job {
  return {
    queue,
    handle: async (context, data) => {
      await handle(context, schema.parse(data ?? {}))
    },
  }
}
