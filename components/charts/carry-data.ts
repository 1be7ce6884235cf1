export type CarryReading = {
  months: number
  /** One mark a reading: a dot, or a cross for one that is missing. */
  marks?: ('read' | 'missing')[]
  /** Or the jars themselves, where what is read is seen. */
  jars?: { topPercent: number; bottomPercent: number }[]
}

export type CarryAttribute = {
  key: string
  name: string
  /** How far it carries; null where its bound stays inside past the ruler's end. */
  months: number | null
  isLimiting: boolean
  readings: CarryReading[]
}

export type CarryInput = {
  /** End of the ruler. */
  endMonths: number
  /** Months with a long tick and their number. */
  ticks: number[]
  readToMonths: number
  proposedMonths: number | null
  capMonths: number | null
  /** `cap: twice 12`. */
  capText?: string
  attributes: CarryAttribute[]
}
