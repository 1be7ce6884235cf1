import { spawnSync } from 'node:child_process'
import path from 'node:path'
import fc from 'fast-check'
import { beforeAll, describe, expect, it } from 'vitest'
import { isFiniteThroughout, ScienceError } from '@/lib/science/guard'
import { allTopics, findTopic, topicNames } from '@/lib/science/calc/topics'
import type { Topic } from '@/lib/science/calc/topic'

const root = path.resolve(import.meta.dirname, '../..')

function calc(args: string[], input: string) {
  const command = [path.join(root, 'lib/cli/calc.mjs'), ...args]
  const { status, stdout, stderr } = spawnSync(process.execPath, command, { input, encoding: 'utf8' })
  return { status, stdout, stderr }
}

let topics: Topic[]
beforeAll(async () => {
  topics = await allTopics()
})

describe('calc as a command', { timeout: 60_000 }, () => {
  it('answers with one JSON object on stdout', () => {
    const { status, stdout, stderr } = calc(['viscosity'], '{"torquePercent":62,"factor":1000}')
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' })
    expect(JSON.parse(stdout)).toEqual({
      mPas: 62000,
      fullScalemPas: 100000,
      errorPercent: 100 / 62,
      doubt: null,
    })
  })

  it('exits 2 with one line on stderr that names the field, and nothing on stdout', () => {
    for (const [args, input, line] of [
      [['regression'], '{"x":["a",2,3],"y":[1,2,3]}', 'x[0]: must be a number, not the text "a"\n'],
      [['regression'], '', 'input: is empty; see calc regression --help\n'],
      [['regression'], '{"x":', /^input: is not valid JSON: [^\n]+\n$/],
      [['nothing'], '{}', /^topic: there is no "nothing"; topics are regression, [^\n]+jar-plan\n$/],
      [[], '{}', /^topic: is missing; topics are regression, [^\n]+\n$/],
    ] as const) {
      const { status, stdout, stderr } = calc([...args], input)
      expect({ status, stdout }).toEqual({ status: 2, stdout: '' })
      if (typeof line === 'string') expect(stderr).toBe(line)
      else expect(stderr).toMatch(line)
    }
  })

  it('lists its topics, and shows input, output and a worked example of each', () => {
    const help = calc(['--help'], '')
    expect(help.status).toBe(0)
    for (const name of topicNames) expect(help.stdout).toContain(`  ${name} `)
    const own = calc(['mkt', '--help'], '')
    expect(own.stdout).toContain('Input:  {temperaturesC:[], hoursEach?:[], deltaHkJ?:83.144}')
    expect(own.stdout).toContain('  deltaHkJ       activation enthalpy in kJ/mol; 83.144 if left out\n')
    expect(own.stdout).toContain('"mktC": 25.26373')
  })
})

describe('topics', () => {
  it('are the twenty that are promised', () => {
    expect(topicNames).toEqual(topics.map((topic) => topic.name))
    expect(topicNames).toHaveLength(20)
  })

  it('each explain every field of input and output, and no other', () => {
    for (const { name, input, output, fields, example } of topics) {
      for (const [part, line, sample] of [
        ['input', input, example.input],
        ['output', output, example.output],
      ] as const) {
        const explained = Object.keys(fields[part])
        for (const path of pathsOf(sample)) {
          expect(
            explained.some((field) => path === field || path.startsWith(`${field}.`)),
            `${name} ${path}`,
          ).toBe(true)
        }
        const words = line.match(/\w+/g)!
        for (const word of explained.flatMap((field) => field.match(/\w+/g)!)) {
          expect(words, name).toContain(word)
        }
      }
    }
  })

  it('take a hundred thousand values as they take ten', { timeout: 60_000 }, () => {
    const many = Array.from({ length: 1.5e5 }, (_, i) => 20 + (i % 7))
    const run = (name: Topic['name'], input: unknown) =>
      topics.find((topic) => topic.name === name)!.run(input)
    expect(run('outlier', { values: many })).toMatchObject({ outlier: false })
    expect(run('mkt', { temperaturesC: many })).toMatchObject({ minC: 20, maxC: 26 })
    expect(run('arrhenius', { temperaturesC: many, rates: many })).toMatchObject({ curvature: {} })
  })

  it('each compute their worked example', () => {
    for (const topic of topics) expectClose(topic.run(topic.example.input), topic.example.output, topic.name)
  })

  it.each([
    ['regression', { x: [1, 2, 3] }, 'y: is missing'],
    [
      'regression',
      { x: [1, 2, 3], y: [1, 2, 3], confidance: 0.9 },
      /^confidance: is not a field here; known are x, y,/,
    ],
    [
      'shelf-life',
      { batches: 3, limit: {}, direction: 'either', horizon: 9 },
      'batches: must be a list, not 3',
    ],
    [
      'shelf-life',
      { batches: [{ name: 'A', t: [0, 1, 2], y: [1, 2, null] }], limit: {}, direction: 'either', horizon: 9 },
      'batches[0].y[2]: must be a number, not null',
    ],
    [
      'shelf-life',
      { batches: [{ name: 'A', t: [0, 1, 2], y: [1, 2, 3] }], limit: {}, direction: 'up', horizon: 9 },
      'direction: must be one of decreasing, increasing, either, not "up"',
    ],
    [
      'phase-fraction',
      { lines: [{ percent: 1, density: 1, internal: 'yes' }] },
      /^lines\[0\]\.internal: must be true or false/,
    ],
    [
      'shelf-life',
      { batches: [{ name: 'A', t: [0, 1, 2], y: [1, 2, 3] }], limit: {}, direction: 'either', horizon: 9 },
      'limit: needs a lower or an upper limit for direction "either"',
    ],
    ['regression', { x: [1, 2, 3], y: [1, 2] }, 'y: needs at least 3 values, has 2'],
    ['regression', { x: [1, 2, 3, 4], y: [1, 2, 3] }, 'y: has 3 values, but x has 4'],
    ['regression', { x: [2, 2, 2], y: [1, 2, 3] }, 'x: has no spread: all values are equal'],
    ['separation-curve', { t: [2, 2, 2], percent: [0, 0, 3] }, 't: has no spread: all times are equal'],
    ['mkt', { temperaturesC: [20, -273.15] }, 'temperaturesC[1]: -273.15 °C is not above absolute zero'],
    [
      'accelerated-age',
      { storageC: 25, acceleratedC: -300, q10: 2, targetMonths: 12 },
      'acceleratedC: -300 °C is not above absolute zero',
    ],
    ['arrhenius', { temperaturesC: [25, 37, 45], rates: [1, 0, 2] }, 'rates[1]: must be above 0, not 0'],
    [
      'phase-fraction',
      { lines: [{ percent: 1, density: 0, internal: true }] },
      'lines[0].density: must be above 0, not 0',
    ],
    [
      'separation',
      { totalMm: 40, topMm: 21, bottomMm: 20 },
      'bottomMm: and topMm together are higher than the fill of 40',
    ],
    ['outlier', { values: [1, 2] }, 'values: needs at least 3 values, has 2'],
    [
      'ph-slope',
      { points: [{ bufferPh: 7, mV: 1 }], temperatureC: 25 },
      'points: needs at least 2 points, has 1',
    ],
    [
      'buffer-ph',
      { buffer: 'x'.repeat(99), temperatureC: 25 },
      `buffer: must be one of phthalate, phosphate, borax, not "${'x'.repeat(30)}…"`,
    ],
    [
      'centrifuge',
      { rpm: 1, radiusMm: 1, 'a\nb': 1 },
      '"a\\nb": is not a field here; known are rpm, radiusMm',
    ],
    ['viscosity', { torquePercent: 1, factor: 2, rpm: 3 }, /^factor: stands for spindleConstant and rpm/],
    ['viscosity', { torquePercent: 1 }, 'factor: is missing'],
    ['separation', { totalMm: 40, topMm: 41, bottomMm: 0 }, 'topMm: is higher than the fill of 40'],
    [
      'drift',
      { times: [0, 1], values: [1], tolerance: { kind: 'shift' }, endTime: 9 },
      /^values: has 1 value, but times has 2/,
    ],
    [
      'drift',
      { times: [0], values: [1], tolerance: { kind: 'shift' }, endTime: 9 },
      /^tolerance: gives no limit/,
    ],
    [
      'drift',
      { times: [0], values: [[]], tolerance: { kind: 'shift', below: 1 }, endTime: 9 },
      /^values\[0\]: is an empty list/,
    ],
    [
      'drift',
      { times: [0], values: [9], tolerance: { kind: 'range', upper: 5 }, endTime: 9 },
      'initial: 9 lies outside its own band',
    ],
    [
      'drift',
      { times: [0], values: [1], tolerance: { kind: 'range', below: 5 }, endTime: 9 },
      /^tolerance\.below: does not belong/,
    ],
    ['centrifuge', { rpm: 1e300, radiusMm: 1 }, /^rpm: holds numbers too large/],
  ])('%s refuses %j', async (name, input, message) => {
    const topic = await findTopic(name)
    expect(() => topic!.run(input)).toThrow(ScienceError)
    expect(() => topic!.run(input)).toThrow(message)
  })

  it('drift takes a time given again as a repeat on a spare jar', async () => {
    const drift = (await findTopic('drift'))!
    const input = { tolerance: { kind: 'shift', below: 0.5, above: 0.5 }, endTime: 26, repeatabilitySd: 0.03 }
    const once = drift.run({ ...input, times: [0, 1, 2, 3], values: [5.5, 5.5, 5.49, 4.9] })
    expect(once).toMatchObject({ standing: 'steady' })
    const twice = drift.run({ ...input, times: [0, 1, 2, 3, 3], values: [5.5, 5.5, 5.49, 4.9, 4.92] })
    expect(twice).toMatchObject({ standing: 'out', rules: [{ rule: 'out', level: 'out', at: 3 }] })
  })

  it('drift takes the initial apart or as the earliest entry', async () => {
    const drift = (await findTopic('drift'))!
    const input = { tolerance: { kind: 'shift', below: 0.5, above: 0.5 }, endTime: 26, repeatabilitySd: 0.03 }
    const within = drift.run({ ...input, times: [0, 1, 2], values: [5.5, 5.49, 5.48] })
    expect(drift.run({ ...input, initial: 5.5, times: [1, 2], values: [5.49, 5.48] })).toEqual(within)
    expect(drift.run({ ...input, initial: 5.5, times: [0, 1, 2], values: [5.5, 5.49, 5.48] })).toEqual(within)
  })
})

describe('never NaN or Infinity, whatever stands in the input', () => {
  const wild = fc.oneof(
    fc.double({ noNaN: true, noDefaultInfinity: true }),
    fc.integer({ min: -3, max: 120 }),
    fc.constantFrom(0, -0, 1e-300, 1e300, 5e-324, Number.MAX_VALUE),
  )

  /** Fields that an example leaves to their defaults. */
  const further: Partial<Record<Topic['name'], object>> = {
    regression: { confidence: 0.9 },
    'shelf-life': { confidence: 0.9, poolingAlpha: 0.3 },
    mkt: { deltaHkJ: 65 },
    viscosity: { bandPercent: 20 },
    'separation-curve': { detectPercent: 2 },
    settling: { g: 9.81 },
    outlier: { alpha: 0.01 },
    drift: { initial: [5.5, 5.52], detectionLimit: 1, settled: [{ time: 3, rule: 'jump' }] },
  }

  /** The input with some of its numbers replaced and its lists cut: near enough to valid to reach the arithmetic. */
  function twisted(value: unknown): fc.Arbitrary<unknown> {
    if (typeof value === 'number')
      return fc.oneof({ weight: 3, arbitrary: fc.constant(value) }, { weight: 1, arbitrary: wild })
    if (Array.isArray(value)) {
      const whole = fc.tuple(...value.map(twisted))
      const cut = whole.chain((list) => fc.subarray([...list, ...list.slice(-2)]))
      return fc.oneof({ weight: 9, arbitrary: whole }, { weight: 1, arbitrary: cut })
    }
    if (value !== null && typeof value === 'object') {
      return fc.record(Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, twisted(inner)])))
    }
    return fc.constant(value)
  }

  function twistedInput(topic: Topic): fc.Arbitrary<object> {
    const more = further[topic.name] ?? {}
    return fc
      .tuple(twisted(topic.example.input), twisted(more), fc.subarray(Object.keys(more)))
      .map(([input, added, kept]) => ({
        ...(input as object),
        ...Object.fromEntries(Object.entries(added as object).filter(([key]) => kept.includes(key))),
      }))
  }

  it.each(topicNames.map((name) => [name]))('%s', async (name) => {
    const topic = (await findTopic(name))!
    fc.assert(
      fc.property(twistedInput(topic), (input) => {
        try {
          expect(isFiniteThroughout(topic.run(input))).toBe(true)
        } catch (error) {
          if (!(error instanceof ScienceError)) throw error
          expect(error.message).not.toMatch(/undefined|NaN/)
        }
      }),
      { numRuns: 200 },
    )
  })

  it.each(topicNames.map((name) => [name]))('%s refuses what is no input at all', async (name) => {
    const topic = (await findTopic(name))!
    fc.assert(
      fc.property(fc.jsonValue(), (input) => {
        expect(() => topic.run(input)).toThrow(ScienceError)
      }),
      { numRuns: 50 },
    )
  })
})

/** Every leaf of a value, list entries as []. */
function pathsOf(value: unknown, path = ''): string[] {
  if (Array.isArray(value))
    return value.flatMap((entry: unknown) => pathsOf(entry, leafless(entry) ? path : `${path}[]`))
  if (value === null || typeof value !== 'object') return [path]
  return Object.entries(value).flatMap(([key, inner]) => pathsOf(inner, path === '' ? key : `${path}.${key}`))
}

const leafless = (entry: unknown) => entry === null || typeof entry !== 'object' || Array.isArray(entry)

/** Equal up to the last digits, which differ between processors. */
function expectClose(actual: unknown, expected: unknown, at: string): void {
  if (typeof expected === 'number') {
    expect(typeof actual, at).toBe('number')
    const error = Math.abs((actual as number) - expected) / Math.max(1e-9, Math.abs(expected))
    expect(error, `${at}: ${String(actual)} against ${expected}`).toBeLessThan(1e-9)
  } else if (expected !== null && typeof expected === 'object') {
    expect(Object.keys(actual as object), at).toEqual(Object.keys(expected))
    for (const [key, value] of Object.entries(expected)) {
      expectClose((actual as Record<string, unknown>)[key], value, `${at}.${key}`)
    }
  } else {
    expect(actual, at).toBe(expected)
  }
}
