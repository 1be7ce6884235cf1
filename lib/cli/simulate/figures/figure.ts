import type { Chance } from '../chance'

/** Counts that add up over studies. */
export type Tally = Record<string, number>

/** Something that is counted over many studies. */
export type Figure = {
  name: string
  studies: number
  /** One study more: what it adds to the counts. */
  study: (chance: Chance, count: (key: string, by?: number) => void) => void
}
