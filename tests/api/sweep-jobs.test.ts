import { afterAll, beforeAll, expect, it } from 'vitest'
import { sql } from 'kysely'
import { systemActor } from '@/lib/auth/actor'
import { transact } from '@/lib/db/transact'
import { enqueue } from '@/lib/jobs/enqueue'
import { queues } from '@/lib/jobs/queues'
import { registry } from '@/lib/jobs/registry'
import { testDatabase, type TestDatabase } from '../support/database'

let t: TestDatabase
beforeAll(async () => {
  t = await testDatabase()
})
afterAll(() => t.close())

const waiting = async (queue: string) =>
  (
    await sql<{
      data: unknown
    }>`select data from pgboss.job where name = ${queue} order by created_on`.execute(t.owner)
  ).rows

it('every queue has one handler and every handler a queue', () => {
  expect(registry.map((job) => job.queue).sort()).toEqual(Object.keys(queues).sort())
})

it('D03: a job is there when its transaction commits, and not otherwise', async () => {
  await transact(t.db, systemActor(), {}, (trx) => enqueue(trx, 'person.mail-reset', { personId: 'kept' }))
  const undone = transact(t.db, systemActor(), {}, async (trx) => {
    await enqueue(trx, 'person.mail-reset', { personId: 'undone' })
    throw new Error('undone')
  })
  await expect(undone).rejects.toThrow('undone')
  expect(await waiting('person.mail-reset')).toEqual([{ data: { personId: 'kept' } }])
})

it('a short queue gathers waiting jobs of one key', async () => {
  const send = (key: string) =>
    transact(t.db, systemActor(), {}, (trx) =>
      enqueue(trx, 'flag.mail', { studyId: key }, { startAfter: 900, singletonKey: key }),
    )
  await send('one')
  await send('one')
  await send('other')
  expect(await waiting('flag.mail')).toEqual([{ data: { studyId: 'one' } }, { data: { studyId: 'other' } }])
})
