import type { Asked, Question } from './check'
import { gelsOf, saltsOf } from './film'

/** Charged acrylic thickeners lose their swelling to salt, and some gums set hard with calcium; common gums bear both. */
export function agreeQuestion(asked: Asked): Question | null {
  const [salts, gels] = [saltsOf(asked), gelsOf(asked)]
  if (!salts.length || !gels.length) return null
  const shy = gels.find((line) => /carbomer|acrylate|acryloyl/i.test(line.inciName))
  const calcium = salts.find((line) => /calcium/i.test(line.inciName))
  const sets = calcium ? gels.find((line) => /algin|gellan|pectin/i.test(line.inciName)) : undefined
  return {
    key: 'agree',
    question: 'Do salt and gelling polymer agree?',
    answer: shy
      ? `Open: ${shy.inciName} thins where ${salts[0]?.inciName} is.`
      : sets
        ? `Open: ${sets.inciName} sets hard with ${calcium?.inciName}.`
        : `Yes, nothing known against ${gels[0]?.inciName} with salt.`,
    isOpen: Boolean(shy ?? sets),
    reason: 'A charged polymer coils up in salt water, and the gel is gone.',
    mark: 'practice',
    at: null,
    lines: [...gels, ...salts],
    steps: [],
  }
}
