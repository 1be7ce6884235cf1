import { named, share, type Asked, type Question } from './check'

// What holds the film between drops of water: asked of emulsions with the water inside.

export function polymerQuestion({ inOil }: Asked): Question {
  const polymers = inOil.filter((line) => /polymer/i.test(line.function))
  const thick = inOil.find((line) => /thicken/i.test(line.function))
  const first = polymers[0]
  return {
    key: 'polymer',
    question: 'Is a polymer in the oil?',
    answer: first
      ? `Yes, ${share(first)}.`
      : `Open: no line of the oil is a polymeric emulsifier${thick ? `, ${thick.inciName} only thickens` : ''}.`,
    isOpen: !first,
    reason: 'Its coat keeps a thin film from being squeezed out.',
    mark: 'practice',
    at: 'film',
    lines: first ? polymers : inOil,
    steps: [],
  }
}

export function thickQuestion({ inOil }: Asked): Question {
  const thick = inOil.filter((line) => /thicken|crosspolymer/i.test(`${line.function} ${line.inciName}`))
  return {
    key: 'thick',
    question: 'Is the oil thickened?',
    answer: thick[0] ? `Yes, ${named(thick[0])}.` : 'Open: no line thickens the oil.',
    isOpen: !thick.length,
    reason: 'A thick oil drains slowly out of its films while the cream stands.',
    mark: 'practice',
    at: null,
    lines: thick.length ? thick : inOil,
    steps: [],
  }
}

export function saltQuestion(asked: Asked): Question {
  const salt = saltsOf(asked)
  return {
    key: 'salt',
    question: 'Is there salt in the water?',
    answer: salt[0] ? `Yes, ${named(salt[0])}.` : 'Open: no line of the water is an electrolyte.',
    isOpen: !salt.length,
    reason: 'Salt holds the water in each drop, so that large drops do not grow at the cost of small ones.',
    mark: 'practice',
    at: null,
    lines: salt.length ? salt : asked.inWater,
    steps: [],
  }
}

export function gelQuestion(asked: Asked): Question {
  const gel = gelsOf(asked)
  return {
    key: 'gel',
    question: 'Is the water gelled first?',
    answer: gel[0] ? `Yes, ${named(gel[0])}.` : 'Open: no line gels the water.',
    isOpen: !gel.length,
    reason: 'Stiff water lets a torn film close again.',
    mark: 'practice',
    at: 'drop',
    lines: gel.length ? gel : asked.inWater,
    steps: [],
  }
}

export const saltsOf = ({ inWater }: Asked) =>
  inWater.filter((line) => /electrolyte|salt/i.test(line.function))
export const gelsOf = ({ inWater }: Asked) => inWater.filter((line) => /gel|thicken/i.test(line.function))
