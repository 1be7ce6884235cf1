import { highInternalPhaseAbove } from '@/lib/science/phase-fraction'
import { sourceOf, type Asked, type Question } from './check'

/** More inside than the book knows the emulsifier to hold; asked only where drops are packed, or a limit is passed. */
export function holdsQuestion({ lines, isWaterInside, inOil, inWater, ...asked }: Asked): Question | null {
  const inside = asked.internalVolumePercent
  const emulsifiers = (isWaterInside ? inOil : [...inWater, ...inOil]).filter((line) =>
    /emulsif/i.test(line.function),
  )
  if (inside === null || lines.length === 0 || emulsifiers.length === 0) return null
  const known = emulsifiers.flatMap((line) => {
    const facts = asked.factsOf(line)
    return facts?.holdsInternalPercent
      ? [{ line, holds: facts.holdsInternalPercent, from: facts.figuresSource }]
      : []
  })
  const best = known.toSorted((a, b) => b.holds - a.holds)[0]
  const isPacked = inside > 100 * highInternalPhaseAbove
  if (!isPacked && (!best || inside <= best.holds)) return null
  const shown = `${inside.toFixed(1)} %`
  return {
    key: 'holds',
    question: 'Does the emulsifier hold that much inside?',
    answer: !best
      ? `Open: ${shown} by volume, and the book does not say what ${emulsifiers[0]?.inciName} holds.`
      : inside > best.holds
        ? `Open: ${shown} by volume; ${best.line.inciName} is known to hold ${best.holds} %.`
        : `Yes, ${shown} by volume; ${best.line.inciName} is known to hold ${best.holds} %.`,
    isOpen: !best || inside > best.holds,
    reason: 'Past what its coat can cover, films tear and drops run together.',
    mark: best ? sourceOf([best.from]) : 'practice',
    at: null,
    lines: emulsifiers,
    steps: [],
    figures: [shown, best?.holds ?? null],
  }
}
