import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { POST as amendRoute } from '@/app/api/studies/[code]/amendments/route'
import { POST as endRoute } from '@/app/api/studies/[code]/end/route'
import { GET as sheetRoute } from '@/app/api/studies/[code]/sheet/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { recomputeSeries } from '@/lib/series/commands'
import { benchStudy, type BenchStudy } from '@/tests/support/bench-study'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let formulator: Signed
let study: BenchStudy
let stations: { id: string; temperatureC: number | null }[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'UTC')
  formulator = await t.person('formulator', { name: 'Lena Brandt' })
})
beforeEach(async () => {
  // Begun four weeks and an hour ago: weeks 1 to 4 lie behind, 6 to 12 ahead.
  study = await benchStudy(t.db, formulator.actor, 4)
  stations = await t.db
    .selectFrom('studyStation')
    .select(['id', 'temperatureC'])
    .where('studyId', '=', study.studyId)
    .execute()
})
afterAll(() => t.close())

const at = (temperatureC: number) => stations.find((one) => one.temperatureC === temperatureC)!.id

function amend(body: Record<string, unknown>, by = formulator, code = study.code) {
  return call(amendRoute, {
    cookie: by.cookie,
    params: { code },
    body: { id: newId(), version: 1, reason: 'The client asks for it.', ...body },
  })
}

async function planNow(): Promise<ProtocolPlan> {
  const { plan } = await t.db
    .selectFrom('study')
    .select('plan')
    .where('id', '=', study.studyId)
    .executeTakeFirstOrThrow()
  return plan as ProtocolPlan
}

async function sheet() {
  return (await call(sheetRoute, { cookie: formulator.cookie, params: { code: study.code } })).body
}

function askedIn(studyStationId: string, week: number) {
  return t.db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('jar', 'jar.id', 'pullJar.jarId')
    .select(['pullJar.asks', 'pullJar.state', 'pullJar.missedReason', 'jar.kind', 'pull.dueOn', 'pull.label'])
    .where('pull.studyStationId', '=', studyStationId)
    .where('pull.timeWeeks', '=', week)
    .orderBy('pullJar.asks', 'desc')
    .execute()
}

describe('a time point is added', () => {
  const body = () => ({ kind: 'time point', studyStationId: at(25), week: 7 })

  it('with the watch jar and a spare to open, in the plan, on the calendar, on the sheet and on the trail', async () => {
    let answer: Awaited<ReturnType<typeof amend>> | undefined
    const { count } = await countStatements(async () => {
      answer = await amend(body())
    })
    expect(answer!.status).toBe(200)
    expect(count).toBeLessThanOrEqual(25)
    expect((await planNow()).stations[1]!.timePoints).toEqual([1, 2, 3, 4, 6, 7, 8, 10, 12])
    expect((await planNow()).stations[2]!.timePoints).toEqual([1, 2, 3, 4, 6, 8, 10, 12])
    const asked = await askedIn(at(25), 7)
    expect(asked.map(({ asks, kind, label }) => [asks, kind, label])).toEqual([
      ['watch', 'watch', 'week 7'],
      ['measuring', 'spare', 'week 7'],
    ])
    const { study: shown } = await sheet()
    expect(shown.version).toBe(2)
    expect(shown.amendments).toMatchObject([
      { number: 1, kind: 'time point', reason: 'The client asks for it.', madeBy: 'Lena Brandt' },
    ])
    expect(shown.amendments[0].sentence).toMatch(
      /^Week 7 is added at 25 °C, due on .*, one spare jar opened\.$/,
    )
    const entries = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'actorId', 'reason'])
      .where('tableName', 'in', ['study_amendment', 'study'])
      .where('reason', '=', 'The client asks for it.')
      .where((eb) => eb.or([eb('rowId', '=', study.studyId), eb('rowId', '=', answer!.body.id as string)]))
      .execute()
    expect(entries.map((one) => one.tableName).sort()).toEqual(['study', 'study_amendment'])
    expect(entries.every((one) => one.actorId === formulator.actor.personId)).toBe(true)
  })

  it('D05: sent twice it stands once', async () => {
    const id = newId()
    expect((await amend({ ...body(), id })).status).toBe(200)
    const again = await amend({ ...body(), id })
    expect(again.body).toMatchObject({ number: 1, version: 2 })
    expect((await sheet()).study.amendments).toHaveLength(1)
  })

  it('D06: the second of two at once gets 412 with who was first', async () => {
    await amend(body())
    const second = await amend({ ...body(), week: 9 })
    expect(second.status).toBe(412)
    expect(second.body.error.sentence).toContain('Lena Brandt')
  })

  it('without a spare left, with the watch jar alone', async () => {
    // Windows of two days around weekly pulls leave room for weeks 5, 7, 9 and 11; there are two spares.
    await amend({ ...body(), week: 5, version: 1 })
    await amend({ ...body(), week: 7, version: 2 })
    const refused = await amend({ ...body(), week: 9, version: 3 })
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(
      /has no spare jars left at 25 °C, and a measurement takes one jar/,
    )
    expect((await amend({ ...body(), week: 9, version: 3, isMeasured: false })).status).toBe(200)
    expect((await askedIn(at(25), 9)).map(({ asks }) => asks)).toEqual(['watch'])
  })

  it.each([
    [6, 422, /^Week 6 is already a time point at 25 °C\.$/],
    [2.5, 422, /was due on .* A time point is added ahead, never behind\.$/],
    [13, 422, /^The study ends in week 12/],
    [6.5, 422, /windows of week 6 and week 6\.5 overlap/],
    [0, 422, /./],
    [-3, 422, /./],
  ])('week %d is refused at its field', async (week, status, sentence) => {
    const refused = await amend({ ...body(), week })
    expect([refused.status, refused.body.error.sentence]).toEqual([status, expect.stringMatching(sentence)])
    expect(Object.keys(refused.body.error.fields ?? {})).toContain('week')
    expect((await sheet()).study.amendments).toEqual([])
  })

  it('a station of another study is not there', async () => {
    const [mine] = stations
    const other = await benchStudy(t.db, formulator.actor, 2)
    expect((await amend({ ...body(), studyStationId: mine!.id }, formulator, other.code)).status).toBe(404)
  })
})

describe('a retain is pulled', () => {
  async function retain() {
    const { code } = await t.db
      .selectFrom('jar')
      .select('code')
      .where('studyId', '=', study.studyId)
      .where('kind', '=', 'retain')
      .executeTakeFirstOrThrow()
    return code
  }

  it('and is spent; no series gains a reading', async () => {
    const jarCode = await retain()
    const done = await amend({ kind: 'retain', jarCode })
    expect(done.status).toBe(200)
    expect(done.body.sentence).toMatch(new RegExp(`^Retain ${jarCode} of B-\\w+ is pulled\\.$`))
    const again = await amend({ kind: 'retain', jarCode, version: 2 })
    expect([again.status, again.body.error.fields.jarCode]).toEqual([
      422,
      `Retain ${jarCode} is spent already. Choose one that is still kept.`,
    ])
  })

  it('is refused of other jars, of other studies and of what is no code', async () => {
    const watch = await t.db
      .selectFrom('jar')
      .select('code')
      .where('studyId', '=', study.studyId)
      .where('kind', '=', 'watch')
      .executeTakeFirstOrThrow()
    const refused = await amend({ kind: 'retain', jarCode: watch.code })
    expect(refused.body.error.sentence).toBe(
      `Jar ${watch.code} is a watch jar. Only a retain is pulled this way.`,
    )
    const other = await benchStudy(t.db, formulator.actor, 1)
    expect((await amend({ kind: 'retain', jarCode: await retain() }, formulator, other.code)).status).toBe(
      422,
    )
    expect((await amend({ kind: 'retain', jarCode: 'no code' })).body.error.sentence).toMatch(
      /is no jar code/,
    )
  })
})

describe('a station ends early', () => {
  const body = () => ({ kind: 'station end', studyStationId: at(45) })

  it('what lies ahead is not pulled, its jars are kept, what was read stays', async () => {
    const readings = await t.db
      .selectFrom('reading')
      .selectAll()
      .where('studyId', '=', study.studyId)
      .execute()
    const done = await amend(body())
    expect(done.status).toBe(200)
    expect((await planNow()).stations[2]!.timePoints).toEqual([1, 2, 3, 4])
    const ahead = await askedIn(at(45), 8)
    expect(ahead.map(({ state }) => state)).toEqual(['missed', 'missed'])
    expect(ahead[0]!.missedReason).toBe('Amendment 1 ended 45 °C: The client asks for it.')
    expect((await askedIn(at(25), 8)).map(({ state }) => state)).toEqual(['due', 'due'])
    const jars = await t.db
      .selectFrom('jar')
      .select(['state', 'shelf'])
      .where('studyStationId', '=', at(45))
      .execute()
    expect(jars.every((jar) => jar.state === 'kept' && jar.shelf === null)).toBe(true)
    const after = await t.db.selectFrom('reading').selectAll().where('studyId', '=', study.studyId).execute()
    expect(after).toEqual(readings)
    const page = await sheet()
    const shelf = page.shelves[0].rows.find((row: { station: { id: string } }) => row.station.id === at(45))
    expect(shelf.station.endedOn).toBe(page.study.amendments[0].madeOn)
    expect(shelf.cells.map((cell: { weeks: number }) => cell.weeks)).toEqual([0, 1, 2, 3, 4])
  })

  it('is refused twice, as the last one, and while a jar rests there', async () => {
    expect((await amend(body())).status).toBe(200)
    expect((await amend({ ...body(), version: 2 })).body.error.sentence).toMatch(
      /^45 °C ended on .* already\.$/,
    )
    const late = await amend({ kind: 'time point', studyStationId: at(45), week: 7, version: 2 })
    expect([late.status, late.body.error.sentence]).toEqual([409, expect.stringMatching(/^45 °C ended on/)])
    await transact(t.db, formulator.actor, {}, (trx) =>
      trx
        .updateTable('pullJar')
        .set({ state: 'resting' })
        .where('pullId', 'in', (eb) =>
          eb.selectFrom('pull').select('id').where('studyStationId', '=', at(25)).where('timeWeeks', '=', 4),
        )
        .where('asks', '=', 'measuring')
        .execute(),
    )
    const resting = await amend({ kind: 'station end', studyStationId: at(25), version: 2 })
    expect([resting.status, resting.body.error.sentence]).toEqual([
      409,
      expect.stringMatching(/rests at 25 °C and is not read yet/),
    ])
    expect((await amend({ kind: 'station end', studyStationId: at(5), version: 2 })).status).toBe(200)
    const last = await amend({ kind: 'station end', studyStationId: at(25), version: 3 })
    expect(last.body.error.sentence).toMatch(
      /^25 °C is the last station that still runs\. End the study instead\.$/,
    )
  })
})

describe('a tolerance changes', () => {
  const body = (below: number, above = below) => ({
    kind: 'tolerance',
    attribute: 'ph',
    tolerance: { kind: 'shift', below, above },
  })

  /** pH 5.50 at the start; at 45 °C it falls by 0.1 a week. */
  async function readPh() {
    await transact(t.db, formulator.actor, {}, async (trx) => {
      await trx
        .insertInto('reading')
        .values(
          [1, 2, 3, 4].map((week) => ({
            id: newId(),
            studyId: study.studyId,
            batchId: study.batchId,
            studyStationId: at(45),
            attribute: 'ph',
            value: 5.5 - week * 0.1,
            typed: (5.5 - week * 0.1).toFixed(2),
            measuredAt: new Date(Date.parse(study.startedAt) + week * 604_800_000).toISOString(),
            recordedBy: formulator.actor.personId,
          })),
        )
        .execute()
      await recomputeSeries(trx, formulator.actor, study.studyId)
    })
  }
  const seriesAt45 = () =>
    t.db
      .selectFrom('series')
      .select(['used', 'finding'])
      .where('studyStationId', '=', at(45))
      .where('attribute', '=', 'ph')
      .executeTakeFirstOrThrow()

  it('and the series is judged anew from the same readings in the same save', async () => {
    await readPh()
    // 0.40 of 0.50, then 0.40 of 0.80.
    expect((await seriesAt45()).used).toBeCloseTo(0.8, 6)
    const readings = await t.db
      .selectFrom('reading')
      .selectAll()
      .where('studyId', '=', study.studyId)
      .execute()
    const done = await amend(body(0.8))
    expect(done.body.sentence).toBe(
      'pH may be within 0.8 from the initial; before it was within 0.5 from the initial.',
    )
    const { used, finding } = await seriesAt45()
    expect(used).toBeCloseTo(0.5, 6)
    expect((finding as { band: { lower: number } }).band.lower).toBeCloseTo(4.7, 6)
    expect(
      await t.db.selectFrom('reading').selectAll().where('studyId', '=', study.studyId).execute(),
    ).toEqual(readings)
    const kept = await t.db
      .selectFrom('studyAmendment')
      .select(['before', 'after'])
      .where('studyId', '=', study.studyId)
      .executeTakeFirstOrThrow()
    expect(kept.before).toMatchObject({ tolerance: { below: 0.5 } })
    expect(kept.after).toMatchObject({ tolerance: { below: 0.8 } })
    const flags = await t.db
      .selectFrom('flag')
      .select(['state', 'closingNote'])
      .where('studyId', '=', study.studyId)
      .where('rule', '=', 'edge')
      .execute()
    expect(flags).toEqual([
      { state: 'closed', closingNote: 'Amendment 1 changed the tolerance; the readings are the same.' },
    ])
  })

  it.each([
    [{ tolerance: { kind: 'shift', below: 0.5, above: 0.5 } }, 422, /^pH may already be within 0\.5/],
    [
      { tolerance: { kind: 'range', lower: 5.6, upper: 6 } },
      409,
      /^The initial of B-\w+ is 5\.50, outside 5\.60 to 6\.00/,
    ],
    [
      { tolerance: { kind: 'range', lower: 6, upper: 5 } },
      422,
      /^The lower limit must lie under the upper one/,
    ],
    [{ tolerance: { kind: 'shift' } }, 422, /./],
    [{ attribute: 'odour' }, 409, /^Odour is not measured in this study/],
    [{ attribute: 'taste' }, 422, /./],
    [{ reason: '  ' }, 422, /./],
  ])('%j is refused', async (change, status, sentence) => {
    const refused = await amend({ ...body(0.8), ...change })
    expect([refused.status, refused.body.error.sentence]).toEqual([status, expect.stringMatching(sentence)])
    expect((await sheet()).study.amendments).toEqual([])
    expect((await planNow()).attributes[1]!.tolerance).toEqual({ kind: 'shift', below: 0.5, above: 0.5 })
  })
})

describe('amending', () => {
  const body = () => ({ kind: 'time point', studyStationId: at(25), week: 7 })

  it('is for formulators alone', async () => {
    for (const role of ['technician', 'qa', 'manager', 'client'] as const)
      expect([role, (await amend(body(), await t.person(role))).status]).toEqual([role, 403])
    expect((await amend(body(), formulator, 'S-999')).status).toBe(404)
  })

  it('is over when the study has ended', async () => {
    await call(endRoute, {
      cookie: formulator.cookie,
      params: { code: study.code },
      body: { version: 1, reason: 'Done.' },
    })
    const refused = await amend({ ...body(), version: 2 })
    expect(refused.status).toBe(409)
    expect(refused.body.error.sentence).toMatch(/has ended, so nothing of it can be amended/)
  })

  it('is never taken back: the row refuses update and delete', async () => {
    await amend(body())
    const change = transact(t.db, formulator.actor, {}, (trx) =>
      trx.updateTable('studyAmendment').set({ reason: 'another' }).execute(),
    )
    await expect(change).rejects.toThrow()
    await expect(t.db.deleteFrom('studyAmendment').execute()).rejects.toThrow()
  })

  it('the sheet still takes eight statements', async () => {
    await amend(body())
    const { count } = await countStatements(() => sheet())
    expect(count).toBeLessThanOrEqual(8)
  })
})
