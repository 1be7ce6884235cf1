import { meanKineticTemperature, type MeanKineticTemperature } from './mean-kinetic-temperature'

export type MktInput = { temperaturesC: number[]; hoursEach?: number[]; deltaHkJ?: number }

/** Mean kinetic temperature in the shape that `calc` and a frozen case hold it. */
export function mkt({ temperaturesC, hoursEach, deltaHkJ }: MktInput): MeanKineticTemperature {
  return meanKineticTemperature(temperaturesC, hoursEach, deltaHkJ)
}
