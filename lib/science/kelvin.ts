import { assertFinite, ScienceError } from './guard'

/** 0 °C in kelvin. */
export const zeroCelsius = 273.15

/** Degrees Celsius in kelvin; refuses what is not above absolute zero. */
export function kelvin(field: string, celsius: number): number {
  assertFinite(field, celsius)
  const value = celsius + zeroCelsius
  if (value <= 0) throw new ScienceError(field, `${celsius} °C is not above absolute zero`)
  return value
}
