import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { GET as list } from '@/app/api/flags/route'
import { GET as one } from '@/app/api/flags/[number]/route'
import { POST as answer } from '@/app/api/flags/[number]/answer/route'
import { POST as close } from '@/app/api/flags/[number]/close/route'
import { POST as comment } from '@/app/api/flags/[number]/comments/route'
import { POST as setAside } from '@/app/api/flags/[number]/set-aside/route'
import { systemActor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import { jobs } from '@/lib/flag/jobs'
import { startMailFake } from '@/lib/mail/fake'
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

let t: TestDatabase
let technician: Signed
let formulator: Signed
let qa: Signed
let manager: Signed

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  formulator = await t.person('formulator')
  qa = await t.person('qa')
  manager = await t.person('manager')
})
afterAll(() => t.close())

type Begun = { study: BenchStudy; jars: AskedJar[] }
const begin = async (): Promise<Begun> => {
  const study = await benchStudy(t.db, formulator.actor, 12)
  return { study, jars: await askedJars(t.db, study.studyId) }
}
const send = async (jar: { pullJarId: string }, body: { readings: object[] }) => {
  const sure = { ...body, readings: body.readings.map((reading) => ({ ...reading, isConfirmed: true })) }
  const kept = await call(log, { cookie: technician.cookie, params: { id: jar.pullJarId }, body: sure })
  if (kept.status !== 200) throw new Error(JSON.stringify(kept.body))
  return kept.body
}
const flagsOf = (study: BenchStudy) =>
  t.db.selectFrom('flag').selectAll().where('studyId', '=', study.studyId).orderBy('number').execute()
const act = (route: typeof answer, cookie: string, number: number, body: object) =>
  call(route, { cookie, params: { number: String(number) }, body })
const because = { cause: 'product', action: 'watch it', why: 'it thins in the heat' }

/** Reads the spare that the doubt asked for. */
async function repeat(study: BenchStudy, pullJarId: string, topMm: number, bottomMm: number) {
  const { version } = await t.db
    .selectFrom('pullJar')
    .select('version')
    .where('id', '=', pullJarId)
    .executeTakeFirstOrThrow()
  const asked = { pullJarId, version, code: '', asks: 'repeat', timeWeeks: 1, temperatureC: 45 }
  return send(asked, layered(study, asked, topMm, bottomMm))
}

describe('beyond the band', () => {
  it('is a doubt that names a spare jar, until the repeat confirms it; then it is out', async () => {
    const { study, jars } = await begin()
    const kept = await send(jarAt(jars, 45, 1, 'watch'), layered(study, jarAt(jars, 45, 1, 'watch'), 2, 4))
    expect(kept.raised).toMatchObject([{ rule: 'out', level: 'doubt' }])
    expect(kept.repeats).toHaveLength(1)
    expect(kept.raised[0].sentence).toMatch(
      new RegExp(`spare jar is 45·${kept.repeats[0].jarCode}, shelf \\d+, place \\d+`),
    )
    const before = await seriesStanding(study)
    expect(before).not.toBe('out')

    const confirmed = await repeat(study, kept.repeats[0].pullJarId, 2.2, 4)
    // A second jar of the day shows it too, so separation has begun as well.
    expect(confirmed.raised).toMatchObject([
      { rule: 'out', level: 'out' },
      { rule: 'onset', level: 'flag' },
    ])
    expect(confirmed.raised[0].sentence).toContain('confirmed by a repeat')
    expect(confirmed.cleared).toEqual([kept.raised[0].number])
    expect(await seriesStanding(study)).toBe('out')
    const [doubt] = await flagsOf(study)
    expect(doubt).toMatchObject({ state: 'closed', closedBy: '00000000-0000-7000-8000-000000000001' })
    expect(doubt!.closingNote).toMatch(/repeat/)
  })

  it('a repeat inside the band, far from the first, asks for a third jar, and the median counts', async () => {
    const { study, jars } = await begin()
    const kept = await send(jarAt(jars, 45, 1, 'watch'), layered(study, jarAt(jars, 45, 1, 'watch'), 3, 6))
    const differing = await repeat(study, kept.repeats[0].pullJarId, 0, 0)
    expect(differing.raised[0].sentence).toMatch(/third/)
    expect(differing.repeats).toHaveLength(1)
    const settled = await repeat(study, differing.repeats[0].pullJarId, 0, 0)
    expect(settled.repeats).toHaveLength(0)
    expect((await flagsOf(study)).filter((flag) => flag.state === 'open')).toHaveLength(0)
    expect(await seriesStanding(study)).not.toBe('out')
  })

  const seriesStanding = async (study: BenchStudy) =>
    (
      await t.db
        .selectFrom('series')
        .innerJoin('studyStation as ss', 'ss.id', 'series.studyStationId')
        .select('standing')
        .where('series.studyId', '=', study.studyId)
        .where('ss.temperatureC', '=', 45)
        .where('attribute', '=', 'separation')
        .executeTakeFirstOrThrow()
    ).standing
})

describe('answers', () => {
  let study: BenchStudy
  let out: number
  beforeAll(async () => {
    const begun = await begin()
    study = begun.study
    const watch = jarAt(begun.jars, 45, 1, 'watch')
    const kept = await send(watch, layered(study, watch, 2, 4))
    const confirmed = await repeat(study, kept.repeats[0].pullJarId, 2, 4)
    out = confirmed.raised[0].number
  })

  it('anyone of the lab comments, a technician does not answer', async () => {
    for (const person of [technician, manager]) {
      const kept = await act(comment, person.cookie, out, { id: newId(), text: 'Water at the foot.' })
      expect(kept.status).toBe(200)
    }
    expect((await act(answer, technician.cookie, out, { version: 1, ...because })).status).toBe(403)
    expect((await act(comment, technician.cookie, out, { id: newId(), text: ' ' })).status).toBe(422)
  })

  it('R10: QA does not close what has no answer; R03: an answer says why', async () => {
    const early = await act(close, qa.cookie, out, { version: 1, note: 'fine' })
    expect(early.status).toBe(409)
    const silent = await act(answer, formulator.cookie, out, { version: 1, ...because, why: ' ' })
    expect(silent.status).toBe(422)
  })

  it('out at a station that decides is answered by the formulator and closed by QA alone', async () => {
    const answered = await act(answer, formulator.cookie, out, { version: 1, ...because })
    expect(answered.body).toMatchObject({ state: 'answered', version: 2 })
    expect((await act(close, formulator.cookie, out, { version: 2, note: 'fine' })).status).toBe(403)
    const closed = await act(close, qa.cookie, out, { version: 2, note: 'the prototype has failed here' })
    expect(closed.body).toMatchObject({ state: 'closed' })
  })

  it('D06: a second answer on an older version gets 412 with who and what', async () => {
    const late = await act(answer, formulator.cookie, out, { version: 1, ...because })
    expect(late.status).toBe(412)
    expect(late.body.error.sentence).toContain(qa.actor.name)
  })

  it('shows everything that answers it: series, same jar, instrument, spares, comments', async () => {
    const page = await call(one, { cookie: qa.cookie, params: { number: String(out) } })
    expect(page.body).toMatchObject({ number: out, label: 'Separation', needsQuality: true, state: 'closed' })
    expect(page.body.series.finding.points.length).toBeGreaterThan(1)
    expect(page.body.sameJar.length).toBeGreaterThan(0)
    expect(page.body.spares).toHaveLength(1)
    expect(page.body.comments).toHaveLength(2)
    const lines = await call(list, { cookie: technician.cookie, query: { study: study.code, state: 'any' } })
    expect(lines.body.rows.map((line: { number: number }) => line.number)).toContain(out)
  })

  it('is not raised again while it still fires', async () => {
    const jars = await askedJars(t.db, study.studyId)
    const watch = jarAt(jars, 25, 1, 'watch')
    await send(watch, layered(study, watch, 0, 0))
    expect((await flagsOf(study)).filter((flag) => flag.level === 'out')).toHaveLength(1)
  })
})

describe('setting aside', () => {
  it('a doubt set aside with a cause lets the reading count', async () => {
    const { study, jars } = await begin()
    const jar = jarAt(jars, 25, 1)
    const kept = await send(jar, measured(study, jar, { ph: null, torque: '8', more: { leaveOut: ['ph'] } }))
    const torque = kept.raised.find((flag: { rule: string }) => flag.rule === 'torque')
    expect(torque).toMatchObject({ level: 'doubt' })
    const settled = await act(setAside, formulator.cookie, torque.number, {
      version: 1,
      settles: 'doubt',
      cause: 'measurement',
      why: 'checked with the small spindle',
    })
    expect(settled.status).toBe(200)
    const flags = await flagsOf(study)
    expect(flags.find((flag) => flag.number === torque.number)).toMatchObject({
      state: 'closed',
      settles: 'doubt',
    })
    expect(flags.filter((flag) => flag.rule === 'torque' && flag.state !== 'closed')).toHaveLength(0)
    // 800 mPa·s against 6 500 counts now, and so is seen to be beyond the band.
    expect(settled.body.raised.map((flag: { rule: string }) => flag.rule)).toContain('out')
  })

  it('only QA sets a reading aside, for a laboratory cause; it then never counts and stays on record', async () => {
    const { study, jars } = await begin()
    const jar = jarAt(jars, 25, 1)
    const kept = await send(
      jar,
      measured(study, jar, { ph: '4.10', torque: null, more: { leaveOut: ['viscosity'] } }),
    )
    const doubt = kept.raised.find((flag: { rule: string; level: string }) => flag.rule === 'out')
    const body = { version: 1, settles: 'reading', cause: 'measurement', why: 'the vial held buffer' }
    expect((await act(setAside, formulator.cookie, doubt.number, body)).status).toBe(403)
    expect((await act(setAside, qa.cookie, doubt.number, { ...body, cause: 'product' })).status).toBe(422)
    expect((await act(setAside, qa.cookie, doubt.number, body)).status).toBe(200)
    const series = await t.db
      .selectFrom('series')
      .innerJoin('studyStation as ss', 'ss.id', 'series.studyStationId')
      .select('latestValue')
      .where('series.studyId', '=', study.studyId)
      .where('ss.temperatureC', '=', 25)
      .where('attribute', '=', 'ph')
      .executeTakeFirstOrThrow()
    expect(series.latestValue).toBeNull()
    const rows = await t.db
      .selectFrom('reading')
      .select('id')
      .where('pullJarId', '=', jar.pullJarId)
      .execute()
    expect(rows).toHaveLength(1)
  })
})

describe('raising and clearing', () => {
  it('a correction clears what its slip raised, and the mail waits 15 minutes, one for a study', async () => {
    const { study, jars } = await begin()
    const jar = jarAt(jars, 45, 1)
    const body = measured(study, jar, { ph: '4.60', torque: null, more: { leaveOut: ['viscosity'] } })
    const kept = await send(jar, body)
    expect(kept.raised.length).toBeGreaterThan(0)
    const other = jarAt(jars, 45, 1, 'watch')
    await send(other, layered(study, other, 2, 4))
    const { rows } = await sql<{ wait: number }>`
      select extract(epoch from start_after - created_on)::float8 as wait from pgboss.job
        where name = 'flag.mail' and data ->> 'studyId' = ${study.studyId}`.execute(t.db)
    expect(rows).toHaveLength(1)
    expect(rows[0]!.wait).toBeCloseTo(900, 0)

    const mended = await call(correct, {
      cookie: technician.cookie,
      params: { id: body.readings[0]!.id },
      body: { id: newId(), typed: '5.46', reason: 'read 4 for 5' },
    })
    expect(mended.status).toBe(200)
    const open = (await flagsOf(study)).filter((flag) => flag.state === 'open' && flag.attribute === 'ph')
    expect(open).toHaveLength(0)
  })

  it('the mail tells each follower what is still open, with its sentence and link', async () => {
    const folder = await mkdtemp(path.join(tmpdir(), 'stillstand-flags-'))
    process.env['STILLSTAND_FILES'] = path.join(folder, 'files')
    const fake = await startMailFake()
    try {
      const { study, jars } = await begin()
      const jar = jarAt(jars, 45, 1, 'watch')
      const kept = await send(jar, layered(study, jar, 2, 4))
      const [flagMail] = jobs
      const context = { db: t.db, actor: systemActor(), jobId: newId() }
      const since = new Date(Date.now() - 60_000).toISOString()
      await flagMail!.handle(context, { studyId: study.studyId, since })
      await flagMail!.handle(context, {
        studyId: study.studyId,
        since: new Date(Date.now() + 60_000).toISOString(),
      })
      const files = await readdir(path.join(folder, 'mail'))
      expect(files).toHaveLength(1)
      const mail = JSON.parse(await readFile(path.join(folder, 'mail', files[0]!), 'utf8'))
      expect(mail.to).toEqual([formulator.actor.email])
      expect(mail.text).toContain(kept.raised[0].sentence)
      expect(mail.text).toContain(`/flags/${kept.raised[0].number}`)
    } finally {
      await fake.close()
      await rm(folder, { recursive: true, force: true })
    }
  })

  it('separation in two pulls in a row has begun', async () => {
    const { study, jars } = await begin()
    const [first, next] = [jarAt(jars, 25, 1, 'watch'), jarAt(jars, 25, 2, 'watch')]
    await send(first, layered(study, first, 0, 1.1))
    const kept = await send(next, layered(study, next, 0, 1.15))
    expect(kept.raised.map((flag: { rule: string }) => flag.rule)).toContain('onset')
  })

  it('pH that falls at 45 °C and not at 5 °C leans, with its leaving time', async () => {
    const { study, jars } = await begin()
    const raised: { rule: string; sentence: string }[] = []
    for (const week of [1, 2, 3, 4, 6, 8]) {
      const cold = jarAt(jars, 5, week)
      await send(
        cold,
        measured(study, cold, {
          ph: (5.5 + (week % 2) * 0.01).toFixed(2),
          torque: null,
          more: { leaveOut: ['viscosity'] },
        }),
      )
      const hot = jarAt(jars, 45, week)
      const ph = (5.5 - 0.05 * week).toFixed(2)
      raised.push(
        ...(await send(hot, measured(study, hot, { ph, torque: null, more: { leaveOut: ['viscosity'] } })))
          .raised,
      )
    }
    const lean = raised.find((flag) => flag.rule === 'lean')
    expect(lean?.sentence).toMatch(/pH at 45 °C is leaning/)
    const { standing, used } = await t.db
      .selectFrom('series')
      .innerJoin('studyStation as ss', 'ss.id', 'series.studyStationId')
      .select(['standing', 'used'])
      .where('series.studyId', '=', study.studyId)
      .where('ss.temperatureC', '=', 45)
      .where('attribute', '=', 'ph')
      .executeTakeFirstOrThrow()
    expect(standing).toBe('leaning')
    expect(used).toBeCloseTo(0.8)
  })

  it('one day on which the viscometer read high everywhere is a doubt on the instrument, not on the cream', async () => {
    const { study, jars } = await begin()
    for (const week of [2, 3, 4, 6]) {
      for (const temperature of [5, 25, 45]) {
        const jar = jarAt(jars, temperature, week)
        const torque = week === 6 ? '72' : '65'
        await send(jar, measured(study, jar, { ph: null, torque, more: { leaveOut: ['ph'] } }))
      }
    }
    const flags = await flagsOf(study)
    const shift = flags.filter((flag) => flag.rule === 'common shift')
    expect(shift).toHaveLength(1)
    expect(shift[0]).toMatchObject({ state: 'open', level: 'doubt', instrumentId: study.viscometerId })
    expect(shift[0]!.sentence).toMatch(/read viscosity high/)
    const page = await call(one, { cookie: qa.cookie, params: { number: String(shift[0]!.number) } })
    expect(page.body.sameInstrument).toHaveLength(3)
    // Raised earlier that day by single readings, closed again with the instrument's doubt.
    expect(flags.filter((flag) => flag.rule === 'jump' && flag.state === 'open')).toHaveLength(0)
    const settled = await act(setAside, qa.cookie, shift[0]!.number, {
      version: 1,
      settles: 'reading',
      cause: 'instrument',
      why: 'the check oil read high as well',
    })
    expect(settled.status).toBe(200)
    expect((await flagsOf(study)).filter((flag) => flag.state === 'open')).toHaveLength(0)
  })
})
