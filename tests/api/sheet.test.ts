import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as curvesRoute } from '@/app/api/studies/[code]/curves/route'
import { GET as readingsRoute } from '@/app/api/studies/[code]/readings/route'
import { GET as seriesRoute } from '@/app/api/studies/[code]/series/route'
import { GET as sheetRoute } from '@/app/api/studies/[code]/sheet/route'
import { GET as listRoute, POST as startRoute } from '@/app/api/studies/route'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { findTopic } from '@/lib/science/calc/topics'
import { recomputeSeries } from '@/lib/series/commands'
import type { Cell } from '@/lib/study/rules/cells'
import { call } from '@/tests/support/call'
import { testDatabase, type Signed, type TestDatabase } from '@/tests/support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '@/tests/support/running-study'
import { countStatements } from '@/tests/support/statements'

let t: TestDatabase
let formulator: Signed
let technician: Signed
let study: { id: string; code: string; batchId: string }

const weekMs = 604_800_000
const startedAt = new Date(Date.now() - 6.2 * weekMs).toISOString()

beforeAll(async () => {
  t = await testDatabase()
  await t.lab('Test lab', 'Europe/Berlin')
  formulator = await t.person('formulator')
  technician = await t.person('technician')
  await makeStations(formulator.actor)
  study = await start('N86-2')
  await readAll(study, (temperatureC, week) => (temperatureC === 45 ? Math.max(0, (week - 3) * 4) : 0))
})
afterAll(() => t.close())

async function start(batchCode: string) {
  const batchId = await makeBatch(formulator.actor, { code: batchCode })
  const body = {
    id: newId(),
    title: 'Screen',
    protocolVersionId: await makeProtocol(formulator.actor),
    batchIds: [batchId],
    startedAt,
    initialReadings: initialOf(batchId),
  }
  const answer = await call(startRoute, { cookie: formulator.cookie, body })
  expect(answer.body.error).toBeUndefined()
  return { id: body.id, code: answer.body.code as string, batchId }
}

type Model = (temperatureC: number | null, week: number) => number

/** Reads the watch jars of every pull so far, and pH from week to week, as a technician would have. */
async function readAll(one: typeof study, separation: Model) {
  const asked = await t.db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('studyStation', 'studyStation.id', 'pull.studyStationId')
    .select(['pullJar.id', 'pullJar.jarId', 'pullJar.asks', 'pull.timeWeeks', 'pull.studyStationId'])
    .select('studyStation.temperatureC')
    .where('pullJar.studyId', '=', one.id)
    .where('pull.timeWeeks', '<=', 6)
    .orderBy('pull.timeWeeks')
    .execute()
  await transact(t.db, technician.actor, {}, async (trx) => {
    await trx
      .insertInto('reading')
      .values(
        asked.map((jar) => {
          const percent = separation(jar.temperatureC, jar.timeWeeks)
          const isWatch = jar.asks === 'watch'
          return {
            id: newId(),
            studyId: one.id,
            batchId: one.batchId,
            studyStationId: jar.studyStationId,
            pullJarId: jar.id,
            jarId: jar.jarId,
            attribute: isWatch ? 'separation' : 'ph',
            value: isWatch ? percent : 5.6,
            typed: isWatch ? `below ${percent * 0.4} mm` : '5,60',
            detail: JSON.stringify(isWatch ? { topMm: 0, bottomMm: percent * 0.4, totalMm: 40 } : {}),
            measuredAt: new Date(Date.parse(startedAt) + jar.timeWeeks * weekMs).toISOString(),
            recordedBy: technician.actor.personId,
          }
        }),
      )
      .execute()
    for (const jar of asked) {
      await trx.updateTable('pullJar').set({ state: 'done' }).where('id', '=', jar.id).execute()
    }
    await recomputeSeries(trx, technician.actor, one.id)
  })
}

const sheetOf = async (code: string, who = formulator) =>
  call(sheetRoute, { cookie: who.cookie, params: { code } })

describe('the sheet', () => {
  it('takes at most 8 statements, whatever the number of jars, readings and studies', async () => {
    const few = await countStatements(() => sheetOf(study.code))
    expect(few.count).toBeLessThanOrEqual(8)
    const more = await start('N86-3')
    await readAll(more, () => 0)
    const many = await countStatements(() => sheetOf(study.code))
    expect(many.count).toBe(few.count)
  })

  it('the curves take at most 8 statements too', async () => {
    const { count } = await countStatements(() =>
      call(curvesRoute, { cookie: formulator.cookie, params: { code: study.code } }),
    )
    expect(count).toBeLessThanOrEqual(8)
  })

  it('hangs the hottest station first and cycles at the foot, a cell for the initial and each pull', async () => {
    const { body } = await sheetOf(study.code)
    const rows = body.shelves[0].rows as { station: { temperatureC: number | null }; cells: Cell[] }[]
    expect(rows.map((row) => row.station.temperatureC)).toEqual([45, 40, 25, 5, null])
    expect(rows.map((row) => row.cells.length)).toEqual([10, 10, 10, 10, 6])
    const hot = rows[0]!.cells
    expect(hot[0]).toMatchObject({ weeks: 0, state: 'read', separationPercent: 0 })
    // 12 % of 40 mm are 4.8 mm of water below, and nothing on top.
    const week6 = hot.find((cell) => cell.weeks === 6)!
    expect(week6).toMatchObject({ state: 'read', separationPercent: 12, topPercent: 0, label: '12.0' })
    expect(week6.bottomPercent).toBeCloseTo(12, 9)
    expect(hot.find((cell) => cell.weeks === 8)).toMatchObject({ state: 'planned', separationPercent: null })
    const ph = week6.values.find((value) => value.attribute === 'ph')!
    expect(ph).toMatchObject({ text: '5.60', isOut: false })
    expect(ph.initial).toBeCloseTo(5.61, 9)
    const separation = week6.values.find((value) => value.attribute === 'separation')!
    expect(separation).toMatchObject({ now: 12, last: 8, isOut: true })
  })

  it('never calls a study steady whose reading lies beyond its band', async () => {
    const { body } = await sheetOf(study.code)
    const headline = body.finding.headline.map((phrase: { text: string }) => phrase.text).join('')
    expect(headline).toMatch(/45 °C/)
    expect(headline).not.toMatch(/^Steady/)
    expect(body.flags.length).toBeGreaterThan(0)
  })

  it('shows the worst shelf in the ledger, and finds a study by the code of one of its jars', async () => {
    const jar = await t.db
      .selectFrom('jar')
      .select('code')
      .where('studyId', '=', study.id)
      .limit(1)
      .executeTakeFirstOrThrow()
    const { body } = await call(listRoute, {
      cookie: formulator.cookie,
      query: { q: jar.code.toLowerCase() },
    })
    expect(body.rows).toHaveLength(1)
    expect(body.rows[0]).toMatchObject({ code: study.code, station: { temperatureC: 45 } })
    const none = await call(listRoute, { cookie: formulator.cookie, query: { q: '%_%' } })
    expect(none.body.rows).toEqual([])
  })

  it('takes the ledger in the same number of statements for one study and for many', async () => {
    const list = () => call(listRoute, { cookie: formulator.cookie })
    const before = await countStatements(list)
    await start('N86-4')
    const after = await countStatements(list)
    expect(after.count).toBe(before.count)
  })

  it('is 404 for what is not there, with a sentence', async () => {
    const answer = await sheetOf('S-999')
    expect(answer.status).toBe(404)
    expect(answer.body.error.sentence).toMatch(/nothing at this address/)
  })
})

describe('what a series is computed from', () => {
  /** Separation at the hottest station, which has used the most of its band. */
  const worst = () =>
    t.db
      .selectFrom('series')
      .select(['studyStationId', 'standing', 'used', 'leavesAtWeeks as leavesAt'])
      .where('studyId', '=', study.id)
      .where('attribute', '=', 'separation')
      .where('used', 'is not', null)
      .orderBy('used', 'desc')
      .limit(1)
      .executeTakeFirstOrThrow()
  const factsOf = async (attribute: string, who = formulator) =>
    call(seriesRoute, {
      cookie: who.cookie,
      params: { code: study.code },
      query: { batchId: study.batchId, studyStationId: (await worst()).studyStationId, attribute },
    })

  it('formula, inputs and sources, and through calc where the series stands', async () => {
    const { body } = await factsOf('separation')
    const { studyStationId: _, ...kept } = await worst()
    expect(body.result.toLowerCase()).toBe(kept.standing)
    expect(body.formula.length).toBeGreaterThan(0)
    const says = body.inputs.map((input: { says: string }) => input.says)
    expect(says).toEqual(
      expect.arrayContaining(['band', 'band used', 'repeatability SD, s', 'rules that fired']),
    )
    expect(body.sources.map((source: { mark: string }) => source.mark)).toContain('memory')
    const topic = await findTopic(body.recheck.topic)
    expect(topic!.run(body.recheck.input)).toMatchObject(kept)
  })

  it('is refused for what is no attribute, and not there for a client without the study', async () => {
    expect((await factsOf('colour of the moon')).status).toBe(422)
    expect((await factsOf('separation', await t.person('client'))).status).toBe(404)
  })
})

describe('the readings of a study', () => {
  it('R02: corrected twice, all three stand in order and the last one counts', async () => {
    const first = await t.db
      .selectFrom('reading')
      .selectAll()
      .where('studyId', '=', study.id)
      .where('attribute', '=', 'ph')
      .where('pullJarId', 'is not', null)
      .limit(1)
      .executeTakeFirstOrThrow()
    const correct = async (supersedesId: string, value: number, reason: string) => {
      const id = newId()
      await transact(t.db, technician.actor, { reason }, (trx) =>
        trx
          .insertInto('reading')
          .values({
            ...first,
            id,
            value,
            typed: String(value),
            detail: '{}',
            doubts: '[]',
            supersedesId,
            reason,
            recordedAt: undefined,
          })
          .execute(),
      )
      return id
    }
    const second = await correct(first.id, 5.7, 'A digit slipped.')
    const third = await correct(second, 5.65, 'Read again from the display.')
    const { body } = await call(readingsRoute, { cookie: technician.cookie, params: { code: study.code } })
    const chain = body.rows.find((one: { current: { id: string } }) => one.current.id === third)
    expect(chain.entries.map((entry: { typed: string }) => entry.typed)).toEqual(['5,60', '5.7', '5.65'])
    expect(chain.entries.map((entry: { reason: string | null }) => entry.reason)).toEqual([
      null,
      'A digit slipped.',
      'Read again from the display.',
    ])
  })
})
