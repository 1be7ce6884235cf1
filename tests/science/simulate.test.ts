import { readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { chanceFrom } from '@/lib/cli/simulate/chance'
import { allFigures } from '@/lib/cli/simulate/figures/all'
import {
  dayErrors,
  decimalSlip,
  labWith,
  lotionRepeatability,
  measured,
  shareOfHottest,
} from '@/lib/cli/simulate/lab'
import { runStudy } from '@/lib/cli/simulate/run'
import { tableOf } from '@/lib/cli/simulate/table'
import { addTally, chunksOf, tallyChunk } from '@/lib/cli/simulate/tally'
import type { Tally } from '@/lib/cli/simulate/figures/figure'
import { mean, sampleStandardDeviation } from '@/lib/science/mean'
import simulated from '@/lib/science/simulated.json'

const lab = labWith(lotionRepeatability)

describe('the lab that is simulated', () => {
  it('draws standard normal deviates, the same for the same seed', () => {
    const chance = chanceFrom(3)
    const drawn = Array.from({ length: 20_000 }, chance.normal)
    expect(Math.abs(mean(drawn))).toBeLessThan(0.03)
    expect(sampleStandardDeviation(drawn)).toBeCloseTo(1, 1)
    // 95 % lie within 1.96, standard normal table.
    expect(drawn.filter((z) => Math.abs(z) < 1.96).length / drawn.length).toBeCloseTo(0.95, 2)
    const again = chanceFrom(3)
    expect(Array.from({ length: 5 }, again.normal)).toEqual(drawn.slice(0, 5))
    expect(chanceFrom(4).normal()).not.toBe(drawn[0])
  })

  it('has instruments that are off by half a scatter and keep 0.7 of it from week to week', () => {
    const chance = chanceFrom(5)
    const runs = Array.from({ length: 4000 }, () => dayErrors(chance, 2))
    for (const week of [0, 1, 2])
      expect(sampleStandardDeviation(runs.map((run) => run[week]!))).toBeCloseTo(0.5, 1)
    const product = mean(runs.map((run) => run[1]! * run[2]!))
    expect(product / 0.25).toBeCloseTo(0.7, 1)
  })

  it('writes values as they are displayed, one in two hundred a blunder', () => {
    const chance = chanceFrom(6)
    const exact = { ...lab.viscosity, repeatability: 0, replicates: 1, start: 41_234 }
    const values = Array.from({ length: 40_000 }, () => measured(chance, exact, 41_234, 0)[0]!)
    expect(values.filter((value) => value === 41_200).length / values.length).toBeCloseTo(0.995, 2)
    const wrong = new Set(values.filter((value) => value !== 41_200))
    // Tenfold either way, and each neighbouring pair of digits swapped.
    expect([...wrong].sort((a, b) => a - b)).toEqual(
      [4120, 14_200, 41_020, 42_100, 412_000].filter((v) => wrong.has(v)),
    )
    expect(wrong.size).toBeGreaterThanOrEqual(4)
    expect([0.55, 55]).toContain(decimalSlip(chance, 5.5))
  })

  it('without scatter sees a drift lean, and leaves a study that stands still alone', () => {
    const quiet = labWith({ ph: 1e-6, viscosity: 1e-6, separation: 1e-6, detectionLimit: 1 })
    const truth = (station: number, week: number) => (0.5 * shareOfHottest(station) * week) / 20
    const drifting = runStudy({ chance: chanceFrom(7), method: quiet.ph, weeks: 26, truth })
    const leans = drifting.standings[3]!.indexOf('leaning') + 1
    // Half of the band is used in week 10 and the line reaches all of it in week 20.
    expect(leans).toBeGreaterThanOrEqual(10)
    expect(leans).toBeLessThanOrEqual(11)
    expect(drifting.standings[0]!.every((standing) => standing !== 'leaning')).toBe(true)
  })
})

describe('what is kept for the page', { timeout: 60_000 }, () => {
  /** The rules as they are now, on seeds that the table was not made with. */
  function recount(name: string, studies: number): Tally {
    const figures = allFigures(studies).filter((figure) => figure.name === name)
    const tally: Tally = {}
    for (const chunk of chunksOf(figures, 91)) addTally(tally, tallyChunk(figures, chunk))
    return tally
  }

  it.each([
    ['unchanging 26', 'flagged', 'studies', 150, [simulated.figures.steadyFlagged26]],
    ['off days', 'named and none flagged', 'days', 150, [simulated.figures.offDaysNamed]],
    ['slips', 'doubted', 'slips', 150, [simulated.figures.slipsDoubted]],
    ['coverage', 'covered', 'batches', 2000, [simulated.figures.coverage]],
  ] as const)('%s is what the rules give', (name, hits, of, studies, [kept]) => {
    const tally = recount(name, studies)
    const share = (tally[hits] ?? 0) / tally[of]!
    const error = Math.sqrt(((kept / 100) * (1 - kept / 100)) / tally[of]!)
    expect(Math.abs(share - kept / 100)).toBeLessThan(4 * error)
  })

  it('is what DEVELOPERS.md tells', () => {
    const guide = readFileSync(path.resolve(import.meta.dirname, '../../DEVELOPERS.md'), 'utf8')
    const text = guide.split(/^## /m).find((part) => part.startsWith('What the rules can be trusted with'))!
    const told = [...text.matchAll(/^\| (?<says>[^|]+?) +\| +(?<value>[\d.]+)(?: %)? +\|/gm)].map((match) =>
      Number(match.groups!.value),
    )
    const kept = Object.values(simulated.figures)
    expect(told).toHaveLength(kept.length)
    // Kept to two decimals, told to one.
    kept.forEach((value, i) => expect(Math.abs(told[i]! - value)).toBeLessThan(0.0551))
  })
})

describe('the table', () => {
  it('marks what misses its target, and nothing that meets it', () => {
    const tallies = new Map<string, Tally>([
      ['unchanging 26', { studies: 100, flagged: 6, days: 1000, 'named days': 1 }],
      ['coverage', { batches: 100, covered: 95 }],
    ])
    const rows = tableOf(tallies)
    const of = (key: string) => rows.find((row) => row.key === key)!
    expect(of('steadyFlagged26')).toMatchObject({ value: '6.0 %', missed: true, target: 'at most 5 %' })
    expect(of('steadyDaysNamed')).toMatchObject({ value: '0.1 %', missed: false })
    expect(of('coverage')).toMatchObject({ missed: false, error: '2.18' })
  })
})
