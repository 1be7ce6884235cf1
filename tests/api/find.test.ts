import { afterAll, beforeAll, expect, it } from 'vitest'
import { GET as FIND } from '@/app/api/find/route'
import { POST as START } from '@/app/api/studies/route'
import { transact } from '@/lib/db/transact'
import { newId } from '@/lib/db/id'
import type { Found } from '@/lib/finder/queries'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '../support/running-study'
import { countStatements } from '../support/statements'

let t: TestDatabase
let liv: Signed
let studyCode: string
let jarCode: string

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  liv = await t.person('formulator')
  await makeStations(liv.actor)
  const protocolVersionId = await makeProtocol(liv.actor)
  const batchId = await makeBatch(liv.actor, { code: 'FIND-1' })
  const id = newId()
  const started = await call(START, {
    cookie: liv.cookie,
    body: {
      id,
      title: 'A finding that stands still, 50 % of it',
      protocolVersionId,
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
    },
  })
  expect(started.status).toBe(200)
  const study = await t.db.selectFrom('study').select('code').where('id', '=', id).executeTakeFirstOrThrow()
  const jar = await t.db.selectFrom('jar').select('code').where('studyId', '=', id).executeTakeFirstOrThrow()
  studyCode = study.code
  jarCode = jar.code
})
afterAll(() => t.close())

const find = async (who: Signed, q: string) =>
  (await call(FIND, { cookie: who.cookie, query: { q } })).body as Found[]

it('finds a study, a batch and a jar by part of code or name, whatever the capitals', async () => {
  expect(await find(liv, 'STANDS still')).toEqual([
    {
      kind: 'study',
      code: studyCode,
      name: 'A finding that stands still, 50 % of it',
      href: `/studies/${studyCode}`,
    },
  ])
  const [batch] = await find(liv, 'find-1')
  expect(batch).toMatchObject({ kind: 'batch', code: 'FIND-1', href: '/batches/FIND-1' })
  const [jar] = await find(liv, jarCode.toLowerCase())
  expect(jar).toMatchObject({ kind: 'jar', code: jarCode, href: `/studies/${studyCode}/jars?q=${jarCode}` })
})

it('takes signs of a pattern for what they are, and finds nothing for nothing', async () => {
  expect((await find(liv, '50 %')).map(({ kind }) => kind)).toContain('study')
  expect(await find(liv, '5% of')).toEqual([])
  expect(await find(liv, '_')).toEqual([])
  expect(await find(liv, '  ')).toEqual([])
})

it('puts what is the typed code before what begins with it, a few of each kind', async () => {
  const found = await find(liv, studyCode)
  expect(found[0]).toMatchObject({ kind: 'study', code: studyCode })
  const kinds = (await find(liv, 'a')).map(({ kind }) => kind)
  for (const kind of new Set(kinds)) expect(kinds.filter((one) => one === kind).length).toBeLessThanOrEqual(6)
})

it('A05: shows a client nothing of the lab, and of the studies only its own that are shared', async () => {
  const client = await t.person('client')
  expect(await find(client, 'find-1')).toEqual([])
  expect(await find(client, studyCode)).toEqual([])
  expect(await find(client, jarCode)).toEqual([])
  await transact(t.db, liv.actor, { requestId: 'test', reason: 'shared' }, (trx) =>
    trx
      .updateTable('study')
      .set({ clientId: client.actor.clientId, isShared: true })
      .where('code', '=', studyCode)
      .execute(),
  )
  expect((await find(client, studyCode)).map(({ kind }) => kind)).toEqual(['study'])
  expect(await find(client, jarCode)).toEqual([])
})

it('asks once, whatever there is to look through', async () => {
  const { count } = await countStatements(() => find(liv, 'a'))
  expect(count).toBe(1)
})
