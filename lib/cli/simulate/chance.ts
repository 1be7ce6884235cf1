import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64'
import { uniformInt } from 'pure-rand/distribution/uniformInt'
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus'

/** Chance with a seed: the same studies on every machine. */
export type Chance = {
  /** From 0 up to but not including 1. */
  uniform: () => number
  between: (low: number, high: number) => number
  /** Standard normal deviate. */
  normal: () => number
  /** A whole number from 0 up to but not including n. */
  below: (n: number) => number
  sign: () => 1 | -1
  happens: (probability: number) => boolean
}

const settling = 64

export function chanceFrom(seed: number): Chance {
  const generator = xoroshiro128plus(seed)
  // Neighbouring seeds start alike: let them part before the first study.
  for (let i = 0; i < settling; i++) uniformFloat64(generator)
  const uniform = () => uniformFloat64(generator)
  let spare: number | null = null
  return {
    uniform,
    between: (low, high) => low + (high - low) * uniform(),
    below: (n) => uniformInt(generator, 0, n - 1),
    sign: () => (uniform() < 0.5 ? -1 : 1),
    happens: (probability) => uniform() < probability,
    // Box and Muller give two at a time; never the logarithm of 0.
    normal: () => {
      if (spare !== null) {
        const kept = spare
        spare = null
        return kept
      }
      const radius = Math.sqrt(-2 * Math.log(1 - uniform()))
      const angle = 2 * Math.PI * uniform()
      spare = radius * Math.sin(angle)
      return radius * Math.cos(angle)
    },
  }
}
