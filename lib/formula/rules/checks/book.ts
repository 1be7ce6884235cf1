import { percentText } from '../numbers'
import { several, sourceOf, type Asked, type CheckLine, type Question } from './check'

// What the ingredient book knows against what the formula does with it. Asked only where the two differ.

/** Something that has to be melted, in a phase that never gets as warm. */
export function meltQuestion({ lines, steps, factsOf }: Asked): Question | null {
  const solid = lines.flatMap((line) => {
    const facts = factsOf(line)
    const above = facts?.meltsAboveC ?? null
    if (!facts || above === null) return []
    const own = stepsOf(steps, line.phase)
    const warmest = own.reduce<number | null>(
      (most, { step }) => (step.temperatureC === null ? most : Math.max(most ?? -300, step.temperatureC)),
      null,
    )
    return warmest !== null && warmest >= above
      ? []
      : [{ line, above, warmest, own, from: facts.figuresSource }]
  })
  if (!solid.length) return null
  return {
    key: 'melt',
    question: 'Does it melt, or can it go in as it is?',
    answer: `Open: ${several(
      solid.map(({ line, above, warmest }) =>
        warmest === null
          ? `${line.inciName} melts above ${above} °C, and no step says how warm phase ${line.phase} gets`
          : `${line.inciName} melts above ${above} °C, and phase ${line.phase} gets ${warmest} °C`,
      ),
    )}.`,
    isOpen: true,
    reason: 'What is not molten stays as grains, or comes out as crystals in the weeks after.',
    mark: sourceOf(solid.map(({ from }) => from)),
    at: null,
    lines: solid.map(({ line }) => line),
    steps: [...new Set(solid.flatMap(({ own }) => own.map(({ number }) => number)))].toSorted(
      (a, b) => a - b,
    ),
    figures: solid.map(({ above }) => above),
  }
}

export function rangeQuestion({ lines, factsOf }: Asked): Question | null {
  const odd = lines.flatMap((line) => {
    const facts = factsOf(line)
    if (!facts || line.isRemainder) return []
    const { percentLowThousandths: low, percentHighThousandths: high } = facts
    const isLow = low !== null && line.percentThousandths < low
    const isHigh = high !== null && line.percentThousandths > high
    return isLow || isHigh
      ? [{ line, isHigh, limit: (isHigh ? high : low) ?? 0, from: facts.rangeSource }]
      : []
  })
  if (!odd.length) return null
  return {
    key: 'range',
    question: 'Is that share meant?',
    answer: `Open: ${several(
      odd.map(
        ({ line, isHigh, limit }) =>
          `${line.inciName} at ${percentText(line.percentThousandths)} %, usual at ${isHigh ? 'most' : 'least'} ${percentText(limit)} %`,
      ),
    )}.`,
    isOpen: true,
    reason: 'Outside its usual share an ingredient may do nothing, or something else.',
    mark: sourceOf(odd.map(({ from }) => from)),
    at: null,
    lines: odd.map(({ line }) => line),
    steps: [],
    figures: odd.map(({ limit }) => limit),
  }
}

/** A tenth off the book, or, where the book knows nothing, outside what liquids and powders have [practice]. */
const tenth = 0.1
const lightest = 0.6
const heaviest = 6

export function densityQuestion({ lines, factsOf }: Asked): Question | null {
  const odd = lines.flatMap((line) => {
    const book = factsOf(line)
    const from = book?.densitySource ?? 'practice'
    const said = oddDensity(line, book?.density ?? null)
    return said ? [{ line, said, from, book: book?.density ?? null }] : []
  })
  if (!odd.length) return null
  return {
    key: 'density',
    question: 'Is the density right?',
    answer: `Open: ${several(odd.map(({ said }) => said))}.`,
    isOpen: true,
    reason: 'The share by volume, and with it the drawing, is only as good as the densities.',
    mark: sourceOf(odd.map(({ from }) => from)),
    at: null,
    lines: odd.map(({ line }) => line),
    steps: [],
    figures: odd.flatMap(({ line, book }) => [line.density, book]),
  }
}

function oddDensity({ inciName, density }: CheckLine, book: number | null): string | null {
  const name = inciName || 'a line without a name'
  if (density === null || density <= 0) return `${name} has none`
  if (book !== null) {
    return Math.abs(density - book) > tenth * book
      ? `${name} has ${density.toFixed(3)} g/mL here, ${book.toFixed(3)} in the book`
      : null
  }
  return density < lightest || density > heaviest ? `${name} has ${density.toFixed(3)} g/mL` : null
}

/** Steps that name a phase, alone or joined with another, and those that name none. */
function stepsOf(steps: Asked['steps'], phase: string) {
  return steps
    .map((step, index) => ({ step, number: index + 1 }))
    .filter(({ step }) => !step.phase.trim() || step.phase.split(/[^A-Za-z0-9]+/).includes(phase))
}
