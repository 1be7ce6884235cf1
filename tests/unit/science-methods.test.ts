import { describe, expect, it } from 'vitest'
import { fields } from '@/lib/science/calc/fields'
import { topicNames } from '@/lib/science/calc/topics'
import * as drift from '@/lib/science/methods/drift'
import * as emulsion from '@/lib/science/methods/emulsion'
import * as heat from '@/lib/science/methods/heat'
import * as making from '@/lib/science/methods/making'
import * as measures from '@/lib/science/methods/measures'
import { exactly, factsOf, markWords, type Method } from '@/lib/science/methods/method'
import * as statistics from '@/lib/science/methods/statistics'
import { topicMethods } from '@/lib/science/methods/topics'
import { torqueRange } from '@/lib/science/viscosity'

const { ruleMethods, ...others } = drift
const all: [string, Method][] = [
  ...Object.entries({ ...others, ...emulsion, ...heat, ...making, ...measures, ...statistics }),
  ...Object.entries(ruleMethods),
]

/** The rules of the design's table that a series, a reading or a day can meet; the day has a topic of its own. */
const rules = [
  ...['out', 'edge', 'lean', 'onset', 'jump', 'spread', 'torque'],
  ...['conditions', 'type', 'window', 'excursion'],
]

describe('what figures are computed from', () => {
  it('every topic of calc has its method, and names itself as what makes the figure again', () => {
    expect(Object.keys(topicMethods).sort()).toEqual([...topicNames].sort())
    for (const [name, method] of Object.entries(topicMethods)) expect(method.topic).toBe(name)
  })

  it('every rule of the drift has its method', () => {
    expect(Object.keys(ruleMethods).sort()).toEqual(rules.sort())
  })

  it.each(all)('%s says formula, inputs and sources, each source with a known mark', (_, method) => {
    expect(method.name).not.toBe('')
    expect(method.formula.length).toBeGreaterThan(0)
    expect(method.inputs.length).toBeGreaterThan(0)
    expect(method.sources.length).toBeGreaterThan(0)
    for (const { text, mark } of method.sources) {
      expect(text).not.toBe('')
      expect(markWords[mark]).not.toBe('')
    }
    const keys = method.inputs.map(({ key }) => key)
    expect(new Set(keys).size).toBe(keys.length)
    if (method.topic !== null) expect(Object.keys(fields)).toContain(method.topic)
  })

  it('what the design marks as practice or memory carries that mark where it decides', () => {
    const marks = (method: Method) => method.sources.map(({ mark }) => mark)
    expect(marks(measures.viscosityMethod)).toEqual(['practice', 'memory'])
    expect(marks(measures.phSlopeMethod)).toContain('practice')
    expect(marks(measures.separationMethod)).toContain('practice')
    expect(marks(statistics.shelfLifeMethod)).toContain('memory')
    expect(marks(statistics.extrapolationCapMethod)).toContain('memory')
    expect(marks(statistics.observedMethod)).toContain('practice')
    expect(marks(drift.driftMethod)).toContain('memory')
    expect(marks(ruleMethods.lean)).toContain('memory')
    expect(marks(measures.bufferPhMethod)).toEqual(['standard'])
    expect(marks(heat.mktMethod)).toContain('standard')
  })

  it('thresholds are those of the library', () => {
    expect(measures.viscosityMethod.formula.join(' ')).toContain(
      `${torqueRange.low} to ${torqueRange.high} %`,
    )
  })
})

describe('a figure’s own facts', () => {
  it('gives every digit, with a true minus, thin gaps and the unit', () => {
    expect(exactly(41600, 'mPa·s')).toBe('41\u2009600 mPa·s')
    expect(exactly(-0.030204678362573106)).toBe('\u22120.030204678362573106')
    expect(exactly(1.5e-9)).toBe('1.5 × 10 to the power \u22129')
  })

  it('shows what went in, leaves out what did not, and offers a recheck only with an input', () => {
    const own = { result: '1', values: { torquePercent: 62, factor: null } }
    const facts = factsOf(measures.viscosityMethod, own)
    expect(facts.inputs).toEqual([{ says: 'torque', value: '62 %' }])
    expect(facts.recheck).toBeNull()
    expect(factsOf(measures.viscosityMethod, { ...own, input: { torquePercent: 62 } }).recheck).toEqual({
      topic: 'viscosity',
      input: { torquePercent: 62 },
    })
  })
})
