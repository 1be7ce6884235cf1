import { describe, expect, it } from 'vitest'
import { driftTopic } from '@/lib/science/calc/drift'
import { assessSeries } from '@/lib/science/drift'
import type { SeriesInput, SeriesReading } from '@/lib/science/series'
import { driftCalculation, findingOf } from '@/lib/shelf-case/rules/drift-calculation'

let made = 0
const reading = (week: number, values: number[], more: Partial<SeriesReading> = {}): SeriesReading => {
  made += 1
  return { id: `r${made}`, jar: `j${made}`, time: week, day: `day ${week}`, values, doubts: [], ...more }
}

const ph = (readings: SeriesReading[], more: Partial<SeriesInput> = {}): SeriesInput => ({
  attribute: 'ph',
  tolerance: { kind: 'shift', below: 0.3, above: 0.3 },
  endTime: 52,
  repeatabilitySd: 0.03,
  isSeparation: false,
  initial: [5.6, 5.62],
  initialTime: 0,
  readings,
  ...more,
})

/** What a case prints of a series: band, use and, day by day, mean and standing. */
const told = ({ band, initial, used, standing, latest, points }: ReturnType<typeof assessSeries>) => ({
  ...{ band, initial, used, standing, latest },
  points: points.map((p) => ({ time: p.time, mean: p.mean, counted: p.counted, standing: p.standing })),
})

const steady = [1, 2, 4, 6, 8].map((week) => reading(week, [5.61, 5.6]))

function expectSame(series: SeriesInput) {
  const frozen = driftCalculation(series)!
  expect(told(findingOf(frozen.input))).toEqual(told(assessSeries(series)))
  // Through JSON and back, as a frozen case is read, nothing is lost.
  const again = driftTopic.run(JSON.parse(JSON.stringify(frozen.input)))
  expect(JSON.stringify(again)).toBe(JSON.stringify(frozen.output))
}

describe('a series as topic drift takes it', () => {
  it('steady, with replicates and two jars of one pull', () => {
    expectSame(ph([...steady, reading(12, [5.6]), { ...reading(12, [5.64]), day: 'day 12' }]))
  })

  it('with a reading that jumped and was set right by a repeat', () => {
    const jumped = reading(12, [5.2])
    expectSame(ph([...steady, jumped, reading(12.4, [5.22], { isRepeatOf: jumped.id, day: 'day 12.4' })]))
  })

  it('with a jump that waits for its repeat, and one that a person set aside', () => {
    expectSame(ph([...steady, reading(12, [5.2])]))
    const settled = reading(12, [5.38], { doubts: [{ reason: 'jump', settled: true }] })
    const series = ph([...steady, settled, reading(16, [5.4])])
    expect(driftCalculation(series)!.input.settled).toEqual([{ time: 12, rule: 'jump' }])
    expectSame(series)
  })

  it('leaves out what takes no part: doubted from outside, or set aside by QA', () => {
    const series = ph([
      ...steady,
      reading(12, [5.1], { doubts: [{ reason: 'torque', settled: false }] }),
      reading(16, [4.9], { isSetAside: true }),
      reading(20, [5.58]),
    ])
    expect(driftCalculation(series)!.input.times).toEqual([1, 2, 4, 6, 8, 20])
    expect(findingOf(driftCalculation(series)!.input).latest).toBe(assessSeries(series).latest)
  })

  it('with several watch jars, of which the worst counts', () => {
    expectSame(
      ph(
        [
          reading(4, [0]),
          ...[reading(8, [0.5]), reading(8, [1.5])],
          ...[reading(12, [1]), reading(12, [1.75])],
        ],
        {
          attribute: 'separation',
          tolerance: { kind: 'range', upper: 2 },
          isSeparation: true,
          detectionLimit: 2,
          repeatabilitySd: 2,
          initial: [0],
        },
      ),
    )
  })

  it('is none where nothing was read', () => {
    expect(driftCalculation(ph([]))).toBeNull()
  })
})
