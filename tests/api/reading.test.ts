import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { GET as list } from '@/app/api/readings/route'
import { GET as history } from '@/app/api/readings/[id]/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { POST as voidIt } from '@/app/api/readings/[id]/void/route'
import { newId } from '@/lib/db/id'
import { sql } from 'kysely'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import {
  askedJars,
  jarAt,
  layered,
  measured,
  benchStudy,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'

let t: TestDatabase
let technician: Signed
let second: Signed
let formulator: Signed
let study: BenchStudy
let jars: AskedJar[]

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  second = await t.person('technician')
  formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 12)
  jars = await askedJars(t.db, study.studyId)
})
afterAll(() => t.close())

const send = (jar: AskedJar, body: unknown, cookie = technician.cookie, key?: string) =>
  call(log, { cookie, params: { id: jar.pullJarId }, body, ...(key ? { key } : {}) })

describe('R08: what was typed survives', () => {
  it('keeps "5,60" and "1.50E4" letter by letter and reads both', async () => {
    const jar = jarAt(jars, 5, 1)
    const body = measured(study, jar, { ph: '5,60', torque: null })
    const viscosity = { id: newId(), attribute: 'viscosity', typed: '6.60E3', isConfirmed: true }
    const answer = await send(jar, { ...body, readings: [...body.readings, viscosity] })
    expect(answer.body).toMatchObject({ state: 'done' })
    const rows = await t.db
      .selectFrom('reading')
      .select(['typed', 'value'])
      .where('pullJarId', '=', jar.pullJarId)
      .orderBy('value')
      .execute()
    expect(rows).toEqual([
      { typed: '5,60', value: 5.6 },
      { typed: '6.60E3', value: 6600 },
    ])
  })
})

describe('R11: what cannot be is refused at its field', () => {
  const refused: [string, (jar: AskedJar) => object, string, RegExp][] = [
    ['pH 72', (jar) => measured(study, jar, { ph: '72' }), 'readings.0.typed', /pH runs from 0 to 14/],
    [
      'pH that slipped',
      (jar) => measured(study, jar, { ph: '54.1' }),
      'readings.0.typed',
      /perhaps the point slipped/,
    ],
    ['no number', (jar) => measured(study, jar, { ph: 'five' }), 'readings.0.typed', /is a number/],
    [
      'torque 0',
      (jar) => measured(study, jar, { torque: '0' }),
      'readings.1.typed',
      /Torque runs from 0 to 100/,
    ],
    [
      'viscosity 0',
      (jar) => ({
        ...measured(study, jar, { ph: null, torque: null }),
        readings: [{ id: newId(), attribute: 'viscosity', typed: '0' }],
      }),
      'readings.0.typed',
      /above 0/,
    ],
    [
      'an unknown spindle',
      (jar) => ({
        ...measured(study, jar, { ph: null, torque: null }),
        readings: [
          {
            id: newId(),
            attribute: 'viscosity',
            typed: '40',
            detail: { torquePercent: 40, spindle: 'disc 9', rpm: 20 },
          },
        ],
      }),
      'readings.0.detail.spindle',
      /not known/,
    ],
  ]
  it.each(refused)('%s', async (_name, body, field, sentence) => {
    const answer = await send(jarAt(jars, 25, 1), body(jarAt(jars, 25, 1)))
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields[field]).toMatch(sentence)
  })

  it('layers above the fill height', async () => {
    const jar = jarAt(jars, 25, 1, 'watch')
    const one = await send(jar, layered(study, jar, 61, 0))
    expect(one.body.error.fields['readings.0.detail.topMm']).toMatch(
      /cannot be 61 mm high in a fill of 60 mm/,
    )
    const both = await send(jar, layered(study, jar, 40, 30))
    expect(both.status).toBe(422)
    expect(both.body.error.fields['readings.0.detail.bottomMm']).toMatch(/Both layers together/)
  })

  it('asks about what is merely unlikely, and takes it as a doubt once confirmed', async () => {
    const jar = jarAt(jars, 25, 1)
    const body = measured(study, jar, { ph: '5.52', torque: '7.4' })
    const asked = await send(jar, body)
    expect(asked.status).toBe(409)
    expect(asked.body.error.code).toBe('confirm')
    expect(asked.body.error.fields['readings.1.typed']).toMatch(/Torque is 7.4 %/)
    const sure = { ...body, readings: body.readings.map((reading) => ({ ...reading, isConfirmed: true })) }
    const kept = await send(jar, sure)
    expect(kept.status).toBe(200)
    const flags = await t.db
      .selectFrom('flag')
      .select(['rule', 'level'])
      .where('readingId', '=', sure.readings[1]!.id)
      .execute()
    expect(flags).toContainEqual({ rule: 'torque', level: 'doubt' })
    const series = kept.body.series.find(
      (s: { attribute: string; latest: number }) => s.attribute === 'viscosity' && s.latest !== null,
    )
    expect(series?.latest).not.toBe(740)
  })

  it('asks for what was forgotten, and takes its absence once said', async () => {
    const jar = jarAt(jars, 45, 1)
    const body = measured(study, jar, { torque: null })
    const asked = await send(jar, body)
    expect(asked.body.error.fields['missing.viscosity']).toMatch(/not read yet/)
    expect((await send(jar, { ...body, leaveOut: ['viscosity'] })).status).toBe(200)
  })
})

describe('R06: server time decides', () => {
  const hours = (from: string, to: string) => (Date.parse(from) - Date.parse(to)) / 3_600_000
  const at = async (pullJarId: string) =>
    t.db
      .selectFrom('reading')
      .select(['measuredAt', 'recordedAt', 'claimedAt'])
      .select((eb) => eb.ref('detail').$castTo<{ clock?: { skewSeconds: number } }>().as('detail'))
      .where('pullJarId', '=', pullJarId)
      .where('attribute', '=', 'ph')
      .executeTakeFirstOrThrow()

  it.each([
    ['three days fast', 3 * 86_400_000],
    ['three days slow', -3 * 86_400_000],
  ])('a clock %s is corrected and marked', async (_name, off) => {
    const jar = jarAt(jars, 5, off > 0 ? 2 : 3)
    const device = Date.now() + off
    const body = {
      ...measured(study, jar),
      deviceNow: new Date(device).toISOString(),
      claimedAt: new Date(device - 2 * 3_600_000).toISOString(),
    }
    expect((await send(jar, body)).status).toBe(200)
    const row = await at(jar.pullJarId)
    expect(Math.abs(hours(row.recordedAt, new Date().toISOString()))).toBeLessThan(0.1)
    expect(hours(row.recordedAt, row.measuredAt)).toBeCloseTo(2, 1)
    expect(row.claimedAt).toBe(body.claimedAt)
    expect(row.detail.clock?.skewSeconds).toBeCloseTo(-off / 1000, -2)
  })

  it('an entry from the future is never later than its record, and a good clock is not marked', async () => {
    const jar = jarAt(jars, 5, 4)
    await send(jar, { ...measured(study, jar), claimedAt: new Date(Date.now() + 5_000).toISOString() })
    const row = await at(jar.pullJarId)
    expect(row.measuredAt <= row.recordedAt).toBe(true)
    expect(row.detail.clock).toBeUndefined()
  })
})

describe('corrections', () => {
  let id: string
  beforeAll(async () => {
    const jar = jarAt(jars, 25, 2)
    const body = measured(study, jar, { ph: '5.40' })
    await send(jar, body)
    id = body.readings[0]!.id
  })

  it.each(['', '   '])('R03: a correction or void with reason "%s" is refused', async (reason) => {
    for (const [route, body] of [
      [correct, { id: newId(), typed: '5.41', reason }],
      [voidIt, { id: newId(), reason }],
    ] as const) {
      const answer = await call(route, { cookie: technician.cookie, params: { id }, body })
      expect(answer.status).toBe(422)
      expect(answer.body.error.fields.reason).toMatch(/Say why/)
    }
    const without = await call(voidIt, { cookie: technician.cookie, params: { id }, body: { id: newId() } })
    expect(without.status).toBe(422)
  })

  it('R02, R03: two corrections hide nothing, and each says why on the trail', async () => {
    const [first, next] = [newId(), newId()]
    const one = await call(correct, {
      cookie: technician.cookie,
      params: { id },
      body: { id: first, typed: '5.45', reason: 'read from the wrong line' },
    })
    expect(one.status).toBe(200)
    const two = await call(correct, {
      cookie: formulator.cookie,
      params: { id: first },
      body: { id: next, typed: '5,48', reason: 'second buffer' },
    })
    expect(two.status).toBe(200)
    const chain = await call(history, { cookie: technician.cookie, params: { id: first } })
    expect(chain.body.map((v: { typed: string; isCurrent: boolean }) => [v.typed, v.isCurrent])).toEqual([
      ['5.40', false],
      ['5.45', false],
      ['5,48', true],
    ])
    const trail = await t.db
      .selectFrom('trail')
      .select(['reason', 'requestId'])
      .where('rowId', '=', next)
      .execute()
    expect(trail).toHaveLength(1)
    expect(trail[0]!.reason).toBe('second buffer')
    const { latestValue } = await t.db
      .selectFrom('series')
      .innerJoin('studyStation as ss', 'ss.id', 'series.studyStationId')
      .select('latestValue')
      .where('series.studyId', '=', study.studyId)
      .where('ss.temperatureC', '=', 25)
      .where('attribute', '=', 'ph')
      .executeTakeFirstOrThrow()
    expect(latestValue).toBeCloseTo(5.48)
    const all = await call(list, { cookie: technician.cookie, query: { study: study.code, attribute: 'ph' } })
    const here = all.body.filter(
      (r: { timeWeeks: number; temperatureC: number }) => r.timeWeeks === 2 && r.temperatureC === 25,
    )
    expect(here).toHaveLength(3)
  })

  it('D06: the second of two editors gets 412 with who and what', async () => {
    const answer = await call(correct, {
      cookie: formulator.cookie,
      params: { id },
      body: { id: newId(), typed: '5.44', reason: 'late' },
    })
    expect(answer.status).toBe(412)
    expect(answer.body.error.sentence).toContain(technician.actor.name)
    expect(answer.body.error.sentence).toContain('read from the wrong line')
  })

  it('another technician may not, nor its author on a later day', async () => {
    const jar = jarAt(jars, 25, 3)
    const body = measured(study, jar)
    await send(jar, body)
    const reading = body.readings[0]!.id
    const other = await call(voidIt, {
      cookie: second.cookie,
      params: { id: reading },
      body: { id: newId(), reason: 'mine' },
    })
    expect(other.status).toBe(403)
    const old = newId()
    await t.owner.transaction().execute(async (trx) => {
      await sql`select set_config('app.actor_id', ${technician.actor.personId}, true)`.execute(trx)
      await sql`insert into reading (id, study_id, batch_id, attribute, value, typed, measured_at, recorded_at, recorded_by)
        values (${old}, ${study.studyId}, ${study.batchId}, 'separation', 0, '0', now() - interval '2 days',
          now() - interval '2 days', ${technician.actor.personId})`.execute(trx)
    })
    const late = await call(voidIt, {
      cookie: technician.cookie,
      params: { id: old },
      body: { id: newId(), reason: 'late' },
    })
    expect(late.status).toBe(403)
    expect(late.body.error.sentence).toMatch(/day of this entry is over/)
    const any = await call(voidIt, {
      cookie: formulator.cookie,
      params: { id: old },
      body: { id: newId(), reason: 'ghost' },
    })
    expect(any.status).toBe(200)
  })
})

describe('R04: readings are append-only for the application', () => {
  it.each([
    'update reading set value = 1',
    'delete from reading',
    'truncate reading',
    'alter table reading add column x integer',
    'alter table reading disable trigger all',
    'update photo set bytes = 1',
    'delete from flag_comment',
  ])('%s', async (statement) => {
    await expect(sql.raw(statement).execute(t.db)).rejects.toMatchObject({ code: '42501' })
  })
})

describe('R10: the order of steps is enforced', () => {
  it('refuses a reading and a correction after closing, changes nothing and keeps the attempt on the trail', async () => {
    const closed = await benchStudy(t.db, formulator.actor, 3)
    const asked = await askedJars(t.db, closed.studyId)
    const read = jarAt(asked, 5, 1)
    const kept = measured(closed, read)
    expect((await send(read, kept)).status).toBe(200)
    await t.owner.transaction().execute(async (trx) => {
      await sql`select set_config('app.actor_id', ${formulator.actor.personId}, true)`.execute(trx)
      await trx.updateTable('study').set({ state: 'closed' }).where('id', '=', closed.studyId).execute()
    })
    const before = await counts()
    const late = jarAt(asked, 5, 2)
    const answer = await send(late, measured(closed, late))
    expect(answer.status).toBe(409)
    expect(answer.body.error.sentence).toContain('is closed')
    const change = await call(correct, {
      cookie: formulator.cookie,
      params: { id: kept.readings[0]!.id },
      body: { id: newId(), typed: '5.49', reason: 'late' },
    })
    expect(change.status).toBe(409)
    const after = await counts()
    expect(after.readings).toBe(before.readings)
    expect(after.refused).toBe(before.refused + 2)
  })

  async function counts() {
    const readings = await t.db
      .selectFrom('reading')
      .select(({ fn }) => fn.countAll<number>().as('n'))
      .executeTakeFirstOrThrow()
    const refused = await t.db
      .selectFrom('trail')
      .select(({ fn }) => fn.countAll<number>().as('n'))
      .where('event', '=', 'refused')
      .executeTakeFirstOrThrow()
    return { readings: readings.n, refused: refused.n }
  }
})
