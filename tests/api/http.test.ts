import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sql } from 'kysely'
import { newId } from '@/lib/db/id'
import { read, write } from '@/lib/http/route'
import { refuse } from '@/lib/http/errors'
import { z } from '@/lib/http/zod'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let manager: Signed
beforeAll(async () => {
  t = await testDatabase()
  manager = await t.person('manager')
})
afterAll(() => t.close())

const makeClient = write({
  permission: 'lab.manage',
  input: z.object({ id: z.uuid(), name: z.string() }),
  handler: async ({ db, input }) => {
    await db.insertInto('client').values(input).execute()
    return { id: input.id, at: Math.random() }
  },
})

const countClients = async (name: string) =>
  (await t.owner.selectFrom('client').select('id').where('name', '=', name).execute()).length

describe('repeats', () => {
  it('D05: five at once with one key make one row and get one answer', async () => {
    const key = newId()
    const body = { id: newId(), name: 'Five at once' }
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => call(makeClient, { cookie: manager.cookie, key, body })),
    )
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(answers.map((answer) => JSON.stringify(answer.body))).size).toBe(1)
    expect(await countClients('Five at once')).toBe(1)
  })
})
