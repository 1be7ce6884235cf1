import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as createRoute } from '@/app/api/protocols/route'
import { GET as getRoute } from '@/app/api/protocols/[code]/route'
import { PUT as writeRoute } from '@/app/api/protocols/[code]/versions/[number]/route'
import { POST as approveRoute } from '@/app/api/protocols/[code]/versions/[number]/approve/route'
import { POST as caseRoute } from '@/app/api/cases/route'
import { POST as startRoute } from '@/app/api/studies/route'
import { GET as sheetRoute } from '@/app/api/studies/[code]/sheet/route'
import { newId } from '@/lib/db/id'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeStations } from '@/tests/support/running-study'

let t: TestDatabase
let formulator: Signed
let qa: Signed
let batches = 0
const plan = readyMadePlan('screen', 'cream')

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  formulator = await t.person('formulator')
  qa = await t.person('qa')
  await makeStations(formulator.actor)
})
afterAll(() => t.close())

async function create(by = formulator, of = plan) {
  const body = { id: newId(), versionId: newId(), name: 'Screen', plan: of }
  const { body: made } = await call(createRoute, { cookie: by.cookie, body })
  return made as { code: string; versionId: string }
}

function approve(code: string, by = qa, version = 1, number = '1') {
  return call(approveRoute, { cookie: by.cookie, params: { code, number }, body: { version } })
}

async function startOn(protocolVersionId: string) {
  batches += 1
  const batchId = await makeBatch(formulator.actor, { code: `A${batches}` })
  const id = newId()
  const { body } = await call(startRoute, {
    cookie: formulator.cookie,
    body: {
      id,
      title: 'Screen',
      protocolVersionId,
      batchIds: [batchId],
      initialReadings: initialOf(batchId),
    },
  })
  return { id, code: body.code as string }
}

function putCase(studyId: string) {
  return call(caseRoute, {
    cookie: formulator.cookie,
    body: {
      id: newId(),
      studyId,
      studyStationId: null,
      kind: 'provisional',
      proposedMonths: 6,
      storageStatement: 'closed, at or below 25 °C',
      whyFewer: '',
      provisionalRule: 'Six months after a quiet screen.',
      reviewOn: '2027-06-01',
      periodAfterOpeningMonths: null,
      periodAfterOpeningEvidence: '',
    },
  })
}

describe('approving a protocol', () => {
  it('is written on the version and on the trail with who and when', async () => {
    const { code, versionId } = await create()
    expect((await approve(code)).status).toBe(200)
    const { body } = await call(getRoute, { cookie: formulator.cookie, params: { code } })
    expect(body.versions[0]).toMatchObject({ state: 'approved', approvedBy: qa.actor.name })
    expect(Date.parse(body.versions[0].approvedAt)).toBeGreaterThan(Date.now() - 60_000)
    const entry = await t.owner
      .selectFrom('trail')
      .select(['actorId', 'operation'])
      .where('rowId', '=', versionId)
      .orderBy('id', 'desc')
      .executeTakeFirstOrThrow()
    expect(entry).toEqual({ actorId: qa.actor.personId, operation: 'update' })
  })

  it('is for QA alone', async () => {
    const { code } = await create()
    for (const role of ['technician', 'manager', 'client'] as const)
      expect((await approve(code, await t.person(role))).status).toBe(403)
    expect((await approve(code, formulator)).status).toBe(403)
    expect((await approve('P-99')).status).toBe(404)
    expect((await approve(code, qa, 1, '2')).status).toBe(404)
  })

  it('is refused to whoever wrote on the version, whatever their roles', async () => {
    const both = await t.person(['formulator', 'qa'])
    const own = await create(both)
    const refused = await approve(own.code, both)
    expect(refused.status).toBe(403)
    expect(refused.body.error.sentence).toMatch(/^You wrote on version 1 of P-\d+, so someone else/)
    const { code, versionId } = await create()
    await call(writeRoute, {
      cookie: both.cookie,
      method: 'PUT',
      params: { code, number: '1' },
      body: { version: 1, name: 'Screen', plan: { ...plan, restHours: 3 } },
    })
    expect((await approve(code, both, 2)).status).toBe(403)
    expect((await approve(code, qa, 2)).status).toBe(200)
    const event = await t.owner
      .selectFrom('trail')
      .select('actorId')
      .where('event', '=', 'approval refused')
      .where('rowId', '=', versionId)
      .executeTakeFirst()
    expect(event?.actorId).toBe(both.actor.personId)
  })

  it('lets whoever only started a study on it approve', async () => {
    const both = await t.person(['formulator', 'qa'])
    const { code, versionId } = await create()
    batches += 1
    const batchId = await makeBatch(formulator.actor, { code: `A${batches}` })
    await call(startRoute, {
      cookie: both.cookie,
      body: {
        id: newId(),
        title: 'Screen',
        protocolVersionId: versionId,
        batchIds: [batchId],
        initialReadings: initialOf(batchId),
      },
    })
    expect((await approve(code, both, 2)).status).toBe(200)
  })

  it('is refused twice, of an older state, and of a plan that could not start', async () => {
    const { code } = await create()
    expect((await approve(code, qa, 7)).status).toBe(412)
    await approve(code)
    const again = await approve(code, qa, 2)
    expect([again.status, again.body.error.sentence]).toEqual([
      409,
      `Version 1 of ${code} is already approved. Nothing is left to do.`,
    ])
    const bare = await create(formulator, { ...plan, stations: [] })
    const refused = await approve(bare.code)
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/cannot be approved yet\. The protocol has no station/)
  })

  it('locks the plan', async () => {
    const { code } = await create()
    await approve(code)
    const changed = await call(writeRoute, {
      cookie: formulator.cookie,
      method: 'PUT',
      params: { code, number: '1' },
      body: { version: 2, name: 'Screen', plan },
    })
    expect(changed.status).toBe(409)
    expect(changed.body.error.sentence).toMatch(/^QA approved version 1/)
  })
})

describe('a study on a protocol', () => {
  it('that was not approved runs, says so, and carries no case, even if QA approves afterwards', async () => {
    const { code, versionId } = await create()
    const study = await startOn(versionId)
    await approve(code, qa, 2)
    const sheet = await call(sheetRoute, { cookie: formulator.cookie, params: { code: study.code } })
    expect(sheet.body.study.protocolApproval).toBe('not approved')
    const refused = await putCase(study.id)
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/cannot carry a signed shelf life/)
  })

  it('that was approved may carry one', async () => {
    const { code, versionId } = await create()
    await approve(code)
    const study = await startOn(versionId)
    expect((await putCase(study.id)).status).toBe(200)
  })
})
