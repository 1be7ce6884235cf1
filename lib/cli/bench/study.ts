import { mean } from '../../science/mean'
import type { SeriesInput } from '../../science/series'

/** Numbers from 0 to 1, the same on every machine (a linear congruential generator). */
function numbersFrom(seed: number): () => number {
  let state = seed
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0
    return state / 4_294_967_296
  }
}

const rates = [0.1, 0.35, 1, 1.4]

/**
 * A study as large as they come: 400 series of 40 pulls over two years, a third each pH, viscosity in two replicates
 * and separation, each beside its coldest station; the warmer drift, some leave their band.
 */
export function largeStudy(): SeriesInput[] {
  const next = numbersFrom(20261201)
  const noise = () => next() + next() + next() + next() - 2
  const times = Array.from({ length: 40 }, (_, i) => 1 + i * 2.5)
  return Array.from({ length: 400 }, (_, i) => {
    const kind = (['ph', 'viscosity', 'separation'] as const)[i % 3]!
    const rate = rates[i % 4]! * next()
    const shape = {
      ph: { start: 5.5, s: 0.03, drift: -0.006, replicates: 1 },
      viscosity: { start: 48000, s: 1900, drift: -90, replicates: 2 },
      separation: { start: 0, s: 0.5, drift: 0.06, replicates: 1 },
    }[kind]
    const valuesAt = (time: number, drift: number) =>
      Array.from({ length: shape.replicates }, () => {
        const value = shape.start + drift * time + shape.s * 1.7 * noise()
        return kind === 'separation' ? Math.max(0, value) : value
      })
    const cold = times.map((time) => valuesAt(time, shape.drift * 0.1 * rate))
    return {
      attribute: kind,
      tolerance:
        kind === 'ph'
          ? { kind: 'shift', below: 0.5, above: 0.5 }
          : kind === 'viscosity'
            ? { kind: 'percent', below: 20, above: 20 }
            : { kind: 'range', upper: 5 },
      endTime: 104,
      repeatabilitySd: shape.s,
      isSeparation: kind === 'separation',
      ...(kind === 'separation' ? { detectionLimit: 1 } : {}),
      initial: valuesAt(0, 0),
      readings: times.map((time, j) => ({
        id: `${i}-${j}`,
        time,
        day: `day ${time}`,
        jar: `jar ${j}`,
        values: valuesAt(time, shape.drift * rate),
        doubts: [],
      })),
      coldest: {
        times,
        values: cold.map(mean),
        days: times.map((time) => `day ${time}`),
      },
    }
  })
}
