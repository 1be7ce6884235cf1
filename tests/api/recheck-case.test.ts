import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { mkdtempSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { createElement, type ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as frozenContent } from '@/app/api/cases/[code]/content/route'
import { GET as oneCase } from '@/app/api/cases/[code]/route'
import { GET as report } from '@/app/api/cases/[code]/report/route'
import { CarryTable } from '@/components/shelf-case/carry-table'
import { RestsOn } from '@/components/shelf-case/rests-on'
import { signFinished } from '@/lib/cli/seed/cases'
import { openFilling } from '@/lib/cli/seed/context'
import { layGround, tellFinished } from '@/lib/cli/seed/finished'
import { answerFlags } from '@/lib/cli/seed/flags'
import { findTopic } from '@/lib/science/calc/topics'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { calculationsOf, figuresOf, isSame } from '@/lib/shelf-case/rules/recheck'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { pdfText } from '../support/pdf-text'

const root = path.resolve(import.meta.dirname, '../..')
let t: TestDatabase
let qa: Signed
/** The demo's signed case, as anyone downloads it. */
let bytes: string
let content: CaseContent

beforeAll(async () => {
  t = await testDatabase()
  const open = openFilling(t.url('stillstand_seed'))
  const ground = await layGround(open, () => {})
  const finished = await tellFinished(ground, () => {})
  await answerFlags(ground.filling)
  await signFinished(ground.filling, finished)
  await open.close()
  qa = await t.person('qa')
  const { response } = await call(frozenContent, { cookie: qa.cookie, params: { code: 'C-001' } })
  bytes = await response.text()
  content = JSON.parse(bytes) as CaseContent
}, 120_000)
afterAll(() => t.close())

const calc = (topic: string, input: unknown) =>
  spawnSync(process.execPath, [path.join(root, 'lib/cli/calc.mjs'), topic], {
    cwd: root,
    input: JSON.stringify(input),
    encoding: 'utf8',
  })

function recheck(changed: string) {
  const file = path.join(mkdtempSync(path.join(tmpdir(), 'recheck-')), 'case.json')
  writeFileSync(file, changed)
  const tsx = path.join(root, 'node_modules/.bin/tsx')
  const { status, stdout, stderr } = spawnSync(tsx, [path.join(root, 'lib/cli/recheck.ts'), file], {
    cwd: root,
    encoding: 'utf8',
  })
  return { status, stdout, stderr }
}

/** Members in one order, numbers as JavaScript writes them: every digit. */
const digits = (value: unknown): string =>
  JSON.stringify(value, (_, member: unknown) =>
    member !== null && typeof member === 'object' && !Array.isArray(member)
      ? Object.fromEntries(Object.entries(member).sort(([a], [b]) => (a < b ? -1 : 1)))
      : member,
  )

describe('the signed case of the demo', () => {
  it('is given byte for byte: its SHA-256 is the one that was signed', async () => {
    const row = await t.owner
      .selectFrom('signature')
      .select('contentSha256')
      .where('meaning', '=', 'approve')
      .executeTakeFirstOrThrow()
    expect(createHash('sha256').update(bytes, 'utf8').digest('hex')).toBe(row.contentSha256)
    expect(content.format).toBe('stillstand-case-2')
    // Everything that three batches over two years left on record, and still no large file.
    expect(bytes.length).toBeLessThan(250_000)
  })

  it('comes out of calc again in every digit, calculation by calculation', () => {
    const stated = calculationsOf(content)
    const topics = new Set(stated.map((one) => one.topic))
    expect([...topics].sort()).toEqual(['drift', 'extrapolation-cap', 'mkt', 'separation', 'shelf-life'])
    for (const topic of topics) {
      // The longest input of each topic through the command itself; all of them below.
      const one = stated
        .filter((s) => s.topic === topic)
        .reduce((a, b) => (JSON.stringify(b.input).length > JSON.stringify(a.input).length ? b : a))
      const { status, stdout, stderr } = calc(topic, one.input)
      expect({ status, stderr }, one.where).toEqual({ status: 0, stderr: '' })
      expect(digits(JSON.parse(stdout)), one.where).toBe(digits(one.output))
    }
  })

  it('and figure by figure: recheck finds the same everywhere', () => {
    const { status, stdout, stderr } = recheck(bytes)
    expect({ status, stderr, different: stdout.match(/^ +DIFFERENT.*$/gm) }).toEqual({
      status: 0,
      stderr: '',
      different: null,
    })
    const [[calculations], [figures]] = [...stdout.matchAll(/: (\d+) of \1 the same in every digit/g)].map(
      (found) => [Number(found[1])],
    ) as [[number], [number]]
    // Every series of the station, every shelf and every jar drawn, the cap and the station's log.
    expect(calculations).toBe(calculationsOf(content).length)
    expect(calculations).toBeGreaterThan(60)
    expect(figures).toBeGreaterThan(60)
  })

  it('a digit changed anywhere is found and named', async () => {
    const different = async (edit: (copy: CaseContent) => void) => {
      const copy = JSON.parse(bytes) as CaseContent
      edit(copy)
      const calculations = await Promise.all(
        calculationsOf(copy).map(async ({ where, topic, input, output }) => ({
          what: `${where}: ${topic}`,
          stated: output,
          again: (await findTopic(topic))!.run(input),
        })),
      )
      return [...calculations, ...figuresOf(copy)].filter((one) => !isSame(one)).map((one) => one.what)
    }
    const viscosity = (c: CaseContent) => c.attributes.find((a) => a.attribute === 'viscosity')!
    expect(await different(() => {})).toEqual([])
    for (const [edit, what] of [
      [(c) => nextDigit(viscosity(c).calc!.output.batches[0]!, 'slope'), /Viscosity.*shelf-life$/],
      [(c) => nextDigit(c.temperatureRecord!.calc.output, 'mktC'), /mkt$/],
      [(c) => (c.cap!.output.capMonths += 1), /^cap: extrapolation-cap$/],
      [(c) => (viscosity(c).supportedMonths += 1), /^Viscosity: supported months$/],
      [(c) => nextDigit(viscosity(c).worst!, 'value'), /^Viscosity: worst latest reading$/],
      [(c) => (c.dataMonths += 1), /^months of data$/],
      [(c) => (readOf(c).value! += 100), /^Viscosity: what the regression was given, from the readings$/],
      [(c) => (c.temperatureRecord!.excursions[0]!.hours -= 24), /^excursions of the station$/],
      [(c) => (c.shelves[0]!.jars[1]!.percent += 0.1), /percent and standing of each jar$/],
    ] satisfies [(c: CaseContent) => void, RegExp][]) {
      const found = await different(edit)
      expect(
        found.some((name) => what.test(name)),
        `${String(what)} in ${found.join('; ')}`,
      ).toBe(true)
    }
    const { status, stdout } = recheck(bytes.replace('"capMonths":36', '"capMonths":48'))
    expect(status).toBe(1)
    expect(stdout).toMatch(/DIFFERENT {2}cap: extrapolation-cap\n +stated .*48.*\n +again .*36/)
  }, 60_000)

  it('what is no frozen case is refused in a sentence', () => {
    for (const text of ['not JSON', '{"format":"stillstand-case-2"}']) {
      const { status, stdout, stderr } = recheck(text)
      expect({ status, stdout }, text).toEqual({ status: 2, stdout: '' })
      expect(stderr).toMatch(/^[^\n]+\.\n$/)
    }
  }, 60_000)
})

const readOf = (c: CaseContent) =>
  c.readings.find((r) => r.attribute === 'viscosity' && r.station === c.station.name)!

/** The neighbouring number: the smallest change there is. */
function nextDigit<K extends string>(holder: Record<K, number>, key: K): void {
  const view = new DataView(new ArrayBuffer(8))
  view.setFloat64(0, holder[key])
  view.setBigInt64(0, view.getBigInt64(0) + 1n)
  holder[key] = view.getFloat64(0)
}

describe('what is printed', () => {
  const answers = () => {
    const again = (topic: string, input: unknown) =>
      JSON.parse(calc(topic, input).stdout) as Record<string, any> // eslint-disable-line @typescript-eslint/no-explicit-any -- the answers of five topics
    return {
      cap: again('extrapolation-cap', content.cap!.input),
      mkt: again('mkt', content.temperatureRecord!.calc.input),
      fits: content.attributes.flatMap((a) =>
        a.calc ? [{ a, fit: again('shelf-life', a.calc.input) }] : [],
      ),
    }
  }
  const p = (test: { p: number } | undefined) =>
    !test ? '' : test.p < 0.001 ? 'under 0.001' : test.p.toFixed(3)
  const sign = (value: number) => (value < 0 ? '\u2212' : '+')

  it('in the PDF is what calc answers, rounded as displayed', async () => {
    const { response } = await call(report, { cookie: qa.cookie, params: { code: 'C-001' } })
    const [first, ...pages] = pdfText(new Uint8Array(await response.arrayBuffer())).map((page) =>
      page.replace(/\s+/g, ' '),
    ) as [string]
    const second = pages.slice(0, 2).join(' ')
    const { cap, mkt, fits } = answers()
    const separated = content.attributes.find((a) => a.attribute === 'separation')!
    expect(first).toContain(`The evidence supports ${content.supportedMonths} months.`)
    expect(first).toContain(
      `The rule for ${Math.floor(content.cap!.input.dataMonths)} months of data allows ${Math.floor(cap['capMonths'])}.`,
    )
    expect(first).toContain(`Separation at most 2 % ${separated.worst!.value.toFixed(1)} %`)
    for (const { a, fit } of fits) {
      const crossing = fit['crossing'] === null ? 60 : fit['crossing']
      const months = Math.floor(Math.min(crossing, cap['capMonths']))
      expect(first).toMatch(new RegExp(`${a.label} .*?${months} months, statistics`))
      const deciding =
        fit['batches'].find((b: { name: string }) => b.name === fit['limitingBatch']) ?? fit['batches'][0]
      const slope = a.scale.includes('logarithm')
        ? `${Math.abs(100 * Math.expm1(deciding.slope)).toFixed(2)} %`
        : Math.abs(deciding.slope).toFixed(3)
      const tests = ['slopes', 'intercepts'].map((name) =>
        p(fit['tests'].find((x: { name: string }) => x.name === name)),
      )
      const n = a.calc!.input.batches.flatMap((b) => b.y).length
      const meets = fit['crossing'] === null ? 'past 60' : fit['crossing'].toFixed(1)
      const row = [a.label, n, fit['model'], `${sign(deciding.slope)}${slope}`, ...tests, meets]
      expect(second).toContain(row.join(' '))
      const back = (y: number) => (a.scale.includes('share') ? 100 * Math.exp(y) : y)
      for (const [side, word] of [
        ['lower', 'down'],
        ['upper', 'up'],
      ] as const) {
        const limit = a.calc!.input.limit[side]
        if (limit === undefined) continue
        const shown = back(limit).toFixed(a.attribute === 'ph' ? 2 : a.attribute === 'mass' ? 1 : 0)
        expect(`${first} ${second}`).toContain(`allowed ${word} to ${shown.replace('-', '\u2212')}`)
      }
    }
    const entries = content.temperatureRecord!.calc.input.temperaturesC.length
    expect(second).toContain(
      `Mean kinetic temperature ${mkt['mktC'].toFixed(1)} °C, mean ${mkt['meanC'].toFixed(1)} °C, ${mkt['minC'].toFixed(1)} to ${mkt['maxC'].toFixed(1)} °C, from ${entries} entries`,
    )
    for (const { hours, worstC } of content.temperatureRecord!.excursions)
      expect(second).toContain(`${Math.round(hours)} h, ${worstC.toFixed(1)} °C at the worst`)
    // Under every jar that has room: percent of its fill, by the separation of its own layers.
    const own = content.shelves.filter((s) => s.temperatureC === content.station.temperatureC)
    for (const shelf of own) {
      const shown = shelf.jars.map((jar) => (jar.calc ? jar.calc.output.percent : 0).toFixed(1))
      expect(first.replace('° C', '°C')).toContain(`${shelf.batch} ${shown.join(' ')}`)
    }
  }, 60_000)

  it('on the page is the same', async () => {
    const { body: detail } = await call(oneCase, { cookie: qa.cookie, params: { code: 'C-001' } })
    expect(digits(detail.content)).toBe(digits(content))
    const { cap, mkt, fits } = answers()
    const text = (page: ReactElement) =>
      renderToStaticMarkup(page)
        .replace(/<[^>]+>/g, ' ')
        .replace(/\s+/g, ' ')
    const when = content.putForward.at
    const table = text(createElement(CarryTable, { content, when }))
    for (const { a, fit } of fits) {
      const deciding =
        fit['batches'].find((b: { name: string }) => b.name === fit['limitingBatch']) ?? fit['batches'][0]
      const tests = ['slopes', 'intercepts'].map((name) =>
        p(fit['tests'].find((x: { name: string }) => x.name === name)),
      )
      const meets = fit['crossing'] === null ? 'past 60' : fit['crossing'].toFixed(1)
      const row = [deciding.residualSd.toPrecision(2), ...tests.filter(Boolean), meets]
      expect(table).toContain(row.join(' '))
      expect(table).toContain(a.label)
    }
    const rests = text(
      createElement(RestsOn, {
        content,
        detail,
        whyFewer: '',
        months: content.proposal.months,
        kind: detail.kind,
      }),
    )
    expect(rests).toMatch(new RegExp(`mean kinetic ${mkt['mktC'].toFixed(1)} °C ?, one excursion`))
    expect(rests).toContain(`${cap['rule']}: ${Math.floor(cap['capMonths'])} months`)
    const worst = Math.max(
      ...content.shelves
        .filter((s) => s.temperatureC === 40)
        .flatMap((s) => s.jars.map((jar) => jar.calc?.output.percent ?? 0)),
    )
    expect(rests).toContain(`at most ${worst.toFixed(1)} % came apart in 6 months`)
  }, 60_000)
})
