import { CompiledQuery } from 'kysely'
import PgBoss from 'pg-boss'
import type { Trx } from '@/lib/db/client'
import type { QueueName } from './queues'

type Options = { startAfter?: Date | number; singletonKey?: string }

// Never started: it only words the insert, which runs on the caller's transaction.
const boss = new PgBoss({
  db: { executeSql: () => Promise.reject(new Error('Jobs are sent within a transaction.')) },
})

/** The job exists when and only when the caller's transaction commits. startAfter: an instant, or seconds. */
export async function enqueue(
  trx: Trx,
  queue: QueueName,
  data: Record<string, unknown>,
  options: Options = {},
): Promise<void> {
  await boss.send(queue, data, {
    ...options,
    db: {
      executeSql: async (text, values) => ({
        rows: (await trx.executeQuery(CompiledQuery.raw(text, values))).rows,
      }),
    },
  })
}
