import { attributeOf } from '@/lib/reading/schema/attributes'
import { describe, expect, it } from 'vitest'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { addDays, dayIn, spokenDay, weeksBetween } from '@/lib/study/rules/calendar'
import { studyFinding, type FindingInput, type FindingSeries } from '@/lib/study/rules/finding'
import { plannedJars } from '@/lib/study/rules/jars'
import { adjustedPlan, waysToFit } from '@/lib/study/rules/plan'
import { chosenStations, fittingStations } from '@/lib/study/rules/stations'
import { shownValue, shownWithUnit } from '@/lib/study/rules/words'
import { freePlaces } from '@/lib/station/rules/places'

describe('the calendar', () => {
  it('counts in days of the calendar, so a change of clocks moves nothing', () => {
    expect(addDays('2026-10-19', 7)).toBe('2026-10-26')
    expect(addDays('2027-02-22', 7)).toBe('2027-03-01')
    expect(weeksBetween('2026-09-08', '2026-12-01')).toBe(12)
    expect(dayIn('Europe/Berlin', '2026-10-11T22:30:00Z')).toBe('2026-10-12')
    expect(dayIn('America/New_York', '2026-10-11T02:30:00Z')).toBe('2026-10-10')
    expect(spokenDay('2026-03-02')).toBe('2 Mar 2026')
    expect(spokenDay('2026-09-08')).toBe('8 Sep 2026')
  })
})

describe('the jars of a study', () => {
  it('ask for a watch jar at every time point and for a measuring jar once', () => {
    const jars = plannedJars(readyMadePlan('screen', 'cream'), ['a', 'b'])
    expect(jars).toHaveLength(108)
    const watch = jars.find((jar) => jar.kind === 'watch')!
    expect(watch.weeks).toEqual([1, 2, 3, 4, 5, 6, 8, 10, 12])
    const measuring = jars.filter(
      (jar) => jar.kind === 'measuring' && jar.position === 0 && jar.batchId === 'a',
    )
    expect(measuring.map((jar) => jar.weeks)).toEqual([[1], [2], [3], [4], [5], [6], [8], [10], [12]])
    expect(jars.filter((jar) => jar.kind === 'retain').every((jar) => jar.state === 'kept')).toBe(true)
  })

  it('take the free places from the top, those taken left out', () => {
    const taken = [
      { shelf: 1, place: 1 },
      { shelf: 1, place: 3 },
    ]
    expect(freePlaces({ shelves: 2, placesPerShelf: 3 }, taken, 3)).toEqual([
      { shelf: 1, place: 2 },
      { shelf: 2, place: 1 },
      { shelf: 2, place: 2 },
    ])
  })
})

describe('what would make a study fit', () => {
  const plan = readyMadePlan('screen', 'cream')

  it('offers less fill, fewer early weeks and no retains, each with what is then left', () => {
    const [fill, weeks, retains] = waysToFit(plan, 1500)
    // 1500 × 0.97 ÷ 54 = 26.94 g, rounded down to a tenth.
    expect(fill).toMatchObject({ label: 'Fill 26.9 g instead of 30.0 g', jars: 54 })
    expect(fill!.leftG).toBeGreaterThanOrEqual(0)
    // 171 g are short and each week frees four jars of 30.93 g: two weeks.
    expect(weeks).toMatchObject({ label: 'Leave out weeks 1 and 3', jars: 46 })
    expect(weeks!.leftG).toBeGreaterThanOrEqual(0)
    expect(retains).toMatchObject({ label: 'Leave out the 2 retain jars', jars: 52 })
    expect(retains!.leftG).toBeLessThan(0)
  })

  it('never leaves out a cycle or the last pull, and never fills less than half', () => {
    const options = waysToFit(plan, 400)
    expect(options.find((option) => option.kind === 'fill')).toBeUndefined()
    const weeks = options.find((option) => option.kind === 'weeks')!
    const adjusted = adjustedPlan(plan, weeks.adjustments)
    expect(adjusted.stations.at(-1)!.timePoints).toEqual([1, 2, 3, 4, 5])
    expect(adjusted.stations.every((station) => station.timePoints.length > 0)).toBe(true)
    expect(adjusted.stations[0]!.timePoints.at(-1)).toBe(12)
  })
})

describe('the choice of stations', () => {
  const station = (id: string, temperatureC: number | null, takenPlaces = 0) => ({
    id,
    name: id,
    kind: temperatureC === null ? 'freeze-thaw' : 'temperature',
    temperatureC,
    isActive: true,
    shelves: 1,
    placesPerShelf: 20,
    takenPlaces,
  })
  const { stations: planned } = readyMadePlan('screen', 'cream')

  it('takes what keeps the temperature, the emptiest first, each station once', () => {
    const lab = [station('full', 45, 19), station('empty', 45), station('room', 25), station('cold', 5)]
    expect(fittingStations(planned[3]!, lab).map((one) => one.id)).toEqual(['full', 'empty'])
    const chosen = chosenStations(planned, lab, [])
    expect(chosen.map((one) => one?.id ?? null)).toEqual(['cold', 'room', null, 'empty', null])
  })

  it('keeps to what a person chose', () => {
    const lab = [station('full', 45, 19), station('empty', 45)]
    const chosen = chosenStations(planned, lab, [{ position: 3, stationId: 'full' }])
    expect(chosen[3]?.id).toBe('full')
  })
})

describe('the finding', () => {
  const stations = [45, 40, 25, 5, null].map((temperatureC) => ({
    id: String(temperatureC),
    temperatureC,
    kind: temperatureC === null ? 'freeze-thaw' : 'temperature',
    timePoints: temperatureC === null ? [1, 2, 3, 4, 5] : [1, 2, 3, 4, 5, 6, 8, 10, 12, 16, 20, 26],
  }))
  const of = (
    station: number | null,
    attribute: string,
    more: Partial<FindingSeries> = {},
  ): FindingSeries => ({
    studyStationId: String(station),
    batchCode: 'N86-2',
    attribute,
    standing: 'steady',
    used: 0.1,
    outSinceWeeks: null,
    leavesAtWeeks: null,
    latestWeeks: station === null ? 5 : 12,
    ...more,
  })
  const steady = [45, 40, 25, 5, null].flatMap((t) => [of(t, 'separation'), of(t, 'viscosity')])
  const input = (more: Partial<FindingInput>): FindingInput => ({
    startedOn: '2026-09-08',
    endWeeks: 26,
    state: 'running',
    stations,
    series: steady,
    batchCodes: ['N86-2'],
    flags: [],
    today: { due: 0, done: 0 },
    nextPullOn: '2026-12-29',
    ...more,
  })
  const text = (given: FindingInput) => {
    const { headline, sentence } = studyFinding(given)
    return [headline.map((phrase) => phrase.text).join(''), sentence]
  }
  const replaced = (...changed: FindingSeries[]) =>
    steady.map(
      (one) =>
        changed.find((c) => c.studyStationId === one.studyStationId && c.attribute === one.attribute) ?? one,
    )

  it('says where it comes apart, since when, and what leans', () => {
    const series = replaced(
      of(45, 'separation', { standing: 'out', outSinceWeeks: 5.04 }),
      of(40, 'separation', { standing: 'leaning', leavesAtWeeks: 17.6 }),
    )
    const flags = [1, 2, 3].map(() => ({ studyStationId: '45', attribute: 'separation', rule: 'out' }))
    expect(text(input({ series, flags, today: { due: 4, done: 2 } }))).toEqual([
      'Comes apart at 45 °C from week 5, leaning at 40 °C',
      "Steady at 25 °C, at 5 °C and through five freeze-thaw cycles. Three flags want an answer; two of today's four jars are in.",
    ])
  })

  it('counts cycles where it comes apart in freeze-thaw', () => {
    const series = replaced(of(null, 'separation', { standing: 'out', outSinceWeeks: 4 }))
    expect(text(input({ series }))[0]).toBe('Comes apart in freeze-thaw from cycle 4')
  })

  it('names another attribute that is out, and the batch where there are several', () => {
    const series = replaced(of(45, 'viscosity', { standing: 'out', outSinceWeeks: 8 }))
    expect(text(input({ series, batchCodes: ['N86-2', 'N86-3'] }))[0]).toBe(
      'N86-2 viscosity is out at 45 °C since week 8',
    )
  })

  it('says when a lean leaves its band', () => {
    const series = replaced(of(45, 'viscosity', { standing: 'leaning', leavesAtWeeks: 15 }))
    expect(text(input({ series }))[0]).toBe('Viscosity is leaning at 45 °C, out about 22 Dec 2026')
  })

  it('does not call steady what was read beyond its band and waits for its repeat', () => {
    const flags = [{ studyStationId: '45', attribute: 'separation', rule: 'out' }]
    expect(text(input({ flags }))[0]).toBe('Separation was read beyond its band at 45 °C, not confirmed yet')
    expect(text(input({ flags: [{ ...flags[0]!, rule: 'onset' }] }))[0]).toBe('Separation has begun at 45 °C')
  })

  it('says steady, too early, and nothing yet', () => {
    const series = replaced(of(45, 'viscosity', { used: 0.61 }))
    expect(text(input({ series }))).toEqual([
      'Steady at all five stations after twelve weeks',
      'Nearest its edge: viscosity at 45 °C, 61 % of the band used. The next pull is on 29 Dec 2026.',
    ])
    const untold = steady.map((one) => ({ ...one, standing: 'untold' as const, latestWeeks: 2 }))
    expect(text(input({ series: untold }))[0]).toBe('Too early to tell after two weeks')
    const none = steady.map((one) => ({ ...one, standing: 'untold' as const, latestWeeks: 0 }))
    expect(text(input({ series: none }))[0]).toBe(
      'Nothing to tell yet: the first jars are due on 29 Dec 2026',
    )
  })
})

describe('values as they are written', () => {
  it('have the figures that their attribute is worth', () => {
    expect(shownValue(attributeOf('ph'), 5.6)).toBe('5.60')
    expect(shownValue(attributeOf('viscosity'), 41_620)).toBe('41\u2009600')
    expect(shownValue(attributeOf('viscosity'), 6512)).toBe('6\u2009510')
    expect(shownValue(attributeOf('viscosity'), 98.76)).toBe('98.8')
    expect(shownWithUnit(attributeOf('viscosity'), 180_000)).toBe('180\u2009000 mPa·s')
    expect(shownValue(attributeOf('mass'), -0.43)).toBe('−0.4')
    expect(shownValue(attributeOf('separation'), -0.01)).toBe('0.0')
    expect(shownValue(attributeOf('look'), 1)).toBe('slightly changed')
  })
})
