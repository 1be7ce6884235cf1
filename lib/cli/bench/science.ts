import { spawnSync } from 'node:child_process'
import path from 'node:path'
import { assessSeries } from '../../science/drift'
import { regression } from '../../science/regression'
import { atMost, leastSeconds, meanSeconds, plain, type Figure } from './figure'
import { largeStudy } from './study'

/** The science's own speed and memory: ratios within one run where there is something to compare with. */
export function benchScience(): Figure[] {
  return [...regressionFigures(), ...studyFigures(), ...startFigures()]
}

const megabyte = 1_048_576
const microseconds = (seconds: number) => `${(seconds * 1e6).toFixed(1)} µs`
const milliseconds = (seconds: number) => `${(seconds * 1e3).toFixed(0)} ms`

function regressionFigures(): Figure[] {
  const x = Array.from({ length: 24 }, (_, i) => i * 2)
  const y = x.map((week, i) => 5.52 - 0.005 * week + 0.01 * Math.sin(3 * i))
  const at = [0, 13, 26, 52, 104]
  const own = () => regression({ x, y, at })
  meanSeconds(5000, own)
  const seconds = meanSeconds(20_000, own)
  const mine = plain('regression of 24 points with 5 predictions, mean of 20 000', microseconds(seconds))

  const same = 'the same in lm + predict of R, mean of 2 000'
  const script = path.join(import.meta.dirname, 'regression.R')
  const input = [`x ${x.join(' ')}`, `y ${y.join(' ')}`, `at ${at.join(' ')}`].join('\n')
  const { status, stdout, stderr, error } = spawnSync('Rscript', [script], { input, encoding: 'utf8' })
  if (error) return [mine, plain(same, 'not compared: Rscript is not installed')]
  if (status !== 0) throw new Error(`Rscript failed: ${stderr.trim()}`)
  const ofR = Number(stdout)
  return [
    mine,
    plain(same, microseconds(ofR)),
    atMost('ratio of the two', seconds / ofR, 0.05, (n) => n.toFixed(4)),
  ]
}

function studyFigures(): Figure[] {
  const study = largeStudy()
  const standings = new Map<string, number>()
  for (const { standing } of study.map(assessSeries))
    standings.set(standing, (standings.get(standing) ?? 0) + 1)
  const recompute = () => study.forEach(assessSeries)
  meanSeconds(8, recompute)
  const seconds = leastSeconds(15, recompute)
  const found = [...standings].map(([standing, count]) => `${count} ${standing}`).join(', ')
  return [
    plain('study of 400 series of 40 points', found),
    atMost('recomputing it, one core, best of 15', seconds, 0.15, milliseconds),
    memoryFigure(recompute),
  ]
}

/** What is left on the heap by forty more recomputations, after the first have warmed everything up. */
function memoryFigure(recompute: () => void): Figure {
  const what = 'heap after 40 more recomputations'
  const { gc } = globalThis
  if (gc === undefined) return plain(what, 'not measured: start node with --expose-gc')
  const heap = () => {
    void gc()
    return process.memoryUsage().heapUsed / megabyte
  }
  for (let i = 0; i < 10; i++) recompute()
  const before = heap()
  for (let i = 0; i < 40; i++) recompute()
  return atMost(what, Math.max(0, heap() - before), 1, (n) => `${n.toFixed(2)} MB more`)
}

/** From pressing return to the answer; topics that load the most. */
function startFigures(): Figure[] {
  const inputs = {
    'separation-curve': { t: [0, 1, 2, 3, 4, 6], percent: [0, 0, 1.4, 3, 4.2, 6] },
    arrhenius: { temperaturesC: [25, 37, 45, 50], rates: [1, 3, 6, 10] },
    regression: { x: [0, 1, 2, 3], y: [5, 4, 4, 3] },
  }
  const times = Object.entries(inputs).map(([topic, input]) => {
    const runs = Array.from({ length: 3 }, () => {
      const begun = performance.now()
      const options = { input: JSON.stringify(input) }
      const { status } = spawnSync('npm', ['run', '--silent', 'calc', '--', topic], options)
      if (status !== 0) throw new Error(`calc ${topic} ended with ${status}`)
      return (performance.now() - begun) / 1000
    })
    return Math.min(...runs)
  })
  // Shown without a verdict: on a busy machine it says more about the machine.
  const found = `${milliseconds(Math.max(...times))}, on an idle machine at most 1000 ms`
  return [plain("calc with npm's own start, slowest topic, best of 3", found)]
}
