import { describe, expect, it } from 'vitest'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { periodText, pullInDowntime } from '@/lib/station/rules/downtime'
import { differenceOf, lightText } from '@/lib/station/rules/keeps'
import { moveEffects, placeDoubts, targetsFor, type MovableJar } from '@/lib/station/rules/moves'
import { fitsFrom, freedSentence, occupancy } from '@/lib/station/rules/occupancy'
import { notStarted, refuseInPart } from '@/lib/study/rules/in-part'
import { adjustedPlan, startedChoices } from '@/lib/study/rules/plan'
import { plannedLeavings, pullsInDowntime, waysToStand } from '@/lib/study/rules/room'

const today = '2026-12-01'
const everyDay = { timeZone: 'UTC', workingDays: [1, 2, 3, 4, 5, 6, 7], holidays: [] }
const leaving = (leavesOn: string, jars: number, studyCode = 'S-004', label = 'week 8') => ({
  ...{ stationId: 'oven', studyCode, leavesOn, label, jars },
})

describe('places over time, counted by hand', () => {
  const leavings = [
    leaving('2027-03-02', 3, 'S-005', 'end'),
    leaving('2026-12-08', 4),
    leaving('2026-11-20', 2, 'S-001', 'end'),
  ]

  it('a jar stands on the day of its pull and is gone the day after; what should have left still stands', () => {
    expect(occupancy(today, leavings)).toEqual([
      { on: '2026-12-01', taken: 9 },
      { on: '2026-12-09', taken: 5 },
      { on: '2027-03-03', taken: 2 },
    ])
    expect(occupancy(today, [leaving(today, 1)])[0]!.taken).toBe(1)
  })

  it('says from which day a study would fit, and never that it would where nothing frees the places', () => {
    expect(fitsFrom(10, 1, today, leavings)).toBe(today)
    expect(fitsFrom(10, 5, today, leavings)).toBe('2026-12-09')
    expect(fitsFrom(10, 8, today, leavings)).toBe('2027-03-03')
    expect(fitsFrom(10, 9, today, leavings)).toBeNull()
    expect(fitsFrom(10, 11, today, [])).toBeNull()
  })

  it('names who frees the places that are missing', () => {
    expect(freedSentence(3, today, leavings)).toBe('Four places become free by 8 Dec 2026 (S-004’s week 8).')
    expect(freedSentence(5, today, leavings)).toBe(
      'Seven places become free by 2 Mar 2027 (S-004’s week 8 and S-005’s end).',
    )
    expect(freedSentence(5, today, [])).toBeNull()
  })
})

describe('a study that does not fit', () => {
  const plan = readyMadePlan('screen', 'cream')
  const offer = (id: string, temperatureC: number, places: number, takenPlaces = 0) => ({
    ...{ id, name: id, kind: 'temperature', temperatureC, isActive: true, shelves: 1 },
    ...{ placesPerShelf: places, takenPlaces, cycleLowC: null, cycleHighC: null },
  })
  const at = plan.stations.findIndex((station) => station.temperatureC === 45)
  const spares = plan.stations[at]!.spares
  const of = (batches: number) => ({
    batchIds: Array.from({ length: batches }, (_, index) => String(index)),
    referenceIds: [],
  })
  const ways = (free: number, batches: number, others = [] as ReturnType<typeof offer>[]) => {
    const oven = offer('oven', 45, free)
    const chosen = plan.stations.map((_, position) => (position === at ? oven : null))
    const at45 = { position: at, protocolPosition: at }
    return waysToStand(plan, {}, at45, chosen, [oven, ...others], of(batches), [], today)
  }

  it('is offered another station with room, fewer spares, fewer batches, and to start without', () => {
    // Eleven jars a batch at 45 °C: 1 watch, 9 measuring, 1 spare.
    expect(spares).toBe(1)
    expect(
      ways(10, 1, [offer('other', 45, 11), offer('small', 45, 10), offer('cool', 40, 99)]),
    ).toMatchObject([
      { kind: 'station', stationId: 'other' },
      { kind: 'spares', adjustments: { spares: [{ position: at, spares: 0 }] } },
      { kind: 'without', adjustments: { leaveOutStations: [at] } },
    ])
    expect(ways(25, 3).map(({ kind, batches }) => [kind, batches])).toEqual([
      ['batches', 2],
      ['without', undefined],
    ])
  })

  it('what is offered does fit: without the spare it needs a place less, without the station none', () => {
    const [spared, without] = ways(10, 1)
    const jars = (adjustments: object) =>
      plannedLeavings(
        adjustedPlan(plan, adjustments),
        adjustedPlan(plan, adjustments).stations.map((one) =>
          one.temperatureC === 45 ? offer('oven', 45, 10) : null,
        ),
        ...(['oven', of(1), today] as const),
      ).reduce((sum, one) => sum + one.jars, 0)
    expect(jars({})).toBe(11)
    expect(jars(spared!.adjustments!)).toBe(10)
    expect(jars(without!.adjustments!)).toBe(0)
  })

  it('starts in part with a reason, and says what the protocol asked for and why it did not start', () => {
    const part = { leaveOutStations: [at] }
    expect(() => refuseInPart(plan, part, '')).toThrow(/Say why/)
    expect(() => refuseInPart(plan, { leaveOutStations: [0, 1, 2, 3, 4] }, 'x')).toThrow(/Keep at least one/)
    expect(() => refuseInPart(plan, { leaveOutStations: [9] }, 'x')).toThrow(/no such station/)
    expect(() => refuseInPart(plan, part, 'No room.')).not.toThrow()
    const voice = plan.stations[at]!.voice
    expect(notStarted(plan, part, [offer('oven', 45, 3)], of(1))).toEqual([
      {
        position: at,
        sentence: `45 °C was planned by the protocol, where it ${voice}, and was not started: oven had three free places and eleven were needed.`,
      },
    ])
    expect(notStarted(plan, part, [offer('oven', 45, 30)], of(1))[0]!.sentence).toMatch(/: by choice\.$/)
    expect(notStarted(plan, part, [], of(1))[0]!.sentence).toMatch(/: no station of the lab keeps it\.$/)
    // By hand: a watch jar and a spare of each batch, a jar of each at the first and the last time, of one at the 7 between.
    const byTurns = { ...plan, batchMatrixing: 'half' as const }
    const [turns] = notStarted(byTurns, part, [offer('oven', 45, 14)], of(2))
    expect(turns!.sentence).toMatch(/oven had 14 free places and 15 were needed\.$/)
    expect(notStarted(byTurns, part, [offer('oven', 45, 15)], of(2))[0]!.sentence).toMatch(/: by choice\.$/)
    expect(adjustedPlan(plan, part).stations).toHaveLength(plan.stations.length - 1)
    // A choice for a station behind the one left out keeps its meaning.
    expect(
      startedChoices(plan, part, [
        { position: at + 1, stationId: 'x' },
        { position: at, stationId: 'y' },
      ]),
    ).toEqual([{ position: at, stationId: 'x' }])
  })

  it('is told which of its pulls fall into days on which the station is out of use', () => {
    const down = { fromOn: '2026-12-07', toOn: '2026-12-16', reason: 'service' }
    // Weeks 1 and 2 of a study that starts on 1 December are 8 and 15 December.
    expect(pullsInDowntime(plan.stations[at]!, plan.endWeeks, today, everyDay, [down])).toEqual([
      { ...down, pulls: ['week 1', 'week 2'] },
    ])
    expect(
      pullsInDowntime(plan.stations[at]!, plan.endWeeks, today, everyDay, [{ ...down, toOn: '2026-12-07' }]),
    ).toEqual([])
  })
})

const jar = (id: string, more: Partial<MovableJar> = {}): MovableJar => ({
  ...{ id, code: id, studyCode: 'S-004', studyStationId: 'warm', kindAsked: 'temperature', temperatureC: 45 },
  ...{
    isFreezeThaw: false,
    variant: '',
    cycleLowC: null,
    cycleHighC: null,
    humidityPercent: null,
    light: null,
  },
  ...more,
})
const target = (temperatureC: number | null, more = {}) => ({
  ...{ id: 'to', name: 'oven 4', kind: 'temperature', temperatureC, cycleLowC: null, cycleHighC: null },
  ...{ humidityPercent: null, lightLux: null, lightUvWm2: null, isActive: true, free: 9 },
  ...more,
})
const from = { id: 'from', name: 'oven 3' }

describe('what a move means', () => {
  const jars = [jar('a'), jar('b'), jar('c')]
  const standing = [{ studyStationId: 'warm', stationId: 'from', jars: 3 }]

  it('at the same temperature the series goes on, and its record follows where most of its jars stand', () => {
    const [all] = moveEffects(jars, from, target(45), standing)
    expect(all).toMatchObject({ jars: 3, isElsewhere: false, follows: true })
    expect(all!.sentence).toMatch(
      /^S-004 at 45 °C: all three jars, .* series goes on\. .* that of oven 4 from then on\.$/,
    )
    const [one] = moveEffects(jars.slice(0, 1), from, target(45), standing)
    expect(one).toMatchObject({ follows: false })
    // The second of three, where the first stands already.
    const split = [
      { ...standing[0]!, jars: 2 },
      { studyStationId: 'warm', stationId: 'to', jars: 1 },
    ]
    expect(moveEffects(jars.slice(1, 2), from, target(45), split)[0]!.follows).toBe(true)
  })

  it('at another temperature, in cycles or under lamps later readings are doubted, and it says so first', () => {
    expect(moveEffects(jars, from, target(40), standing)[0]).toMatchObject({ isElsewhere: true })
    expect(moveEffects(jars, from, target(40), standing)[0]!.sentence).toMatch(
      /will stand at 40 °C instead of 45 °C\. Each later reading of them is doubted/,
    )
    const cycles = target(null, { kind: 'freeze-thaw', cycleLowC: -10, cycleHighC: 25 })
    expect(moveEffects(jars, from, cycles, standing)[0]!.sentence).toMatch(
      /in freeze-thaw cycles from −10 °C to 25 °C instead of 45 °C/,
    )
    expect(moveEffects(jars, from, target(45, { lightLux: 5000 }), standing)[0]!.sentence).toMatch(
      /in light instead of in the dark/,
    )
    const lit = [jar('a', { light: 'exposed' })]
    expect(moveEffects(lit, from, target(45), standing)[0]!.sentence).toMatch(
      /in the dark instead of in light/,
    )
  })

  it('names another humidity, which is nobody’s doubt', () => {
    const damp = [jar('a', { humidityPercent: 75 })]
    const [effect] = moveEffects(damp, from, target(45, { humidityPercent: 60 }), standing)
    expect(effect!.isElsewhere).toBe(false)
    expect(effect!.sentence).toMatch(/Humidity is 60 % instead of 75 %\.$/)
  })

  it('offers stations with room first, of these the ones that keep the jars as they are', () => {
    const list = [
      target(45, { id: 'full', free: 2 }),
      target(40, { id: 'cool' }),
      target(45, { id: 'same', free: 3 }),
      target(45, { id: 'off', isActive: false }),
      target(45, { id: 'from' }),
    ]
    expect(
      targetsFor(jars, 'from', list).map(({ station, keeps, hasRoom }) => [station.id, keeps, hasRoom]),
    ).toEqual([
      ['same', true, true],
      ['cool', false, true],
      ['full', true, false],
    ])
  })
})

describe('a jar that stood elsewhere', () => {
  const keeps = (temperatureC: number) => ({
    ...{ kind: 'temperature', temperatureC, cycleLowC: null, cycleHighC: null, isLit: false },
  })
  const stay = (at: string, temperatureC: number) => ({ ...keeps(temperatureC), at, name: 'x' })
  const doubts = (stays: ReturnType<typeof stay>[], measuredAt: string) =>
    placeDoubts(keeps(45), stays, measuredAt, 'Europe/Berlin').map((one) => one.sentence)

  it('is doubted from the move on, back in its place too, and not before or at the same temperature', () => {
    const away = stay('2027-03-03T09:00:00Z', 40)
    const back = stay('2027-03-10T09:00:00Z', 45)
    expect(doubts([away], '2027-03-02T09:00:00Z')).toEqual([])
    expect(doubts([stay('2027-03-03T09:00:00Z', 45)], '2027-04-01T09:00:00Z')).toEqual([])
    expect(doubts([away], '2027-03-04T09:00:00Z')).toEqual([
      'The jar stood at 40 °C instead of 45 °C from 3 Mar 2027 on. Say whether the jar counts as it is.',
    ])
    expect(doubts([away, back], '2027-04-01T09:00:00Z')).toEqual([
      'The jar stood at 40 °C instead of 45 °C from 3 Mar 2027 to 10 Mar 2027. Say whether the jar counts as it is.',
    ])
  })

  it('the difference is told from the place alone', () => {
    expect(differenceOf(keeps(45), keeps(45))).toBeNull()
    expect(differenceOf(keeps(25), { ...keeps(25), isLit: true })).toBe('in light instead of in the dark')
  })
})

describe('days out of use', () => {
  const period = { fromOn: '2027-03-03', toOn: '2027-03-05' }
  const pull = (dueOn: string, windowFrom: string, windowTo: string) =>
    pullInDowntime(period, { dueOn, windowFrom, windowTo })

  it('names the pulls whose day falls in, and which of them their window lets go round', () => {
    expect(pull('2027-03-02', '2027-03-01', '2027-03-03')).toBeNull()
    expect(pull('2027-03-03', '2027-03-02', '2027-03-04')).toMatchObject({ isMovable: true })
    expect(pull('2027-03-05', '2027-03-04', '2027-03-06')!.sentence).toBe(
      'can be pulled after, until 6 Mar 2027',
    )
    expect(pull('2027-03-04', '2027-03-03', '2027-03-05')).toMatchObject({ isMovable: false })
  })

  it('are said as one speaks', () => {
    expect(periodText(period)).toBe('from 3 to 5 Mar 2027')
    expect(periodText({ fromOn: '2027-02-27', toOn: '2027-03-05' })).toBe('from 27 Feb to 5 Mar 2027')
    expect(periodText({ fromOn: '2026-12-30', toOn: '2027-01-02' })).toBe('from 30 Dec 2026 to 2 Jan 2027')
    expect(periodText({ fromOn: '2027-03-03', toOn: '2027-03-03' })).toBe('on 3 Mar 2027')
    expect(lightText({ lightLux: 8000, lightUvWm2: 0.4, lightHours: 16 })).toMatch(
      /^8\D000 lux, 0.4 W\/m² of UV, 16 h/,
    )
  })
})
