import { describe, expect, it } from 'vitest'
import { plannedFor } from '@/lib/bench/rules'
import { planChanges } from '@/lib/protocol/rules/changes'
import { missingInPlan, planFaults } from '@/lib/protocol/rules/faults'
import { matrixed, priceOf } from '@/lib/protocol/rules/matrixing'
import { askedAt, askedWeeks, jarsAtStation, jarsOfPlan, stationName } from '@/lib/protocol/rules/plan'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { bandText, cycleText, toleranceText } from '@/lib/protocol/rules/words'
import { protocolPlan, type PlannedStation, type ProtocolPlan } from '@/lib/protocol/schema'
import { attributeOf, startsAtZero } from '@/lib/reading/schema/attributes'
import { cycleDoubts } from '@/lib/cycle/rules/shortfall'
import { toleranceBand } from '@/lib/science/band'
import { plannedJars, plansOfBatches } from '@/lib/study/rules/jars'
import { adjustedPlan } from '@/lib/study/rules/plan'
import { refuseStations } from '@/lib/study/rules/refusals'
import { chosenStations } from '@/lib/study/rules/stations'

const plan = readyMadePlan('screen', 'cream')
const refuse = (asked: ProtocolPlan, chosen: Parameters<typeof refuseStations>[1]) =>
  refuseStations(
    asked,
    chosen,
    { batchIds: ['b'], referenceIds: [] },
    {
      ...{ protocolPlan: asked, adjustments: {}, stations: [], leavings: [] },
      today: '2026-12-01',
    },
  )
const [cold, room, warm] = plan.stations as [PlannedStation, PlannedStation, PlannedStation]
const place = (id: string, temperatureC: number | null, kind = 'temperature', places = 100) => ({
  id,
  name: `Cabinet ${id}`,
  kind,
  temperatureC,
  isActive: true,
  shelves: 1,
  placesPerShelf: places,
  takenPlaces: 0,
  cycleLowC: kind === 'freeze-thaw' ? -10 : null,
  cycleHighC: kind === 'freeze-thaw' ? 25 : null,
})

describe('a plan as it is typed', () => {
  it('older plans, which say nothing of orientation, light or outside tests, still read', () => {
    expect(protocolPlan.parse(JSON.parse(JSON.stringify(plan)))).toEqual(plan)
  })

  it('windows that share a day overlap, and the sentence stands at its station with what would do', () => {
    const wide = (windowDays: number): ProtocolPlan => ({
      ...plan,
      stations: [room, { ...warm, windowDays }],
    })
    // Weekly pulls lie 7 days apart: 3 days on both sides leave one free day, 4 do not.
    expect(planFaults(wide(3))).toEqual([])
    expect(planFaults(wide(4))).toEqual([
      {
        path: 'plan.stations.1.windowDays',
        keepsFrom: 'saving',
        sentence:
          'At 40 °C the windows of week 1 and week 2 overlap. Make the window at most 3 days, or move a time point.',
      },
    ])
  })

  it('a plan without time points is kept as a draft and cannot start', () => {
    const bare = { ...plan, stations: [{ ...room, timePoints: [] }] }
    expect(planFaults(bare)).toMatchObject([{ path: 'plan.stations.0.timePoints', keepsFrom: 'starting' }])
    expect(missingInPlan(bare)).toMatch(/^The protocol has no time points at 25 °C/)
  })

  it('a foil-wrapped control wants jars in light beside it, and an own pack wants its name', () => {
    const foil: PlannedStation = { ...room, light: 'in foil' }
    expect(missingInPlan({ ...plan, stations: [foil] })).toMatch(
      /wrapped in foil has no jars in light beside it/,
    )
    expect(missingInPlan({ ...plan, stations: [foil, { ...room, light: 'exposed' }] })).toBeNull()
    const own = { ...plan, stations: [{ ...room, isOwnPack: true as const }] }
    expect(missingInPlan(own)).toMatch(/own pack, which is not named/)
    expect(missingInPlan({ ...own, ownPack: 'airless pump' })).toBeNull()
  })

  it('says what a tolerance comes to on an initial', () => {
    expect(bandText({ attribute: 'ph' }, toleranceBand({ kind: 'shift', below: 0.3, above: 0.5 }, 5.5))).toBe(
      '5.20 to 6.00',
    )
    expect(bandText({ attribute: 'viscosity' }, toleranceBand({ kind: 'percent', below: 20 }, 60_000))).toBe(
      'at least 48\u2009000 mPa·s',
    )
    expect(toleranceText({ attribute: 'ph', tolerance: { kind: 'shift', below: 0.3, above: 0.3 } })).toBe(
      'within 0.3 from the initial',
    )
  })
})

describe('jars', () => {
  it('those set aside for outside laboratories are counted, filled and kept', () => {
    const outside: ProtocolPlan = {
      ...plan,
      setAside: [
        { what: 'microbiology', jars: 2 },
        { what: 'preservative efficacy', jars: 5 },
      ],
    }
    expect(jarsOfPlan(outside, 5000).jars).toBe(jarsOfPlan(plan, 5000).jars + 7)
    const kept = plannedJars(outside, ['b']).filter((jar) => jar.setAsideFor)
    expect(kept).toHaveLength(7)
    expect(kept.every((jar) => jar.kind === 'retain' && jar.state === 'kept')).toBe(true)
    expect(plannedJars(outside, ['b'])).toHaveLength(jarsOfPlan(outside, 5000).jars)
  })

  it('a pull at which nothing is measured opens no jar, and the Bench asks for what is left', () => {
    const leftOut = plan.attributes
      .filter(({ attribute }) => ['ph', 'viscosity', 'odour', 'feel'].includes(attribute))
      .map(({ attribute }) => ({ attribute, week: 3 }))
    const thin = { ...plan, stations: [{ ...room, leftOut }, warm] }
    expect(jarsAtStation(thin, thin.stations[0]!)).toBe(jarsAtStation(plan, room) - 1)
    expect(askedAt(thin, thin.stations[0]!, 3).map((one) => one.attribute)).toEqual([
      'separation',
      'look',
      'mass',
    ])
    const jars = plannedJars(thin, ['b'])
    expect(
      jars.filter((jar) => jar.position === 0 && jar.kind === 'measuring' && jar.weeks[0] === 3),
    ).toEqual([])
    expect(jars.find((jar) => jar.position === 0 && jar.kind === 'watch')!.weeks).toContain(3)
    const jar = { asks: 'measuring', attribute: null, plan: thin }
    const asked = (position: number, timeWeeks: number) =>
      plannedFor({ ...jar, position, timeWeeks }).map((one) => one.attribute)
    expect(asked(0, 3)).toEqual([])
    expect(asked(1, 3)).toEqual(['ph', 'viscosity', 'odour', 'feel'])
  })

  it('lying jars share the station of upright ones, and its places', () => {
    const lying: PlannedStation = { ...warm, orientation: 'lying' }
    const both = { ...plan, stations: [warm, lying] }
    expect(both.stations.map(stationName)).toEqual(['40 °C', '40 °C, lying'])
    const chosen = chosenStations(both.stations, [place('a', 40)], [])
    expect(chosen.map((one) => one?.id)).toEqual(['a', 'a'])
    expect(() => refuse(both, chosen)).not.toThrow()
    const small = [place('a', 40, 'temperature', 21)]
    expect(() => refuse(both, chosenStations(both.stations, small, []))).toThrow(
      /21 free places, 22 are needed/,
    )
    expect(() => refuse({ ...plan, stations: [warm, warm] }, [small[0]!, small[0]!])).toThrow(
      /is chosen twice/,
    )
  })

  it('jars in light and in foil stand at the station that has lamps, and no other jar does', () => {
    const lit = { ...plan, stations: [{ ...room, light: 'exposed' as const }] }
    const dark = place('a', 25)
    const lamps = { ...place('b', 25), lightLux: 10_000, lightUvWm2: null }
    expect(chosenStations(lit.stations, [dark, lamps], [])).toEqual([lamps])
    expect(chosenStations([{ ...room, light: 'in foil' as const }], [dark, lamps], [])).toEqual([lamps])
    expect(chosenStations([room], [lamps], [])).toEqual([null])
    expect(() => refuse(lit, chosenStations(lit.stations, [dark], []))).toThrow(
      /^No station of the lab at 25 °C has lamps, so none can be 25 °C, in light\./,
    )
    expect(() => refuse(lit, [dark])).toThrow(
      /^Cabinet a has no lamps on record, and 25 °C, in light needs them\./,
    )
    expect(() => refuse({ ...plan, stations: [room] }, [lamps])).toThrow(
      /^Cabinet b has lamps, and 25 °C stands in the dark\./,
    )
  })
})

describe('freeze-thaw', () => {
  const cycle = { coldC: -20, coldHours: 16, warmC: 25, warmHours: 8, isFrozenThrough: true }

  it('is refused to a cabinet that cycles otherwise', () => {
    const deep = { ...plan, stations: [{ ...plan.stations[4]!, cycle }] }
    expect(() => refuse(deep, [place('f', null, 'freeze-thaw')])).toThrow(
      /cycles between −10 °C and 25 °C, the protocol between −20 °C and 25 °C/,
    )
    const asThere = { ...plan, stations: [{ ...plan.stations[4]!, cycle: { ...cycle, coldC: -10 } }] }
    expect(() => refuse(asThere, [place('f', null, 'freeze-thaw')])).not.toThrow()
    expect(cycleText(cycle)).toBe('16 h at −20 °C, frozen through, then 8 h at 25 °C')
  })

  it('a half of fewer hours than the protocol asks is a doubt, and one not frozen through only where it asks for that', () => {
    const there = { cycleLowC: -20, cycleHighC: 25 }
    const half = { cycle: 2, half: 'cold', reachedC: -20, isFrozenThrough: true, hours: 12 }
    expect(cycleDoubts(there, [half])).toEqual([])
    expect(cycleDoubts(there, [half], cycle)[0]!.sentence).toMatch(
      /^Cycle 2 fell short of what the protocol asks/,
    )
    const soft = { ...half, hours: 16, isFrozenThrough: false }
    expect(cycleDoubts(there, [soft], cycle)).toHaveLength(1)
    expect(cycleDoubts(there, [soft], { ...cycle, isFrozenThrough: false })).toEqual([])
  })
})

describe('matrixing', () => {
  const thin = matrixed(plan, ['ph'])

  it('leaves out every second of the middle time points, never the first or the last, the same at every station', () => {
    const weeks = (station: PlannedStation) => (station.leftOut ?? []).map((cell) => cell.week)
    // Of 1, 2, 3, 4, 5, 6, 8, 10 and 12.
    expect(thin.stations.slice(0, 4).map(weeks)).toEqual([1, 2, 3, 4].map(() => [2, 4, 6, 10]))
    expect(weeks(thin.stations[4]!)).toEqual([])
    expect(missingInPlan(thin)).toBeNull()
    expect(protocolPlan.parse(thin)).toEqual(thin)
  })

  it('is undone without a trace, and done twice it is the same', () => {
    expect(matrixed(thin, [])).toEqual(plan)
    expect(matrixed(thin, ['ph'])).toEqual(thin)
  })

  it('is not kept where a hand takes out the last time point', () => {
    const leftOut = [...(cold.leftOut ?? []), { attribute: 'ph' as const, week: 12 }]
    const wrong = { ...thin, stations: [{ ...cold, leftOut }] }
    expect(planFaults(wrong)).toMatchObject([{ path: 'plan.stations.0.leftOut', keepsFrom: 'saving' }])
  })

  it('follows when a study leaves out weeks', () => {
    const fewer = adjustedPlan(thin, { leaveOutWeeks: [1] })
    expect(fewer.stations[0]!.leftOut!.map((cell) => cell.week)).toEqual([3, 5, 8])
    expect(missingInPlan(fewer)).toBeNull()
  })

  it('names its price, and where a drift would not be told any more', () => {
    expect(priceOf(plan)).toEqual([])
    expect(priceOf(thin).join(' ')).toMatch(/same or shorter/)
    expect(priceOf(thin).join(' ')).not.toMatch(/fewer than five/)
    const short = matrixed({ ...plan, stations: [{ ...room, timePoints: [1, 2, 3, 4] }] }, ['ph'])
    expect(priceOf(short).join(' ')).toMatch(/At 25 °C fewer than five times are read/)
    const bracketing = { factor: 'fill size', low: '15 mL', high: '100 mL', between: '30 mL' }
    expect(priceOf({ ...plan, bracketing })[0]).toBe(
      'Only 15 mL and 100 mL are tested. That 30 mL is at least as stable as the worse of them is inferred, never shown.',
    )
  })
})

describe('matrixing over batches', () => {
  const long = readyMadePlan('long-term', 'cream')
  const third = { ...long, batchMatrixing: 'two thirds' as const }
  const measuredAt = (of: ProtocolPlan, batches: string[], references: string[] = []) =>
    plansOfBatches(of, batches, references).map(({ plan: own }) =>
      askedWeeks(own, own.stations[1]!, 'measuring'),
    )

  it('measures two of three batches at a middle time by turns; the first, month 12 and the last take all', () => {
    // 13, 26, 39, 52, 78, 104 and 156 weeks at 25 °C.
    const weeks = measuredAt(third, ['a', 'b', 'c'])
    const count = (week: number) => weeks.filter((own) => own.includes(week)).length
    expect([13, 52, 156].map(count)).toEqual([3, 3, 3])
    expect([26, 39, 78, 104].map(count)).toEqual([2, 2, 2, 2])
    // Four middle times for three batches: one rests twice, the others once.
    expect(weeks.map((own) => own.length).toSorted()).toEqual([5, 6, 6])
  })

  it('halves are balanced within one, and every batch rests on the same days at every station', () => {
    const half = { ...plan, batchMatrixing: 'half' as const }
    const weeks = measuredAt(half, ['a', 'b'])
    expect(weeks).toEqual([
      [1, 3, 5, 8, 12],
      [1, 2, 4, 6, 10, 12],
    ])
    const [first] = plansOfBatches(half, ['a', 'b'])
    const asked = first!.plan.stations.slice(0, 4).map((one) => askedWeeks(first!.plan, one, 'measuring'))
    expect(new Set(asked.map(String)).size).toBe(1)
    // The sealed jars are looked at every time, and cycles take all.
    expect(askedWeeks(first!.plan, first!.plan.stations[0]!, 'watch')).toHaveLength(9)
    expect(askedWeeks(first!.plan, first!.plan.stations[4]!, 'measuring')).toHaveLength(5)
  })

  it('saves the jars that are not opened, and a reference is measured every time', () => {
    const half = { ...plan, batchMatrixing: 'half' as const }
    const jars = plannedJars(half, ['a', 'b'], ['r'])
    const of = (id: string) => jars.filter((jar) => jar.batchId === id).length
    // Of nine pulls at four stations: five and six are measured.
    expect([of('a'), of('b'), of('r')]).toEqual([54 - 4 * 4, 54 - 4 * 3, 54])
    expect(plansOfBatches(half, ['a'])[0]!.plan).toEqual(half)
  })

  it('names its price, among it that batches cannot be compared at a middle time', () => {
    const price = priceOf(third).join(' ')
    expect(price).toMatch(
      /two thirds of the batches are measured, by turns: there batches cannot be compared/,
    )
    expect(price).toMatch(/Whether batches may be pooled is tested on fewer points/)
    expect(price).toMatch(/fewer than five times/)
    expect(planChanges(long, third)).toEqual([
      'Batches measured at a middle time point: nothing, now two thirds.',
    ])
  })
})

describe('what differs between two versions', () => {
  it('is nothing for a copy', () => expect(planChanges(plan, structuredClone(plan))).toEqual([]))

  it('is said in one sentence a difference', () => {
    const after: ProtocolPlan = {
      ...matrixed(plan, ['ph']),
      restHours: 4,
      setAside: [{ what: 'microbiology', jars: 2 }],
      attributes: plan.attributes
        .filter(({ attribute }) => attribute !== 'odour')
        .map((one) =>
          one.attribute === 'separation' ? { ...one, tolerance: { kind: 'range', upper: 3 } } : one,
        ),
    }
    after.stations = after.stations.map((one, index) =>
      index === 1 ? { ...one, timePoints: [...one.timePoints.slice(1), 16], windowDays: 2 } : one,
    )
    after.stations[4] = { ...room, temperatureC: 30 }
    expect(planChanges(plan, after)).toEqual([
      'freeze-thaw is taken out.',
      '5 °C: pH is no longer read in weeks 2, 4, 6, 10.',
      '25 °C: week 16 added.',
      '25 °C: week 1 taken out.',
      '25 °C: window in days: 1, now 2.',
      '25 °C: pH is no longer read in weeks 2, 4, 6, 10.',
      '40 °C: pH is no longer read in weeks 2, 4, 6, 10.',
      '45 °C: pH is no longer read in weeks 2, 4, 6, 10.',
      '30 °C is new: weeks 1, 2, 3, 4, 5, 6, 8, 10, 12, decides.',
      'Odour is no longer measured.',
      'Separation: tolerance: at most 5.0 %, now at most 3.0 %.',
      'Rest: 2 h, now 4 h.',
      'Set aside for outside laboratories: nothing, now 2 for microbiology.',
      'Matrixed: nothing, now pH.',
    ])
  })
})

describe('what is read of a pack', () => {
  it.each([
    ['leakage', 'watch', 'none'],
    ['panelling', 'watch', 'none'],
    ['pump', 'measuring', 'as the initial'],
  ] as const)('%s is a word of the %s jar that begins as "%s"', (key, jar, first) => {
    expect(attributeOf(key)).toMatchObject({ kind: 'word', jar, isGradual: false })
    expect(attributeOf(key).words?.[0]).toBe(first)
    expect(startsAtZero(attributeOf(key))).toBe(true)
    const pack: ProtocolPlan = {
      ...plan,
      attributes: [
        { attribute: key, tolerance: { kind: 'range', upper: 1 }, replicates: 1, method: 'by hand' },
      ],
      ownPack: 'airless pump, 30 mL',
      stations: [warm, { ...warm, isOwnPack: true }],
    }
    expect(missingInPlan(pack)).toBeNull()
    expect(pack.stations.map(stationName)).toEqual(['40 °C', '40 °C, own pack'])
  })
})
