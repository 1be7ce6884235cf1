import { attributeOf } from '@/lib/reading/schema/attributes'
import { describe, expect, it } from 'vitest'
import type { Frame, FrameReading } from '@/lib/series/queries/frame'
import { assessStudy } from '@/lib/series/rules/assess'
import { repeatabilitySd, seriesUnits } from '@/lib/series/rules/input'
import { ruleSentence, sentenceContext } from '@/lib/series/rules/spoken'

const startedAt = '2026-03-02T09:00:00.000Z'
const weekMs = 604_800_000
const water = { percent: 80, density: 1, internal: true }
const oil = { percent: 20, density: 0.9, internal: false }

let count = 0
function reading(more: Partial<FrameReading> & { weeks?: number }): FrameReading {
  count += 1
  const { weeks = 0, ...rest } = more
  const measuredAt = new Date(Date.parse(startedAt) + weeks * weekMs).toISOString()
  return {
    id: `r${count}`,
    batchId: 'b',
    studyStationId: 'hot',
    pullJarId: `pj${count}`,
    jarId: `j${count}`,
    jarCode: `J${count}`,
    attribute: 'ph',
    replicate: 1,
    value: 5.5,
    word: null,
    typed: '5.50',
    instrumentId: 'meter',
    claimedAt: null,
    measuredAt,
    recordedAt: measuredAt,
    recordedBy: 'p',
    pullId: `pull${weeks}`,
    dueOn: measuredAt.slice(0, 10),
    repeatOf: null,
    detail: {},
    doubts: [],
    ...rest,
  }
}

function frame(readings: FrameReading[], flags: Frame['flags'] = []): Frame {
  const station = { isFreezeThaw: false, voice: 'decides' as const }
  return {
    study: {
      id: 'study',
      code: 'S-001',
      title: '',
      startedAt,
      endWeeks: 12,
      zone: 'Europe/Berlin',
      now: '2026-06-01T00:00:00.000Z',
      stations: [
        { id: 'cold', name: 'Fridge', temperatureC: 5, ...station },
        { id: 'room', name: 'Cabinet', temperatureC: 25, ...station },
        { id: 'hot', name: 'Oven', temperatureC: 45, ...station },
      ],
      batches: [{ id: 'b', code: 'B-1', madeAt: '2026-01-01T00:00:00.000Z', lines: [water, oil] }],
      repeats: [],
      spares: [],
      plan: {
        endWeeks: 12,
        fillG: 50,
        fillHeightMm: 50,
        lossPercent: 0,
        restHours: 24,
        retains: 0,
        initialJars: 1,
        pack: '',
        stations: [],
        attributes: [
          {
            attribute: 'ph',
            tolerance: { kind: 'shift', below: 0.5, above: 0.5 },
            replicates: 1,
            method: 'direct',
          },
          { attribute: 'separation', tolerance: { kind: 'range', upper: 2 }, replicates: 1, method: 'ruler' },
        ],
      },
    },
    readings: [reading({ studyStationId: null, pullJarId: null }), ...readings],
    flags,
  }
}
const ph = (readings: FrameReading[], flags?: Frame['flags'], station = 'hot') =>
  assessStudy(frame(readings, flags), new Set(['ph'])).assessed.find(
    (one) => one.unit.station.id === station,
  )!

describe('what a series is made of', () => {
  it('takes time from when it was measured, the day from the pull, replicates of a jar together', () => {
    const { unit, finding } = ph([
      reading({ weeks: 1, pullJarId: 'x', value: 5.5 }),
      reading({ weeks: 1, pullJarId: 'x', replicate: 2, value: 5.54 }),
    ])
    expect(unit.input.readings).toMatchObject([{ time: 1, values: [5.5, 5.54] }])
    expect(finding.latest).toBeCloseTo(5.52)
  })

  it('has no initial separation to measure: it starts from nothing', () => {
    const units = seriesUnits(frame([]), new Set(['separation']), [])
    expect(units).toHaveLength(3)
    expect(units[0]!.input).toMatchObject({ initial: [0], isSeparation: true, detectionLimit: 2 })
  })

  it('scatter: a millimetre of fill height, a share of the initial, more in a high internal phase', () => {
    const lean = {
      id: 'b',
      code: '',
      madeAt: null,
      lines: [
        { ...water, internal: false },
        { ...oil, internal: true },
      ],
    }
    const packed = { ...lean, lines: [water, oil] }
    expect(repeatabilitySd({ attribute: 'separation' }, lean, 0, 50)).toBe(2)
    expect(repeatabilitySd({ attribute: 'viscosity' }, lean, 6500, 50)).toBeCloseTo(195)
    expect(repeatabilitySd({ attribute: 'viscosity' }, packed, 180_000, 50)).toBeCloseTo(14_400)
    expect(repeatabilitySd({ attribute: 'ph' }, packed, 5.5, 50)).toBe(0.1)
  })
})

describe('doubts', () => {
  const torque = [{ reason: 'torque', sentence: 'Torque is 7 %.' }]
  it('a doubted reading takes no part until a repeat settles it', () => {
    const doubted = reading({ weeks: 1, pullJarId: 'x', value: 5.4, doubts: torque })
    expect(ph([doubted]).finding.latest).toBeNull()
    const repeat = reading({ weeks: 1.2, value: 5.48, repeatOf: 'x', dueOn: doubted.dueOn })
    expect(ph([doubted, repeat]).finding.latest).toBeCloseTo(5.48)
  })

  it('or until a person sets it aside; a reading set aside never counts', () => {
    const doubted = reading({ weeks: 1, value: 5.4, doubts: torque })
    const flag = (settles: string): Frame['flags'][number] => ({
      id: 'f',
      number: 1,
      batchId: 'b',
      studyStationId: 'hot',
      attribute: 'ph',
      rule: 'torque',
      level: 'doubt',
      readingId: doubted.id,
      instrumentId: null,
      onDay: null,
      atWeeks: 1,
      raisedAt: doubted.recordedAt,
      state: 'closed',
      settles,
      closedBy: 'p',
      wants: null,
    })
    expect(ph([doubted], [flag('doubt')]).finding.latest).toBeCloseTo(5.4)
    expect(ph([doubted], [flag('reading')]).finding.latest).toBeNull()
  })

  it('equal drift everywhere is the electrode: no station leans, and the day is the instrument’s', () => {
    const steady = [1, 2, 3].flatMap((weeks) =>
      ['cold', 'room', 'hot'].map((studyStationId) => reading({ weeks, studyStationId, value: 5.5 })),
    )
    const shifted = ['cold', 'room', 'hot'].map((studyStationId) =>
      reading({ weeks: 4, studyStationId, value: 5.9, instrumentId: 'other' }),
    )
    const { shifted: days, assessed } = assessStudy(frame([...steady, ...shifted]), new Set(['ph']))
    expect(days).toMatchObject([
      { instrumentId: 'other', attribute: 'ph', direction: 'high', day: '2026-03-30' },
    ])
    for (const { finding } of assessed) expect(finding.latest).toBeCloseTo(5.5)
  })

  it('a repeat after the instrument was named counts; one before it was named does not', () => {
    const places = ['cold', 'room', 'hot']
    const steady = [1, 2, 3].flatMap((weeks) =>
      places.map((studyStationId) => reading({ weeks, studyStationId, value: 5.5 })),
    )
    const shifted = places.map((studyStationId) =>
      reading({ weeks: 4, studyStationId, value: 5.9, pullJarId: `off ${studyStationId}` }),
    )
    const hour = 1 / 168
    const again = (weeks: number, value: number) =>
      reading({ weeks, value, repeatOf: 'off hot', dueOn: shifted[2]!.dueOn })
    const named: Frame['flags'][number] = {
      id: 'f',
      number: 1,
      batchId: 'b',
      studyStationId: null,
      attribute: 'ph',
      rule: 'common shift',
      level: 'doubt',
      readingId: null,
      instrumentId: 'meter',
      onDay: '2026-03-30',
      atWeeks: 4,
      raisedAt: new Date(Date.parse(startedAt) + (4 + 2 * hour) * weekMs).toISOString(),
      state: 'open',
      settles: null,
      closedBy: null,
      wants: null,
    }
    const latest = (more: FrameReading[]) => {
      const { shifted: days, assessed } = assessStudy(
        frame([...steady, ...shifted, ...more], [named]),
        new Set(['ph']),
      )
      expect(days).toHaveLength(1)
      return assessed.find(({ unit }) => unit.station.id === 'hot')!.finding.points.at(-1)!
    }
    expect(latest([again(4 + hour, 5.91)])).toMatchObject({ counted: false })
    expect(latest([again(4 + 3 * hour, 5.51)])).toMatchObject({ counted: true, mean: 5.51 })
  })
})

describe('sentences', () => {
  it('a look beyond the band is said in its word, not as a distance', () => {
    const context = sentenceContext(frame([]).study, frame([]).study.stations[2]!, 'look')
    const rule = {
      rule: 'out' as const,
      level: 'doubt' as const,
      at: 4,
      evidence: { mean: 2, edge: 1, side: 'upper', by: 1 },
    }
    expect(ruleSentence(rule, context, attributeOf('look'))).toBe(
      'Look at 45 °C is "changed", beyond the band. Look at a second jar before anyone worries.',
    )
  })
})
