import { createElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as benchJar } from '@/app/api/bench/[code]/route'
import { GET as report } from '@/app/api/cases/[code]/report/route'
import { GET as oneCase } from '@/app/api/cases/[code]/route'
import { POST as putForward } from '@/app/api/cases/[code]/put-forward/route'
import { POST as sign } from '@/app/api/cases/[code]/sign/route'
import { POST as draft } from '@/app/api/cases/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { POST as correct } from '@/app/api/readings/[id]/correct/route'
import { GET as history } from '@/app/api/readings/[id]/route'
import { GET as file } from '@/app/api/studies/[code]/readings/export/route'
import { GET as readings } from '@/app/api/studies/[code]/readings/route'
import { DonePanel } from '@/components/bench/done-panel'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, measured } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { pdfText } from '../support/pdf-text'
import { shelfStudy } from '../support/shelf-study'

const password = 'four words make one'
let t: TestDatabase
let formulator: Signed
let qa: Signed

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  formulator = await t.person('formulator', { password })
  qa = await t.person('qa', { password })
})
afterAll(() => t.close())

/** Corrects a reading, and what took its place once more. */
async function correctTwice(id: string): Promise<string[]> {
  const ids = [id, newId(), newId()]
  for (const [at, typed, reason] of [
    [0, '5.46', 'read from the wrong line'],
    [1, '5,44', 'second buffer'],
  ] as const) {
    const answer = await call(correct, {
      cookie: formulator.cookie,
      params: { id: ids[at]! },
      body: { id: ids[at + 1], typed, isConfirmed: true, reason },
    })
    expect(answer.status).toBe(200)
  }
  return ids
}

type Entry = { id: string; typed: string; isCurrent: boolean }
const words = (markup: string) =>
  markup
    .replace(/<[^>]+>/g, ' ')
    .replace(/\s+/g, ' ')
    .trim()

describe('R02: a correction hides nothing: three values in order, the current one marked', () => {
  it('at the jar: struck through, struck through, and the one that stands', async () => {
    const technician = await t.person('technician')
    const study = await benchStudy(t.db, formulator.actor, 12)
    const jar = jarAt(await askedJars(t.db, study.studyId), 25, 2)
    const body = measured(study, jar, { ph: '5.41' })
    const kept = await call(log, { cookie: technician.cookie, params: { id: jar.pullJarId }, body })
    expect(kept.status).toBe(200)
    await correctTwice(body.readings[0]!.id)
    const { body: page } = await call(benchJar, { cookie: technician.cookie, params: { code: jar.code } })
    const shown = renderToStaticMarkup(
      createElement(DonePanel, {
        ...{ jar: page, personId: '', mayLog: false, next: null },
        ...{ onChange() {}, onWalk() {}, onOpen() {} },
      }),
    )
    const lines = [...shown.matchAll(/<p class="([^"]*)"><b>pH<\/b>.*?<\/p>/g)]
    expect(lines.map(([line]) => [words(line).slice(0, 7), line.includes('line-through')])).toEqual([
      ['pH 5.41', true],
      ['pH 5.46', true],
      ['pH 5.44', false],
    ])
    expect(words(lines[0]![0])).toContain('corrected: read from the wrong line')
    expect(words(lines[1]![0])).toContain('corrected: second buffer')
  })

  describe('in a study whose case is signed', () => {
    let ids: string[]
    let study: { id: string; code: string }

    beforeAll(async () => {
      const client = await t.person('client')
      // Another laid the readings: who logged may not sign.
      const technician = await t.person('technician')
      const { study: id, batches } = await shelfStudy(t, technician.actor, client.actor.clientId!)
      study = { id, code: 'S-901' }
      const reading = await t.db
        .selectFrom('reading')
        .select('id')
        .where('studyId', '=', id)
        .where('batchId', '=', batches[0]!)
        .where('typed', '=', '5.2')
        .executeTakeFirstOrThrow()
      ids = await correctTwice(reading.id)
    })

    it.each([0, 1, 2])('in the history, asked by the entry at place %i', async (at) => {
      const { body } = await call(history, { cookie: qa.cookie, params: { id: ids[at]! } })
      expect(body.map((one: Entry) => [one.id, one.typed, one.isCurrent])).toEqual([
        [ids[0], '5.2', false],
        [ids[1], '5.46', false],
        [ids[2], '5,44', true],
      ])
    })

    it('on the readings page', async () => {
      const { body } = await call(readings, { cookie: qa.cookie, params: { code: study.code } })
      const chains = (body.rows as { current: Entry; entries: Entry[] }[]).filter(
        (chain) => chain.entries.length > 1,
      )
      expect(chains.map((chain) => [chain.entries.map((one) => one.id), chain.current.id])).toEqual([
        [ids, ids[2]],
      ])
    })

    it.each<Record<string, string>>([{}, { sort: 'measured' }, { sort: '-measured' }])(
      'in the CSV, sorted by %o',
      async (query) => {
        const { response } = await call(file, {
          cookie: qa.cookie,
          params: { code: study.code },
          query: { format: 'csv', changed: 'corrected or voided', ...query },
        })
        expect(response.status).toBe(200)
        const [head, ...lines] = (await response.text()).replace('\uFEFF', '').trim().split('\r\n')
        const [typed, counts] = ['as typed', 'counts'].map((title) => head!.split(',').indexOf(title))
        expect(
          lines
            .map((line) => line.replace('"5,44"', '5;44').split(','))
            .map((cells) => [cells[typed!], cells[counts!]]),
        ).toEqual([
          ['5.2', 'superseded'],
          ['5.46', 'superseded'],
          ['5;44', 'now'],
        ])
      },
    )

    it('in the PDF of the case', async () => {
      const proposal = {
        kind: 'real time',
        proposedMonths: 12,
        storageStatement: 'closed, at or below 25 °C',
      }
      const made = await call(draft, {
        cookie: formulator.cookie,
        body: { id: newId(), studyId: study.id, ...proposal },
      })
      const params = { code: made.body.code as string }
      const drafted = await call(oneCase, { cookie: formulator.cookie, params })
      const forward = await call(putForward, {
        cookie: formulator.cookie,
        params,
        body: { version: drafted.body.version },
      })
      expect(forward.status).toBe(200)
      const { version, contentSha256 } = (await call(oneCase, { cookie: qa.cookie, params })).body
      const signed = await call(sign, {
        cookie: qa.cookie,
        params,
        body: { id: newId(), version, contentSha256, meaning: 'approve', password },
      })
      expect(signed.status).toBe(200)
      const { response } = await call(report, { cookie: qa.cookie, params })
      const text = pdfText(new Uint8Array(await response.arrayBuffer()))
        .join(' ')
        .replace(/\s+/g, ' ')
      // Lines that break within a word leave a hyphen.
      const row = (value: string, says: string) => `pH ${value} [^;]*?; ${says}`
      expect(text.replace(/-? :/g, ':')).toMatch(
        new RegExp(
          [
            row('5\\.2 5\\.40', 'superseded T1-1 \\D+26 '),
            row('5\\.46 5\\.46', 'superseded: read from the wrong line T1-1 \\D+26 '),
            row('5,44 5\\.44', 'stands now: second buffer '),
          ].join(''),
        ),
      )
    }, 60_000)
  })
})
