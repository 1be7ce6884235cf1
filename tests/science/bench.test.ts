import { spawnSync } from 'node:child_process'
import path from 'node:path'
import { expect, it } from 'vitest'
import { atMost, plain, tableOf } from '@/lib/cli/bench/figure'
import { largeStudy } from '@/lib/cli/bench/study'
import { assessSeries } from '@/lib/science/drift'

const root = path.resolve(import.meta.dirname, '../..')
const bench = (...args: string[]) =>
  spawnSync(process.execPath, ['--import', 'tsx', path.join(root, 'lib/cli/bench.ts'), ...args], {
    cwd: root,
    encoding: 'utf8',
  })

it(
  'bench without a name lists what there is, and refuses a name it does not know',
  { timeout: 30_000 },
  () => {
    expect(bench()).toMatchObject({ status: 0, stdout: expect.stringContaining('  science  ') as string })
    expect(bench('nothing').status).toBe(2)
  },
)

it('a figure above its target is missed, one without a target is only shown', () => {
  const seconds = (n: number) => `${n} s`
  expect(atMost('a', 1, 1, seconds).isMet).toBe(true)
  expect(atMost('a', 1.1, 1, seconds).isMet).toBe(false)
  expect(tableOf([atMost('longer name', 2, 1, seconds), plain('b', '7')])).toBe(
    'longer name  2 s  at most 1 s  missed\nb            7',
  )
})

it('the large study is the same every time: 400 series of 40 pulls, of which some lean', () => {
  const study = largeStudy()
  expect(JSON.stringify(largeStudy())).toBe(JSON.stringify(study))
  expect(study).toHaveLength(400)
  expect(study.every((series) => series.readings.length === 40)).toBe(true)
  const standings = new Set(study.map((series) => assessSeries(series).standing))
  expect([...standings].sort()).toEqual(['leaning', 'steady'])
})
