import { describe, expect, it } from 'vitest'
import { missingInPlan } from '@/lib/protocol/rules/faults'
import { jarsAtStation, jarsOfPlan, pullLabel, weeksOfPlan } from '@/lib/protocol/rules/plan'
import {
  emulsions,
  purposes,
  readyMadePlan,
  type Emulsion,
  type Purpose,
} from '@/lib/protocol/rules/ready-made'
import { methodText } from '@/lib/reading/rules/conditions'
import { protocolPlan } from '@/lib/protocol/schema'

const every = (Object.keys(purposes) as Purpose[]).flatMap((purpose) =>
  (Object.keys(emulsions) as Emulsion[]).map((emulsion) => ({ purpose, emulsion })),
)

describe('ready-made protocols', () => {
  it.each(every)('$purpose on a $emulsion is a plan that can start', ({ purpose, emulsion }) => {
    const plan = readyMadePlan(purpose, emulsion)
    expect(protocolPlan.parse(plan)).toEqual(plan)
    expect(missingInPlan(plan)).toBeNull()
  })

  it('the screen pulls weekly to week 6, then in weeks 8, 10 and 12, at 5, 25, 40, 45 °C and in five cycles', () => {
    const plan = readyMadePlan('screen', 'lotion')
    expect(weeksOfPlan(plan)).toEqual([1, 2, 3, 4, 5, 6, 8, 10, 12])
    expect(plan.stations.map((s) => [s.kind, s.temperatureC, s.timePoints.length])).toEqual([
      ['temperature', 5, 9],
      ['temperature', 25, 9],
      ['temperature', 40, 9],
      ['temperature', 45, 9],
      ['freeze-thaw', null, 5],
    ])
  })

  it('the factor of each spindle gives the viscosity that its emulsion has at a good torque', () => {
    // 6 500 mPa·s at 65 %, 62 000 at 62 %, 180 000 at 45 %.
    const factors = (Object.keys(emulsions) as Emulsion[]).map((emulsion) => {
      const { viscosity } = readyMadePlan('screen', emulsion).attributes.find((a) => a.viscosity)!
      return viscosity!.spindleConstant / viscosity!.rpm
    })
    expect(factors).toEqual([100, 1000, 4000])
  })

  it('long-term reaches 36 months, and its pulls are named in months', () => {
    const plan = readyMadePlan('long-term', 'cream')
    const room = plan.stations.find((station) => station.temperatureC === 25)!
    expect(room.timePoints.map((week) => pullLabel(room, week, plan.endWeeks))).toEqual(
      [3, 6, 9, 12, 18, 24, 36].map((month) => `month ${month}`),
    )
  })

  it('says in fields under which pH and viscosity are read, in full', () => {
    const said = (emulsion: Emulsion) =>
      readyMadePlan('screen', emulsion)
        .attributes.filter(({ attribute }) => attribute === 'ph' || attribute === 'viscosity')
        .map(methodText)
    expect(said('lotion')).toEqual(['direct, at 25 °C', 'disc 4, 20 rpm, after 30 s, fixed, at 25 °C'])
    expect(said('stiff cream')).toEqual([
      'extract 1 to 10 in water, 30 min, at 25 °C',
      'T-bar D, 5 rpm, after 30 s, descending, at 25 °C, unstirred',
    ])
  })
})

describe('a plan', () => {
  it('counts a jar for each watch, pull, spare, initial and retain', () => {
    const plan = readyMadePlan('screen', 'cream')
    expect(plan.stations.map((station) => jarsAtStation(plan, station))).toEqual([11, 11, 11, 11, 7])
    // 51 at the stations, 1 for the initial, 2 retains; 54 × 30 g ÷ 0.97 = 1670.1 g.
    const need = jarsOfPlan(plan, 1600)
    expect(need.jars).toBe(54)
    expect(need.grams).toBeCloseTo(1670.103, 3)
    expect(need.shortG).toBeCloseTo(70.103, 3)
    expect(need.fits).toBe(false)
  })

  it('says what keeps it from starting', () => {
    const plan = readyMadePlan('screen', 'cream')
    expect(missingInPlan({ ...plan, stations: [] })).toMatch(/no station yet/)
    expect(missingInPlan({ ...plan, attributes: [] })).toMatch(/measures nothing yet/)
    expect(missingInPlan({ ...plan, endWeeks: 8 })).toMatch(/lies after the study's end in week 8/)
    const bare = plan.stations.map((station) => ({ ...station, watchJars: 0, measuringJarsPerPull: 0 }))
    expect(missingInPlan({ ...plan, stations: bare })).toMatch(/puts no jar at 5 °C/)
  })

  it('names a cycle by its number, whatever its week', () => {
    const cycles = { ...readyMadePlan('freeze-thaw', 'cream').stations[1]!, timePoints: [0.5, 1, 2] }
    expect([0.5, 1, 2].map((week) => pullLabel(cycles, week, 5))).toEqual(['cycle 1', 'cycle 2', 'cycle 3'])
  })
})
