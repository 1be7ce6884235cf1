import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as document } from '@/app/api/outside-results/[id]/document/route'
import { POST as addPhoto } from '@/app/api/photos/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as makeProtocol } from '@/app/api/protocols/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { POST as voidReading } from '@/app/api/readings/[id]/void/route'
import { GET as getCurves } from '@/app/api/studies/[code]/curves/route'
import { GET as listOutside, POST as addOutside } from '@/app/api/studies/[code]/outside-results/route'
import { GET as exportReadings } from '@/app/api/studies/[code]/readings/export/route'
import { GET as getSheet } from '@/app/api/studies/[code]/sheet/route'
import { newId } from '@/lib/db/id'
import { freshAttribute, freshOwn } from '@/lib/protocol/rules/fresh-attribute'
import type { PlannedAttribute, ProtocolPlan } from '@/lib/protocol/schema'
import { loadEvidence } from '@/lib/shelf-case/queries/evidence'
import { caseStation, computeCase } from '@/lib/shelf-case/rules/build'
import {
  askedJars,
  benchStudy,
  jarAt,
  measured,
  planOfTest,
  type AskedJar,
  type BenchStudy,
} from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let technician: Signed
let formulator: Signed
let study: BenchStudy
let jars: AskedJar[]
let folder: string

const foam = freshOwn('own.Foam-height', 'number')
const grit = freshOwn('own.Grittiness', 'scale')
const own: PlannedAttribute[] = [
  freshAttribute('type'),
  freshAttribute('colour'),
  { ...freshAttribute('centrifuge'), isInitialOnly: true },
  {
    ...foam,
    own: {
      kind: 'number',
      unit: 'mm',
      decimals: 0,
      lower: 0,
      upper: 300,
      scatter: 3,
      isGradual: true,
      jar: 'measuring',
    },
  },
  { ...grit, own: { kind: 'scale', words: ['smooth', 'a few grains', 'gritty'], jar: 'measuring' } },
]
const plan: ProtocolPlan = { ...planOfTest, attributes: [...planOfTest.attributes, ...own] }

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'stillstand-outside-'))
  process.env['STILLSTAND_FILES'] = path.join(folder, 'files')
  process.env['DATA_FOLDER'] = folder
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  formulator = await t.person('formulator')
  study = await benchStudy(t.db, formulator.actor, 12, plan, [
    { attribute: 'type', typed: ['water outside'] },
    { attribute: 'colour', typed: ['50 2.6772 -79.7751'] },
    { attribute: 'centrifuge', typed: ['none'] },
    { attribute: 'own.Foam-height', typed: ['100'] },
  ])
  jars = await askedJars(t.db, study.studyId)
})
afterAll(async () => {
  await t.close()
  await rm(folder, { recursive: true, force: true })
})

const entry = (attribute: string, typed: string) => ({ id: newId(), attribute, typed, isConfirmed: true })

function readAt(jar: AskedJar, more: [string, string][]) {
  const body = measured(study, jar)
  return call(log, {
    cookie: technician.cookie,
    params: { id: jar.pullJarId },
    body: { ...body, readings: [...body.readings, ...more.map(([key, typed]) => entry(key, typed))] },
  })
}

const plain: [string, string][] = [
  ['type', 'water outside'],
  ['colour', '50 2.6772 -79.7751'],
  ['own.Foam-height', '98'],
  ['own.Grittiness', 'smooth'],
]

describe('attributes at the jar', () => {
  it('what is read once before the start is on record and asked of no jar', async () => {
    const initial = await t.db
      .selectFrom('reading')
      .select(['value', 'word'])
      .select(sql<Record<string, number>>`detail`.as('detail'))
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'centrifuge')
      .executeTakeFirstOrThrow()
    expect(initial).toMatchObject({ value: 0, word: 'none', detail: { rpm: 3000 } })
    expect(initial.detail['rcf']).toBeCloseTo(1006.2, 1)
    expect((await readAt(jarAt(jars, 5, 1), plain)).status).toBe(200)
  })

  it('a difference of colour is the published CIEDE2000 from the batch itself', async () => {
    // Sharma, Wu and Dalal 2005, table 1, pair 1.
    const answer = await readAt(jarAt(jars, 5, 2), [
      ...plain.filter(([key]) => key !== 'colour'),
      ['colour', '50,0 0 -82,7485'],
    ])
    expect(answer.status).toBe(200)
    const { value } = await t.db
      .selectFrom('reading')
      .select('value')
      .where('attribute', '=', 'colour')
      .orderBy('recordedAt', 'desc')
      .limit(1)
      .executeTakeFirstOrThrow()
    expect(value).toBeCloseTo(2.0425, 4)
  })

  it('R02: a corrected initial tells every later difference of colour anew, and hides none of them', async () => {
    const first = await t.db
      .selectFrom('reading')
      .select('id')
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'colour')
      .where('studyStationId', 'is', null)
      .executeTakeFirstOrThrow()
    const voided = await call(voidReading, {
      cookie: formulator.cookie,
      params: { id: first.id },
      body: { id: newId(), reason: 'wrong jar' },
    })
    expect(voided.status).toBe(409)
    expect(voided.body.error.sentence).toMatch(/^two later readings are told from this initial\. Correct it/i)
    const answer = await call(correct, {
      cookie: formulator.cookie,
      params: { id: first.id },
      body: { id: newId(), typed: '50 3.1571 -77.2803', reason: 'read from the line above' },
    })
    expect(answer.status).toBe(200)
    const rows = await t.db
      .selectFrom('reading as r')
      .leftJoin('reading as newer', 'newer.supersedesId', 'r.id')
      .select(['r.value', 'r.typed', 'r.reason', 'newer.value as now'])
      .where('r.attribute', '=', 'colour')
      .where('r.studyStationId', 'is not', null)
      .where('r.typed', '=', '50,0 0 -82,7485')
      .orderBy('r.recordedAt')
      .execute()
    // The same table, pairs 1 and 2: against the old initial and against the corrected one.
    expect(rows.map((row) => [row.value?.toFixed(4), row.now?.toFixed(4)])).toEqual([
      ['2.0425', '2.8615'],
      ['2.8615', undefined],
    ])
    expect(rows[1]!.reason).toBe('Told anew, because the initial was corrected: read from the line above')
    const series = await t.db
      .selectFrom('series')
      .select('latestValue')
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'colour')
      .where('latestValue', 'is not', null)
      .executeTakeFirstOrThrow()
    // The second is beyond the band and waits for its repeat; the first was no difference before the correction.
    expect(series.latestValue).toBeGreaterThan(0.5)
  })

  it('under which a viscosity is read stands in the plan, the initial and the doubt', async () => {
    const initial = await t.db
      .selectFrom('reading')
      .select(sql<object>`detail`.as('detail'))
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'viscosity')
      .where('studyStationId', 'is', null)
      .executeTakeFirstOrThrow()
    expect(initial.detail).toMatchObject({ seconds: 30, path: 'fixed', spindle: 'disc 4' })
    const jar = jarAt(jars, 5, 3)
    const body = measured(study, jar)
    const [ph, viscosity] = body.readings
    const answer = await call(log, {
      cookie: technician.cookie,
      params: { id: jar.pullJarId },
      body: {
        ...body,
        leaveOut: ['type', 'colour', 'own.Foam-height', 'own.Grittiness'],
        readings: [
          { ...ph, detail: { phMethod: 'direct' } },
          { ...viscosity, detail: { torquePercent: 65, seconds: 60, path: 'fixed' } },
        ],
      },
    })
    expect(answer.status).toBe(200)
    const read = await t.db
      .selectFrom('reading')
      .select(['attribute', sql<{ reason: string; sentence: string }[]>`doubts`.as('doubts')])
      .where('pullJarId', '=', jar.pullJarId)
      .orderBy('attribute')
      .execute()
    expect(read.map((row) => row.doubts.map((doubt) => doubt.reason))).toEqual([[], ['conditions']])
    expect(read[1]!.doubts[0]!.sentence).toMatch(/^Measured with 60 s instead of 30 s;/)
  })

  it('a colour from a photo is what the server reads on the copy beside the grey card, marked as an estimate', async () => {
    const jar = jarAt(jars, 5, 4)
    // A card of 18 % grey, stored as 118, beside a sample of sRGB 180, 150, 120, under one light.
    const image = new Jimp({ width: 200, height: 100, color: 0x767676ff })
    for (let x = 100; x < 200; x += 1) for (let y = 0; y < 100; y += 1) image.setPixelColor(0xb49678ff, x, y)
    const file = new Blob([new Uint8Array(await image.getBuffer('image/jpeg', { quality: 95 }))])
    const photoId = newId()
    const form = new FormData()
    const now = new Date().toISOString()
    const fields = { id: photoId, pullJarId: jar.pullJarId, shows: 'colour', deviceNow: now, claimedAt: now }
    for (const [name, text] of Object.entries(fields)) form.set(name, text)
    form.set('file', file, 'card.jpg')
    form.set('copy', file, 'copy.jpg')
    expect((await call(addPhoto, { cookie: technician.cookie, body: form })).status).toBe(200)

    const patch = { mean: [0.5, 0.5, 0.5], pixels: 900, spread: 0, unevenness: 0, clipped: 0 }
    const photoColour = {
      ...{ photoId, width: 200, height: 100, greyL: 49.5, readBy: 'server' },
      grey: { x: 50, y: 50, side: 30 },
      sample: { x: 150, y: 50, side: 30 },
      // Not what the photo shows: the server looks itself.
      patches: { grey: patch, sample: patch },
    }
    const keep = (typed: string, detail: object) => {
      const body = measured(study, jar)
      const rest = plain.filter(([key]) => key !== 'colour').map(([key, text]) => entry(key, text))
      const colour = { ...entry('colour', typed), detail: { photoColour: { ...photoColour, ...detail } } }
      return call(log, {
        cookie: technician.cookie,
        params: { id: jar.pullJarId },
        body: { ...body, readings: [...body.readings, ...rest, colour] },
      })
    }
    // By hand from IEC 61966-2-1 and CIE 15: sRGB 180, 150, 120 is L* 64.1, a* 6.8, b* 20.0 under D65.
    const other = await keep('50 0 0', {})
    expect(other.status).toBe(422)
    expect(other.body.error.sentence).toMatch(/do not say the same/)
    expect((await keep('64.0 6.8 20.0', { width: 100 })).body.error.sentence).toMatch(/Measure anew/)
    const black = await keep('64.0 6.8 20.0', { sample: { x: 198, y: 50, side: 30 } })
    expect(black.body.error.sentence).toMatch(/leaves the photo/)
    const kept = await keep('64.0 6.8 20.0', {})
    expect(kept.body.error).toBeUndefined()
    const row = await t.db
      .selectFrom('reading')
      .select(['value', 'typed'])
      .select(sql<Record<string, unknown>>`detail`.as('detail'))
      .where('pullJarId', '=', jar.pullJarId)
      .where('attribute', '=', 'colour')
      .executeTakeFirstOrThrow()
    const {
      lab,
      isEstimate,
      photoColour: onRecord,
    } = row.detail as {
      lab: { L: number; a: number; b: number }
      isEstimate: boolean
      photoColour: { readBy: string; patches: { grey: { mean: number[] } } }
    }
    expect(isEstimate).toBe(true)
    expect(onRecord.readBy).toBe('server')
    expect(onRecord.patches.grey.mean[0]).toBeCloseTo(0.18, 2)
    expect(Math.abs(lab.L - 64.1)).toBeLessThan(0.6)
    expect(Math.abs(lab.a - 6.8)).toBeLessThan(1)
    expect(Math.abs(lab.b - 20)).toBeLessThan(1)
    expect(row.value).toBeGreaterThan(30)
  })

  it('a turned emulsion is out at once, without a repeat', async () => {
    const answer = await readAt(jarAt(jars, 45, 1), [
      ...plain.filter(([key]) => key !== 'type'),
      ['type', 'oil outside'],
    ])
    expect(answer.status).toBe(200)
    const raised = await t.db
      .selectFrom('flag')
      .select(['rule', 'level', 'sentence'])
      .where('studyId', '=', study.studyId)
      .where('attribute', '=', 'type')
      .execute()
    expect(raised).toMatchObject([{ rule: 'out', level: 'out' }])
    expect(raised[0]!.sentence).toMatch(/has turned over.*extrapolation.*void/)
    expect(await t.db.selectFrom('pullJar').select('id').where('attribute', '=', 'type').execute()).toEqual(
      [],
    )
  })

  it("a protocol's own attribute is refused, judged, drawn and written out by its own terms", async () => {
    const wrong = await readAt(jarAt(jars, 25, 1), [
      ...plain.filter(([key]) => !key.startsWith('own.')),
      ['own.Foam-height', '301'],
      ['own.Grittiness', 'coarse'],
    ])
    expect(wrong.status).toBe(422)
    expect(Object.values(wrong.body.error.fields)).toEqual([
      expect.stringContaining('Foam height runs from 0 to 300 mm'),
      expect.stringContaining('smooth, a few grains, gritty'),
    ])
    const low = await readAt(jarAt(jars, 25, 1), [
      ...plain.filter(([key]) => key !== 'own.Foam-height'),
      ['own.Foam-height', '70'],
    ])
    expect(low.status).toBe(200)
    const flag = await t.db
      .selectFrom('flag')
      .select(['level', 'sentence'])
      .where('attribute', '=', 'own.Foam-height')
      .executeTakeFirstOrThrow()
    // The band is 20 % either way of 100 mm.
    expect(flag.level).toBe('doubt')
    expect(flag.sentence).toMatch(/^Foam height at 25 °C is 10 mm below the band/)
    const sheet = await call(getSheet, { cookie: formulator.cookie, params: { code: study.code } })
    const cells = sheet.body.shelves[0].rows.flatMap((row: { cells: unknown[] }) => row.cells)
    const texts = cells.flatMap((cell: { values: { attribute: string; text: string }[] }) => cell.values)
    expect(texts).toContainEqual(
      expect.objectContaining({
        attribute: 'own.Foam-height',
        text: '98 mm',
        lowerText: '80',
        upperText: '120',
      }),
    )
    expect(texts).toContainEqual(expect.objectContaining({ attribute: 'own.Grittiness', text: 'smooth' }))
    const curves = await call(getCurves, { cookie: formulator.cookie, params: { code: study.code } })
    expect(curves.body.series.map((one: { attribute: string }) => one.attribute)).toContain('own.Foam-height')
    const csv = await call(exportReadings, {
      cookie: formulator.cookie,
      params: { code: study.code },
      query: { as: 'csv', columns: 'attribute,value,unit' },
    })
    expect(csv.status).toBe(200)
    expect(csv.body).toMatch(/Foam height[^\n]*70[^\n]*mm/)
  })

  it('a case rests on it, and names it by its plan', async () => {
    const evidence = await loadEvidence(t.db, formulator.actor, study.studyId)
    const station = caseStation(evidence, evidence.stations.find((one) => one.temperatureC === 5)!.id)!
    const { attributes } = computeCase(evidence, station, [])
    expect(attributes.find((one) => one.attribute === 'own.Foam-height')).toMatchObject({
      ...{ label: 'Foam height', unit: 'mm', basis: 'regression', limit: 'within 20 % of the initial' },
      own: { kind: 'number', unit: 'mm' },
    })
    expect(attributes.find((one) => one.attribute === 'own.Grittiness')).toMatchObject({
      ...{ basis: 'observed', limit: 'at most a few grains' },
    })
    expect(attributes.map((one) => one.attribute)).not.toContain('centrifuge')
  })

  it('a plan that contradicts its own attribute is not kept, and says where', async () => {
    const body = (attributes: unknown[]) => ({
      ...{ id: newId(), versionId: newId(), name: 'Own', note: '' },
      plan: { ...planOfTest, attributes },
    })
    const send = (attributes: unknown[]) =>
      call(makeProtocol, { cookie: formulator.cookie, body: body(attributes) })
    expect((await send([foam, grit])).status).toBe(200)
    expect((await send([{ ...foam, own: undefined }])).status).toBe(422)
    expect((await send([{ ...grit, tolerance: { kind: 'range', upper: 7 } }])).status).toBe(422)
    const beyond = await send([{ ...foam, tolerance: { kind: 'range', upper: 500 } }])
    expect(beyond.body.error.fields['plan.attributes.0.tolerance']).toContain('Foam height can be 0 to 100')
  })
})

describe('results of outside laboratories', () => {
  const pdf = Buffer.from(
    '%PDF-1.4\n1 0 obj\n<< /Type /Catalog >>\nendobj\ntrailer << /Root 1 0 R >>\n%%EOF\n',
  )
  const send = (more: Record<string, string> = {}, bytes: Uint8Array = pdf, who = technician) => {
    const form = new FormData()
    const fields = {
      ...{
        id: newId(),
        what: 'preservative efficacy',
        test: 'challenge test, five strains',
        outcome: 'pass',
      },
      ...{ labName: 'A laboratory', reportNumber: 'R 1', reportedOn: '2026-01-02', value: 'meets A' },
      ...more,
    }
    for (const [key, value] of Object.entries(fields)) form.set(key, value)
    form.set('file', new Blob([bytes as BlobPart], { type: 'application/pdf' }), 'report.pdf')
    return call(addOutside, { cookie: who.cookie, params: { code: study.code }, body: form })
  }

  it('are kept with their document, given back byte for byte as a file to save, and change no more', async () => {
    const kept = await send({ weeks: '12' })
    expect(kept.status).toBe(200)
    const { body } = await call(listOutside, { cookie: technician.cookie, params: { code: study.code } })
    expect(body).toMatchObject([{ outcome: 'pass', timeWeeks: 12, batch: null, isSuperseded: false }])
    const file = await call(document, { cookie: technician.cookie, params: { id: kept.body.id } })
    expect(Buffer.from(await file.response.arrayBuffer())).toEqual(pdf)
    expect(file.headers.get('content-disposition')).toMatch(/^attachment;.*report\.pdf/)
    await expect(
      t.db.updateTable('outsideResult').set({ outcome: 'fail' }).where('id', '=', kept.body.id).execute(),
    ).rejects.toThrow()
  })

  it('are refused where the content is no document, the day is to come, or a field is missing', async () => {
    expect((await send({}, Buffer.from('MZ this only calls itself a report'))).status).toBe(415)
    const early = await send({ reportedOn: '2099-01-01' })
    expect(early.body.error.fields).toHaveProperty('reportedOn')
    expect((await send({ labName: ' ' })).body.error.fields).toHaveProperty('labName')
    expect((await send({ batch: 'B-none' })).status).toBe(422)
  })

  it('are corrected by another that names a reason, and a failed one weighs in the case', async () => {
    const first = await send({
      what: 'microbiology',
      test: 'total count',
      outcome: 'pass',
      reportNumber: 'R 2',
    })
    const correction = { what: 'microbiology', test: 'total count', outcome: 'fail', reportNumber: 'R 3' }
    const old = { supersedesId: first.body.id as string }
    expect((await send({ ...correction, ...old })).body.error.fields).toHaveProperty('reason')
    expect((await send({ ...correction, ...old, reason: 'The first was of another batch.' })).status).toBe(
      200,
    )
    expect((await send({ ...correction, ...old, reason: 'Again.' })).status).toBe(409)
    const evidence = await loadEvidence(t.db, formulator.actor, study.studyId)
    const station = caseStation(evidence, evidence.stations[0]!.id)!
    const { outside, weakens } = computeCase(evidence, station, [])
    expect(outside?.map((one) => one.reportNumber)).toEqual(['R 1', 'R 3'])
    expect(weakens.map((one) => one.title)).toContain('Microbiology failed at A laboratory')
  })
})
