import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as createRoute } from '@/app/api/protocols/route'
import { PUT as writeRoute } from '@/app/api/protocols/[code]/versions/[number]/route'
import { PUT as changeRoute } from '@/app/api/studies/[code]/route'
import { POST as startRoute } from '@/app/api/studies/route'
import { newId } from '@/lib/db/id'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '@/tests/support/running-study'
import { countStatements } from '@/tests/support/statements'

// What a formulator may send that a plan or a study cannot be: each is answered with a sentence where it stands.

let t: TestDatabase
let lena: Signed
let omar: Signed
let count = 0
const screen = readyMadePlan('screen', 'cream')

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'Europe/Berlin')
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  omar = await t.person('formulator', { name: 'Omar Reyes' })
  await makeStations(lena.actor, 400)
})
afterAll(() => t.close())

async function create(plan: object = screen, name = 'A screen') {
  const body = { id: newId(), versionId: newId(), name, plan }
  return { ...body, ...(await call(createRoute, { cookie: lena.cookie, body })) }
}

function write(code: string, body: object, by = lena) {
  return call(writeRoute, { cookie: by.cookie, method: 'PUT', params: { code, number: '1' }, body })
}

async function batch(state = 'released', yieldG = 3000) {
  count += 1
  return makeBatch(lena.actor, { code: `N${count}`, state, yieldG })
}

function start(body: { batchIds: string[] } & Record<string, unknown>) {
  return call(startRoute, {
    cookie: lena.cookie,
    body: { id: newId(), title: 'Screen', initialReadings: body.batchIds.flatMap(initialOf), ...body },
  })
}

const withFirst = (change: Partial<ProtocolPlan['stations'][number]>): ProtocolPlan => ({
  ...screen,
  stations: screen.stations.map((one, at) => (at === 0 ? { ...one, ...change } : one)),
})

describe('a protocol', () => {
  it('without time points is kept as a draft and says why no study can start on it', async () => {
    const { body, status, versionId } = await create(withFirst({ timePoints: [] }))
    expect(status).toBe(200)
    expect(body.code).toMatch(/^P-\d+$/)
    const answer = await start({ protocolVersionId: versionId, batchIds: [await batch()] })
    expect(answer.status).toBe(422)
    expect(answer.body.error).toMatchObject({
      sentence: 'The protocol has no time points at 5 °C. Add them to its plan.',
      fields: { protocolVersionId: 'This protocol is not complete.' },
    })
  })

  it('whose windows overlap says which, and how wide they may be', async () => {
    const { body, status } = await create(withFirst({ windowDays: 4 }))
    expect(status).toBe(422)
    expect(body.error.fields).toEqual({
      // A week between two of them: three days each side leave one, four do not.
      'plan.stations.0.windowDays':
        'At 5 °C the windows of week 1 and week 2 overlap. Make the window at most 3 days, or move a time point.',
    })
  })

  it.each<[string, object, string]>([
    ['a time point at the start', withFirst({ timePoints: [0, 4] }), 'plan.stations.0.timePoints.0'],
    ['a time point twice', withFirst({ timePoints: [4, 4] }), 'plan.stations.0.timePoints'],
    [
      'a time point that is no number',
      withFirst({ timePoints: ['soon' as never] }),
      'plan.stations.0.timePoints.0',
    ],
    [
      'a time point in ten thousand years',
      withFirst({ timePoints: [520_000] }),
      'plan.stations.0.timePoints.0',
    ],
    ['a window of minus a day', withFirst({ windowDays: -1 }), 'plan.stations.0.windowDays'],
    ['half a jar', withFirst({ watchJars: 0.5 }), 'plan.stations.0.watchJars'],
    ['no end', { ...screen, endWeeks: 0 }, 'plan.endWeeks'],
    ['a jar of nothing', { ...screen, fillG: 0 }, 'plan.fillG'],
    ['thirteen stations', { ...screen, stations: Array(13).fill(screen.stations[0]) }, 'plan.stations'],
    [
      'a tolerance without a limit',
      { ...screen, attributes: [{ ...screen.attributes[0]!, tolerance: { kind: 'shift' } }] },
      'plan.attributes.0.tolerance',
    ],
    ['a plan that is a text', 'twelve weeks' as never, 'plan'],
  ])('with %s is refused at its field', async (_, plan, field) => {
    const { status, body } = await create(plan)
    expect(status).toBe(422)
    expect(Object.keys(body.error.fields)).toContain(field)
    for (const sentence of Object.values(body.error.fields)) expect(sentence).toMatch(/^[A-Z].*\.$/)
  })

  it('without a name is refused at the name', async () => {
    const { status, body } = await create(screen, '  ')
    expect(status).toBe(422)
    expect(body.error.fields).toEqual({ name: 'Give the protocol a name.' })
  })

  it('that two people edit is kept as the first wrote it, and the second reads who that was', async () => {
    const { code } = (await create()).body
    expect((await write(code, { version: 1, name: 'Of Omar', plan: screen }, omar)).status).toBe(200)
    const second = await write(code, { version: 1, name: 'Of Lena', plan: screen })
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain('Omar Reyes')
  })

  it('that a study follows is locked, and the sentence says what to do', async () => {
    const { versionId, body } = await create()
    const started = await start({ protocolVersionId: versionId, batchIds: [await batch()] })
    expect(started.status).toBe(200)
    const refused = await write(body.code, { version: 2, name: 'Late', plan: screen })
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toBe(
      `A study follows version 1 of ${body.code}, so it is locked. Begin a new version to change the plan.`,
    )
  })
})

describe('a study', () => {
  const inDays = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString()

  it('cannot have begun in the future', async () => {
    const protocolVersionId = await makeProtocol(lena.actor)
    const answer = await start({ protocolVersionId, batchIds: [await batch()], startedAt: inDays(1) })
    expect(answer.status).toBe(422)
    expect(answer.body.error).toMatchObject({
      sentence: 'A study cannot have started in the future. Correct the start.',
      fields: { startedAt: 'This time is still to come.' },
    })
  })

  it.each(['yesterday', '2026-02-30T10:00:00Z', '', 7])(
    'begun on "%s" is refused at the start',
    async (startedAt) => {
      const protocolVersionId = await makeProtocol(lena.actor)
      const answer = await start({ protocolVersionId, batchIds: [await batch()], startedAt })
      expect(answer.status).toBe(422)
      expect(Object.keys(answer.body.error.fields)).toEqual(['startedAt'])
    },
  )

  it('cannot start on a rejected batch', async () => {
    const protocolVersionId = await makeProtocol(lena.actor)
    const answer = await start({ protocolVersionId, batchIds: [await batch('rejected')] })
    expect(answer.status).toBe(409)
    expect(answer.body.error).toMatchObject({
      sentence: `N${count} was rejected, so no study can start on it. Choose another batch.`,
      detail: { kind: 'batch state', batch: `N${count}` },
    })
    // Nor with it among others, nor beside others.
    const [good, bad] = [await batch(), await batch('rejected')]
    expect((await start({ protocolVersionId, batchIds: [good, bad] })).status).toBe(409)
    const beside = { initialReadings: [good, bad].flatMap(initialOf) }
    expect(
      (await start({ protocolVersionId, batchIds: [good], referenceIds: [bad], ...beside })).status,
    ).toBe(409)
    const studies = await t.db
      .selectFrom('studyBatch')
      .select('id')
      .where('batchId', 'in', [good, bad])
      .execute()
    expect(studies).toEqual([])
  })

  it('that two people rename keeps the first name, and the second reads who that was', async () => {
    const protocolVersionId = await makeProtocol(lena.actor)
    const { code } = (await start({ protocolVersionId, batchIds: [await batch()] })).body
    const rename = (by: Signed, title: string) =>
      call(changeRoute, {
        cookie: by.cookie,
        method: 'PUT',
        params: { code },
        body: { version: 1, title, clientId: null, isShared: false },
      })
    expect((await rename(omar, 'Of Omar')).status).toBe(200)
    const second = await rename(lena, 'Of Lena')
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain('Omar Reyes')
  })
})

describe('three batches at six stations and twelve time points', () => {
  const weeks = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]
  const [five, room, warm, hot] = screen.stations
  const large: ProtocolPlan = {
    ...screen,
    // Six places, two of the lab's stations holding lying jars too; windows of a day never overlap week by week.
    stations: [
      five!,
      room!,
      warm!,
      hot!,
      { ...room!, orientation: 'lying' as const },
      { ...warm!, orientation: 'lying' as const },
    ].map((station) => ({ ...station, timePoints: weeks, windowDays: 1 })),
  }

  it('are saved and started in at most 25 statements each', async () => {
    let made: Awaited<ReturnType<typeof create>> | undefined
    const creating = await countStatements(async () => {
      made = await create(large)
    })
    expect(made!.status).toBe(200)
    expect(creating.count).toBeLessThanOrEqual(25)
    let written: Awaited<ReturnType<typeof write>> | undefined
    const saving = await countStatements(async () => {
      written = await write(made!.body.code, { version: 1, name: 'Large', plan: { ...large, retains: 1 } })
    })
    expect(written!.status).toBe(200)
    expect(saving.count).toBeLessThanOrEqual(25)

    const batchIds = [
      await batch('released', 9000),
      await batch('released', 9000),
      await batch('released', 9000),
    ]
    let started: Awaited<ReturnType<typeof start>> | undefined
    const starting = await countStatements(async () => {
      started = await start({ protocolVersionId: made!.versionId, batchIds })
    })
    expect(started!.body.error).toBeUndefined()
    // A watch jar, a spare and twelve to open at each of six stations, an initial jar and a retain: of three batches.
    expect(started!.body.jars).toBe(3 * (6 * (1 + 1 + 12) + 1 + 1))
    expect(starting.count).toBeLessThanOrEqual(25)
  })
})
