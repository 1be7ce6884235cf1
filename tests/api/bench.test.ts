import { createElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as day } from '@/app/api/bench/route'
import { GET as jarPage } from '@/app/api/bench/[code]/route'
import { POST as mishap } from '@/app/api/jars/[code]/mishaps/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as open } from '@/app/api/pulls/[id]/open/route'
import { DonePanel } from '@/components/bench/done-panel'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { Bench } from '@/lib/bench/queries/today'
import { newId } from '@/lib/db/id'
import {
  askedJars,
  benchStudy,
  jarAt,
  layered,
  measured,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let technician: Signed
let client: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  client = await t.person('client')
  const formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 2)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

const today = async (query: Record<string, string> = {}): Promise<Bench> => {
  const answer = await call(day, { cookie: technician.cookie, query })
  expect(answer.status).toBe(200)
  return answer.body
}
const all = (bench: Bench): BenchJar[] => bench.stations.flatMap((station) => station.jars)

describe("today's Bench", () => {
  it('lists what is due by station in walking order, the overdue first', async () => {
    const bench = await today()
    expect(bench.stations.map((station) => station.temperatureC)).toEqual([5, 25, 45])
    expect(bench.counts).toMatchObject({ total: 12, due: 12, done: 0, overdue: 6 })
    const hot = bench.stations[2]!
    expect(hot.caution).toMatch(/Hot glass/)
    expect(hot.jars.map((jar) => jar.label).slice(0, 2)).toEqual(['week 1', 'week 1'])
    expect(hot.jars[0]!.isOverdue).toBe(true)
    expect(hot.next!.count).toBe(2)
  })

  it('gives each jar its place and its fields with method, band and initial', async () => {
    const jar = all(await today()).find((one) => one.asks === 'measuring')!
    expect(jar.name).toBe(`5·${jar.code}`)
    expect(jar.shelf).toBeGreaterThan(0)
    expect(jar.fields.map((field) => field.attribute)).toEqual(['ph', 'viscosity'])
    expect(jar.fields[0]).toMatchObject({
      initial: 5.5,
      band: { lower: 5, upper: 6 },
      last: [],
      method: 'direct',
    })
    expect(jar.fields[1]).toMatchObject({
      viscosity: { spindle: 'disc 4', spindleConstant: 2000, rpm: 20 },
      band: { lower: 5200, upper: 7800 },
    })
  })

  it('shows who has a jar open, and what was read with its layers and the last value', async () => {
    const watch = jarAt(jars, 45, 1, 'watch')
    const opened = jarAt(jars, 25, 1)
    await call(open, { cookie: technician.cookie, params: { id: opened.pullJarId }, body: { version: 1 } })
    await call(log, {
      cookie: technician.cookie,
      params: { id: watch.pullJarId },
      body: layered(study, watch, 0.6, 0.3),
    })
    const bench = await today()
    expect(bench.counts).toMatchObject({ total: 12, done: 1, due: 11 })
    const at = (pullJarId: string) => all(bench).find((jar) => jar.pullJarId === pullJarId)!
    expect(at(opened.pullJarId).openedBy).toMatchObject({ name: technician.actor.name })
    expect(at(watch.pullJarId)).toMatchObject({
      state: 'done',
      layers: { topPercent: 1, bottomPercent: 0.5 },
      closedBy: { name: technician.actor.name },
    })
    const next = at(jarAt(jars, 45, 2, 'watch').pullJarId)
    expect(next.fields[0]!.last[0]).toMatchObject({ value: 1.5, by: technician.actor.initials })
    expect(next.fields[0]!.last[0]!.detail).toMatchObject({ topMm: 0.6, bottomMm: 0.3 })
  })

  it('on a day with nothing due says when the next is', async () => {
    const bench = await today({ today: '2020-01-01' })
    expect(bench.counts.total).toBe(0)
    expect(bench.next).not.toBeNull()
  })

  it('refuses a day that is none and a client', async () => {
    expect((await call(day, { cookie: technician.cookie, query: { today: 'soon' } })).status).toBe(422)
    expect((await call(day, { cookie: client.cookie })).status).toBe(403)
  })
})

describe("a jar's own screen", () => {
  it('is called up by code, by label and by address, with the last three values and the instruments', async () => {
    for (const week of [1, 2]) {
      const jar = jarAt(jars, 5, week)
      await call(log, {
        cookie: technician.cookie,
        params: { id: jar.pullJarId },
        body: measured(study, jar, { ph: week === 1 ? '5.51' : '5,52' }),
      })
    }
    const next = jarAt(jars, 5, 3)
    for (const code of [next.code, next.code.toLowerCase(), `5·${next.code}`]) {
      const { body, status } = await call(jarPage, { cookie: technician.cookie, params: { code } })
      expect(status).toBe(200)
      expect(body).toMatchObject({ pullJarId: next.pullJarId, isEarly: true, station: { temperatureC: 5 } })
      expect(body.fields[0].last.map((value: { typed: string }) => value.typed)).toEqual(['5,52', '5.51'])
      expect(body.instruments).toHaveLength(2)
    }
  })

  it('shows a jar that was read with its readings, and says what an unknown code is', async () => {
    const read = jarAt(jars, 5, 1)
    const { body } = await call(jarPage, { cookie: technician.cookie, params: { code: read.code } })
    expect(body.state).toBe('done')
    expect(body.readings).toHaveLength(2)
    const unknown = await call(jarPage, { cookie: technician.cookie, params: { code: 'ZZZZZ' } })
    expect(unknown.status).toBe(404)
    expect(unknown.body.error.sentence).toMatch(/No jar has the code ZZZZZ/)
  })

  describe('of a wrong jar says which one it is and where it belongs', () => {
    const own = () =>
      t.db
        .selectFrom('jar')
        .innerJoin('study', 'study.id', 'jar.studyId')
        .innerJoin('batch', 'batch.id', 'jar.batchId')
        .leftJoin('studyStation as ss', 'ss.id', 'jar.studyStationId')
        .leftJoin('station', 'station.id', 'jar.stationId')
        .select(['jar.id', 'jar.code', 'jar.shelf', 'jar.place', 'station.name as station'])
        .select(['study.code as study', 'study.title', 'batch.code as batch', 'ss.temperatureC'])
        .where('jar.studyId', '=', study.studyId)
        .orderBy('jar.code')
    const says = async (code: string) => {
      const { status, body } = await call(jarPage, { cookie: technician.cookie, params: { code } })
      expect(status).toBe(404)
      return body.error.sentence as string
    }

    it('a spare at its place', async () => {
      const jar = await own()
        .where('jar.kind', '=', 'spare')
        .where('ss.temperatureC', '=', 45)
        .executeTakeFirstOrThrow()
      expect(await says(jar.code)).toBe(
        `Jar 45·${jar.code} is a spare of batch ${jar.batch} in study ${jar.study}, ${jar.title}. It belongs on shelf ${jar.shelf}, place ${jar.place} of ${jar.station}, and is read only where a repeat or a missing jar calls for it.`,
      )
    })

    it('a retain jar, and one that was opened at the start', async () => {
      const retain = await own().where('jar.kind', '=', 'retain').executeTakeFirstOrThrow()
      expect(await says(retain.code)).toMatch(
        /^Jar \w{5} is a retain jar of batch .*\. It belongs in the retain/,
      )
      const first = await own()
        .where('jar.state', '=', 'spent')
        .where('jar.studyStationId', 'is', null)
        .executeTakeFirstOrThrow()
      expect(await says(first.code)).toMatch(/is a measuring jar .*\. It was opened and is spent\.$/)
    })

    it('a spare that broke, with the day', async () => {
      const spare = await own()
        .where('jar.kind', '=', 'spare')
        .where('ss.temperatureC', '=', 25)
        .executeTakeFirstOrThrow()
      const now = new Date().toISOString()
      const body = { id: newId(), kind: 'broken', reason: 'fell', claimedAt: now, deviceNow: now }
      const noted = await call(mishap, { cookie: technician.cookie, params: { code: spare.code }, body })
      expect(noted.status, JSON.stringify(noted.body)).toBe(200)
      expect(await says(spare.code)).toMatch(/\. It was noted as broken on \d+ \w{3} \d{4}\.$/)
    })

    it('one whose day has not come opens, and gives its next day and its place', async () => {
      const next = jarAt(jars, 45, 3)
      const { body } = await call(jarPage, { cookie: technician.cookie, params: { code: next.code } })
      expect(body).toMatchObject({ isEarly: true, shelf: expect.any(Number), place: expect.any(Number) })
      const shown = renderToStaticMarkup(
        createElement(DonePanel, {
          ...{ jar: body, personId: '', mayLog: true, next: null },
          ...{ onChange() {}, onWalk() {}, onOpen() {} },
        }),
      )
      expect(shown).toContain(
        `It belongs on shelf ${body.shelf}, place ${body.place} of ${body.station.name}.`,
      )
    })
  })
})

describe('statements', () => {
  it('the Bench and a jar take at most 8 each', async () => {
    const bench = await countStatements(() => today())
    expect(bench.count, bench.texts.join('\n')).toBeLessThanOrEqual(8)
    const { code } = jarAt(jars, 45, 2)
    const page = await countStatements(() => call(jarPage, { cookie: technician.cookie, params: { code } }))
    expect(page.count, page.texts.join('\n')).toBeLessThanOrEqual(8)
  })
})
