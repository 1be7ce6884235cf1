import { describe, expect, it } from 'vitest'
import { findTopic } from '@/lib/science/calc/topics'
import { ScienceError } from '@/lib/science/guard'

// Every figure here follows from exact decimal arithmetic, done by hand: the source is the rule's own text.

async function run(name: string, input: unknown): Promise<Record<string, unknown>> {
  return (await findTopic(name))!.run(input) as Record<string, unknown>
}

async function fieldRefused(name: string, input: unknown): Promise<string> {
  try {
    await run(name, input)
  } catch (error) {
    if (error instanceof ScienceError) return error.field
    throw error
  }
  return 'none'
}

const rulesOf = (finding: Record<string, unknown>) =>
  (finding.rules as { rule: string; level: string; at: number }[]).map((r) => `${r.rule} ${r.level} ${r.at}`)

describe('numbers typed as decimals are judged as decimals', () => {
  it('a reading on the edge is not beyond it: 5.43 + 0.30 = 5.73, 110 % of 8.7 = 9.57', async () => {
    const shift = await run('drift', {
      times: [0, 1],
      values: [5.43, 5.73],
      tolerance: { kind: 'shift', below: 0.3, above: 0.3 },
      endTime: 26,
      repeatabilitySd: 0.1,
    })
    expect(shift.band).toEqual({ lower: 5.13, upper: 5.73 })
    expect(rulesOf(shift)).toEqual(['edge flag 1'])
    const percent = await run('drift', {
      times: [0, 1],
      values: [8.7, 9.57],
      tolerance: { kind: 'percent', below: 10, above: 10 },
      endTime: 26,
      repeatabilitySd: 0.5,
    })
    expect(percent.band).toEqual({ lower: 7.83, upper: 9.57 })
    expect(rulesOf(percent)).toEqual(['edge flag 1'])
  })

  it('one hundredth beyond it is beyond', async () => {
    const finding = await run('drift', {
      times: [0, 1],
      values: [5.43, 5.74],
      tolerance: { kind: 'shift', below: 0.3, above: 0.3 },
      endTime: 26,
      repeatabilitySd: 0.1,
    })
    expect(rulesOf(finding)).toEqual(['out doubt 1'])
  })

  it('the edge rule holds from 0.8 on: 5.8 of 5 to 6', async () => {
    const at = (value: number) =>
      run('drift', {
        times: [0, 1],
        values: [5, value],
        tolerance: { kind: 'range', lower: 4, upper: 6 },
        endTime: 26,
        repeatabilitySd: 0.2,
      })
    expect(rulesOf(await at(5.8))).toEqual(['edge flag 1'])
    expect(rulesOf(await at(5.79))).toEqual([])
  })

  it('a jump is more than 7 s, replicates more than 3.6 s apart, two jars more than 2.8 s: exactly that is not', async () => {
    const with_ = (times: number[], values: unknown[], repeatabilitySd: number) =>
      run('drift', {
        times,
        values,
        tolerance: { kind: 'range', lower: 4, upper: 8 },
        endTime: 26,
        repeatabilitySd,
      })
    expect(rulesOf(await with_([0, 1], [5.52, 5.73], 0.03))).toEqual([])
    expect(rulesOf(await with_([0, 1], [5.52, 5.74], 0.03))).toEqual(['jump doubt 1'])
    expect(rulesOf(await with_([0, 1], [5.6, [5.52, 5.7]], 0.05))).toEqual([])
    expect(rulesOf(await with_([0, 1], [5.6, [5.52, 5.71]], 0.05))).toEqual(['spread doubt 1'])
    expect(rulesOf(await with_([0, 1, 1], [5.6, 5.51, 5.65], 0.05))).toEqual([])
    expect(rulesOf(await with_([0, 1, 1], [5.6, 5.51, 5.66], 0.05))).toEqual(['spread doubt 1'])
  })

  it('a station one s off is not beyond one s: 5.53 over 5.50 at s 0.03', async () => {
    const station = (temperatureC: number, value: number) => ({
      name: `${temperatureC} °C`,
      temperatureC,
      times: [1, 2, 3],
      values: [5.5, 5.5, value],
    })
    const stations = [station(5, 5.6), station(25, 5.53), station(40, 5.6)]
    const day = await run('instrument-day', { stations, at: 3, repeatabilitySd: 0.03 })
    expect(day.median).toBeCloseTo(10 / 3, 10)
    expect(day.evidence).toMatchObject({ beyondOne: 2 })
    expect(day.shift).toBe(false)
  })

  it('74 % of the volume is not above 0.74, and a trace is not lost from a sum', async () => {
    const lines = (percents: number[]) =>
      percents.map((percent, i) => ({ percent, density: 0.9, internal: i < percents.length - 1 }))
    expect(await run('phase-fraction', { lines: lines([0.1, 0.2, 73.7, 26]) })).toMatchObject({
      totalPercent: 100,
      highInternalPhase: false,
    })
    expect(await run('phase-fraction', { lines: lines([74.01, 25.99]) })).toMatchObject({
      highInternalPhase: true,
    })
    const traces = await run('phase-fraction', { lines: lines([1e-7, 3e-7]) })
    expect(traces.totalPercent).toBe(4e-7)
    expect(traces.internalMassPercent).toBeCloseTo(25, 10)
  })
})

describe('what has no value is null, and what has one is not', () => {
  const still = { tolerance: { kind: 'range', lower: 4, upper: 6 }, endTime: 26 }

  it('no p of a slope without residual variation', async () => {
    const line = await run('drift', { times: [0, 1, 2, 3, 4], values: [5, 5.1, 5.2, 5.3, 5.4], ...still })
    expect(line.slope).toBeCloseTo(0.1, 12)
    expect(line.slopeP).toBeNull()
    expect((await run('drift', { times: [0, 1, 2], values: [5, 5, 5], ...still })).slopeP).toBeNull()
  })

  it('an initial alone has used nothing of its band', async () => {
    expect((await run('drift', { times: [0], values: [5], ...still })).used).toBe(0)
  })
})

describe('order and field names of the input', () => {
  it('drift takes the coldest station in any order', async () => {
    const input = (order: number[]) => ({
      times: [0, 1, 2, 3, 4, 6],
      values: [5.5, 5.6, 5.61, 5.7, 5.76, 5.9],
      tolerance: { kind: 'shift', below: 0.5, above: 0.5 },
      endTime: 26,
      repeatabilitySd: 0.03,
      coldest: {
        times: order.map((i) => [1, 2, 3, 4, 6][i]),
        values: order.map((i) => [5.61, 5.63, 5.69, 5.77, 5.9][i]),
      },
    })
    const sorted = await run('drift', input([0, 1, 2, 3, 4]))
    expect(sorted.standing).toBe('leaning')
    expect(await run('drift', input([4, 2, 0, 3, 1]))).toEqual(sorted)
  })

  it('a refusal names the field that was given', async () => {
    const stations = [5, 25, 40].map((temperatureC) => ({
      name: `${temperatureC}`,
      temperatureC,
      times: [1, 2],
      values: [5.5, 5.5],
    }))
    const day = { stations, at: 2, repeatabilitySd: 0.03 }
    const cold = [{ ...stations[0]!, temperatureC: -300 }, ...stations.slice(1)]
    expect(await fieldRefused('instrument-day', { ...day, stations: cold })).toBe('stations[0].temperatureC')
    const huge = [stations[0]!, { ...stations[1]!, values: [1, 1e308] }, stations[2]!]
    expect(await fieldRefused('instrument-day', { ...day, stations: huge })).toBe('stations[1].values')
    const near = { temperaturesC: [1e-300, 2e-300, 3e-300], rates: [1, 2, 3] }
    expect(await fieldRefused('arrhenius', near)).toBe('temperaturesC')
  })
})

describe('mean kinetic temperature', () => {
  it('tends to the harmonic mean of the absolute temperatures as the enthalpy vanishes, under the mean', async () => {
    // ΔH → 0 in the formula of USP <1160>: 1/T = mean of 1/Tᵢ. For 250 and 350 K that is 2·250·350/600 K.
    const { mktC, meanC } = await run('mkt', { temperaturesC: [-23.15, 76.85], deltaHkJ: 1e-6 })
    expect(meanC).toBeCloseTo(26.85, 10)
    expect(mktC as number).toBeCloseTo((2 * 250 * 350) / 600 - 273.15, 4)
  })
})
