const weekMs = 7 * 24 * 3600 * 1000

/** Weeks from one instant to another, both as ISO 8601 texts; negative where it comes before. */
export function weeksSince(from: string, to: string): number {
  return (Date.parse(to) - Date.parse(from)) / weekMs
}

/** Weeks in a month of 365.25 / 12 days. */
export const weeksPerMonth = 365.25 / 12 / 7

/** Weeks since the start as months, exact. */
export function monthsOf(weeks: number): number {
  return weeks / weeksPerMonth
}

/**
 * The month a pull stands for. A pull of month 24 is made some days early or late inside its window; what it
 * supports is month 24, so a time within 0.2 months of a whole month is that month. Others stay as they are.
 */
export function nominalMonths(weeks: number): number {
  const months = monthsOf(weeks)
  const whole = Math.round(months)
  return Math.abs(months - whole) <= 0.2 ? whole : months
}
