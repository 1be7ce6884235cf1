import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as listRoute, POST as createRoute } from '@/app/api/protocols/route'
import { GET as getRoute } from '@/app/api/protocols/[code]/route'
import { POST as beginRoute } from '@/app/api/protocols/[code]/versions/route'
import { PUT as writeRoute } from '@/app/api/protocols/[code]/versions/[number]/route'
import { newId } from '@/lib/db/id'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'

let t: TestDatabase
let formulator: Signed
const plan = readyMadePlan('screen', 'lotion')

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  formulator = await t.person('formulator', { name: 'Lena Brandt' })
})
afterAll(() => t.close())

async function create(name = 'Screen of twelve weeks') {
  const body = { id: newId(), versionId: newId(), name, plan }
  const { body: made } = await call(createRoute, { cookie: formulator.cookie, body })
  return made as { id: string; code: string; versionId: string }
}

function write(code: string, body: Record<string, unknown>, number = '1') {
  return call(writeRoute, { cookie: formulator.cookie, method: 'PUT', params: { code, number }, body })
}

describe('protocols', () => {
  it('gets a code of its own and lists its newest version', async () => {
    const first = await create()
    const second = await create('Another one')
    expect(second.code).not.toBe(first.code)
    const { body } = await call(listRoute, { cookie: formulator.cookie })
    const row = body.rows.find((one: { code: string }) => one.code === second.code)
    expect(row).toMatchObject({ name: 'Another one', number: 1, state: 'draft' })
  })

  it('D05: made twice with the same id, it stands once', async () => {
    const body = { id: newId(), versionId: newId(), name: 'Once', plan }
    const first = await call(createRoute, { cookie: formulator.cookie, body })
    const again = await call(createRoute, { cookie: formulator.cookie, body })
    expect(again.body).toEqual(first.body)
  })

  it('D06: the second of two edits of a draft gets 412 with who and what', async () => {
    const { code } = await create()
    expect((await write(code, { version: 1, name: 'Changed', plan })).status).toBe(200)
    const second = await write(code, { version: 1, name: 'Changed again', plan })
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain('Lena Brandt')
  })

  it('never changes a locked version; a new one begins as its copy', async () => {
    const { code, versionId } = await create()
    const early = await call(beginRoute, {
      cookie: formulator.cookie,
      params: { code },
      body: { id: newId() },
    })
    expect(early.status).toBe(409)
    await lock(versionId)
    const refused = await write(code, { version: 1, name: 'Changed', plan })
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/is locked\. Begin a new version/)
    const next = await call(beginRoute, {
      cookie: formulator.cookie,
      params: { code },
      body: { id: newId() },
    })
    expect(next.body.number).toBe(2)
    const { body } = await call(getRoute, { cookie: formulator.cookie, params: { code } })
    expect(body.versions.map((v: { number: number; state: string }) => [v.number, v.state])).toEqual([
      [2, 'draft'],
      [1, 'locked'],
    ])
    expect(body.versions[0].plan).toEqual(plan)
  })

  it('keeps time points in order and refuses what stands twice or lies before the start', async () => {
    const { code } = await create()
    const at = (timePoints: number[]) => ({ ...plan, stations: [{ ...plan.stations[0]!, timePoints }] })
    expect((await write(code, { version: 1, name: 'Order', plan: at([6, 2, 4]) })).status).toBe(200)
    const { body } = await call(getRoute, { cookie: formulator.cookie, params: { code } })
    expect(body.versions[0].plan.stations[0].timePoints).toEqual([2, 4, 6])
    expect((await write(code, { version: 2, name: 'Order', plan: at([2, 2]) })).status).toBe(422)
    expect((await write(code, { version: 2, name: 'Order', plan: at([0, 2]) })).status).toBe(422)
  })

  it('is read by the lab, written by formulators and not there for clients', async () => {
    const technician = await t.person('technician')
    const client = await t.person('client')
    const { code } = await create()
    expect((await call(getRoute, { cookie: technician.cookie, params: { code } })).status).toBe(200)
    const body = { id: newId(), versionId: newId(), name: 'Mine', plan }
    expect((await call(createRoute, { cookie: technician.cookie, body })).status).toBe(403)
    expect((await call(getRoute, { cookie: client.cookie, params: { code } })).status).not.toBe(200)
    expect((await call(getRoute, { cookie: technician.cookie, params: { code: 'P-99' } })).status).toBe(404)
  })
})

async function lock(versionId: string) {
  const { transact } = await import('@/lib/db/transact')
  await transact(t.db, formulator.actor, {}, (trx) =>
    trx.updateTable('protocolVersion').set({ state: 'locked' }).where('id', '=', versionId).execute(),
  )
}

describe('a plan that contradicts itself', () => {
  it('is not kept: overlapping windows get their sentence at their station, and nothing changes', async () => {
    const { code } = await create()
    const wide = {
      ...plan,
      stations: plan.stations.map((one, at) => (at === 2 ? { ...one, windowDays: 5 } : one)),
    }
    const refused = await write(code, { version: 1, name: 'Wide', plan: wide })
    expect(refused.status).toBe(422)
    expect(refused.body.error.fields['plan.stations.2.windowDays']).toMatch(
      /windows of week 1 and week 2 overlap/,
    )
    const made = await call(createRoute, {
      cookie: formulator.cookie,
      body: { id: newId(), versionId: newId(), name: 'Wide', plan: wide },
    })
    expect(made.status).toBe(422)
    const { body } = await call(getRoute, { cookie: formulator.cookie, params: { code } })
    expect(body.versions[0].plan).toEqual(plan)
  })

  it.each([
    [
      'a cycle colder in its warm half',
      { cycle: { coldC: 5, coldHours: 8, warmC: -5, warmHours: 8, isFrozenThrough: true } },
    ],
    [
      'hours beyond a week',
      { cycle: { coldC: -10, coldHours: 900, warmC: 25, warmHours: 8, isFrozenThrough: true } },
    ],
    ['an orientation nobody knows', { orientation: 'sideways' }],
    ['a reading left out that is no attribute', { leftOut: [{ attribute: 'taste', week: 2 }] }],
  ])('%s is refused', async (_, change) => {
    const { code } = await create()
    const stations = [{ ...plan.stations[4]!, ...change }]
    expect((await write(code, { version: 1, name: 'Odd', plan: { ...plan, stations } })).status).toBe(422)
  })

  it('an outside test that stands twice is refused', async () => {
    const { code } = await create()
    const setAside = [1, 2].map((jars) => ({ what: 'microbiology', jars }))
    expect((await write(code, { version: 1, name: 'Odd', plan: { ...plan, setAside } })).status).toBe(422)
  })
})
