/**
 * Typed decimals are not exact in binary: 5.43 + 0.30 gives 5.7299999999999995, and a reading of 5.73 is on that edge,
 * not beyond it. What differs by less than this share is the same number.
 */
const share = 1e-12
/** The same for ratios of differences, which carry the rounding of what was subtracted many times over. */
const shareOfRatio = 1e-9
const digits = 13

/** Above by more than the binary rounding of decimals explains. */
export function isAbove(value: number, limit: number): boolean {
  return value > limit && value - limit > share * Math.max(Math.abs(value), Math.abs(limit))
}

/** A distance between values of about this size, above what is allowed by more than their rounding explains. */
export function isFurther(distance: number, allowed: number, size: number): boolean {
  return distance > allowed && distance - allowed > share * Math.max(Math.abs(size), distance)
}

export function reaches(ratio: number, limit: number): boolean {
  return ratio >= limit * (1 - shareOfRatio)
}

export function exceeds(ratio: number, limit: number): boolean {
  return ratio > limit * (1 + shareOfRatio)
}

/** The decimal that was meant: 5.73 for 5.7299999999999995. */
export function asDecimal(value: number): number {
  return Number(value.toPrecision(digits))
}

/** With one decimal, or with as many more as make it read otherwise than its limit: 94.96 is not 95.0 under 95. */
export function apartFrom(limit: number, value: number): string {
  for (let places = 1; places < digits; places++) {
    const shown = value.toFixed(places)
    if (Number(shown) !== limit || value === limit) return shown
  }
  return String(value)
}
