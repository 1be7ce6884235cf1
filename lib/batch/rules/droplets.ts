import { readDecimal } from '@/lib/number/rules'
import { droplets, type Droplets } from '@/lib/science/droplets'

export type Counted = { diametersUm: number[]; counts: number[] }
/** What a count of drops under the microscope comes to; with one size alone only that is known. */
export type Drops = Counted & Droplets

export const dropSizes = { lower: 0.01, upper: 2000 }
const mostKinds = 2000
const mostDrops = 1_000_000

/**
 * Reads diameters in micrometres, one for each drop or with how many there were: "2,5 × 12; 3,5 × 30; 4,1". A sentence
 * where one of them is none.
 */
export function readDrops(typed: string): Counted | string {
  const parts = typed
    .trim()
    .replace(/\s*[x×*]\s*/gi, '×')
    .split(/[;\s]+|,(?=\s)/)
    .filter((part) => part !== '')
  if (!parts.length) return 'Type the diameters of the drops in micrometres, such as 2.5 × 12; 3.5 × 30.'
  if (parts.length > mostKinds)
    return `That are ${parts.length} sizes; at most ${mostKinds} are read. Join equal ones, such as 2.5 × 12.`
  const counted: Counted = { diametersUm: [], counts: [] }
  for (const part of parts) {
    const [size = '', count = '1', ...more] = part.split('×')
    const [diameter, number] = [readDecimal(size), readDecimal(count)]
    const shown = part.slice(0, 20)
    if (diameter === null || number === null || more.length)
      return `"${shown}" is no diameter. Type sizes in micrometres, such as 2.5 × 12; 3.5 × 30.`
    if (diameter < dropSizes.lower || diameter > dropSizes.upper)
      return `"${shown}": drops run from ${dropSizes.lower} to ${dropSizes.upper} micrometres.`
    if (!Number.isInteger(number) || number < 1 || number > mostDrops)
      return `"${shown}": drops are counted whole, from 1 on.`
    counted.diametersUm.push(diameter)
    counted.counts.push(number)
  }
  return counted
}

/** Moment means, volume median and span of what was counted; null where one size stands for all. */
export function dropsOf({ diametersUm, counts }: Counted): Drops | null {
  const isOne = diametersUm.length === 1 && counts[0] === 1
  return isOne ? null : { diametersUm, counts, ...droplets({ diametersUm, counts }) }
}

export const dropCount = ({ counts }: Counted) => counts.reduce((sum, count) => sum + count, 0)
