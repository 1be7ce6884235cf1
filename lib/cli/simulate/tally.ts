import { chanceFrom } from './chance'
import type { Figure, Tally } from './figures/figure'

/** Studies counted with one seed; the cut is fixed, so that the table does not depend on how many work on it. */
export const chunkSize = 500

export type Chunk = { figure: string; seed: number; studies: number }

/** Each figure has seeds of its own, whatever is asked for beside it. */
export function chunksOf(figures: readonly Figure[], firstSeed: number): Chunk[] {
  return figures.flatMap((figure, index) =>
    Array.from({ length: Math.ceil(figure.studies / chunkSize) }, (_, i) => ({
      figure: figure.name,
      seed: firstSeed + 1000 * index + i,
      studies: Math.min(chunkSize, figure.studies - i * chunkSize),
    })),
  )
}

export function tallyChunk(figures: readonly Figure[], chunk: Chunk): Tally {
  const figure = figures.find((one) => one.name === chunk.figure)
  if (!figure) throw new Error(`There is no figure "${chunk.figure}".`)
  const chance = chanceFrom(chunk.seed)
  const tally: Tally = {}
  const count = (key: string, by = 1) => {
    tally[key] = (tally[key] ?? 0) + by
  }
  for (let i = 0; i < chunk.studies; i++) figure.study(chance, count)
  return tally
}

export function addTally(to: Tally, more: Tally): void {
  for (const [key, value] of Object.entries(more)) to[key] = (to[key] ?? 0) + value
}
