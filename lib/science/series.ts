/**
 * What the drift rules take and give: one attribute of one batch at one station over time.
 *
 * Times are weeks since the initial. Values are in the attribute's own unit (viscosity in mPa·s, separation in
 * % of fill height, …); the caller scales `repeatabilitySd` into the same unit (viscosity: percent × initial).
 */

export type Tolerance =
  | { kind: 'range'; lower?: number; upper?: number }
  | { kind: 'percent'; below?: number; above?: number }
  | { kind: 'shift'; below?: number; above?: number }

/** The interval an attribute must stay in, absolute; null where that side is open. */
export type Band = { lower: number | null; upper: number | null }

/**
 * A reason why a reading may not be comparable, as the application found it (torque, slope, conditions,
 * instrument day, …). `settled` means a person set it aside with a cause. The rules' own doubts are set aside in
 * the same way: `{ reason: 'jump' | 'spread' | 'out', settled: true }`.
 */
export type ReadingDoubt = { reason: string; settled: boolean }

/** One reading of one jar. Superseded and voided readings are left out by the caller. */
export type SeriesReading = {
  id: string
  time: number
  /** Calendar day of the pull; jars of one day make one point of the series. */
  day: string
  jar: string
  /** Replicates, one or more. */
  values: number[]
  doubts: ReadingDoubt[]
  /** Id of the reading that this one, on a spare jar, was made to confirm. */
  isRepeatOf?: string
  /** QA named a laboratory cause with evidence: shown and kept, never counted. */
  isSetAside?: boolean
}

/** Means per day of the coldest other station of the same batch and attribute, the initial left out. */
export type ColdestStation = { times: number[]; values: number[]; days?: string[] }

export type SeriesInput = {
  attribute: string
  tolerance: Tolerance
  /** Weeks at which the study ends. */
  endTime: number
  /** SD of one replicate, in the unit of the values. 0 where it is not known. */
  repeatabilitySd: number
  /** Separation only: what is under it is not yet separation. */
  detectionLimit?: number
  /** Separation: of several jars of one day the worst counts, and onset is looked for. */
  isSeparation: boolean
  /** Replicates of the batch's own initial. */
  initial: number[]
  initialTime?: number
  /** In time order. */
  readings: SeriesReading[]
  coldest?: ColdestStation
}

export type Standing = 'steady' | 'leaning' | 'out' | 'untold'
export type RuleName = 'out' | 'edge' | 'lean' | 'onset' | 'jump' | 'spread' | 'torque'
/** `out` and `leaning` set the standing; a flag wants an answer; a doubt wants a repeat. */
export type RuleLevel = 'out' | 'leaning' | 'flag' | 'doubt' | 'note'
export type Evidence = Record<string, number | string | null>

export type RuleFinding = {
  rule: RuleName
  level: RuleLevel
  /** The time at which the rule first fired in its present run, so that one finding stays one flag. */
  at: number
  readingId?: string
  evidence: Evidence
}

/** One day of the series; the initial is the first. */
export type SeriesPoint = {
  time: number
  day: string | null
  /** What counts where `counted`; otherwise what was read. */
  mean: number
  replicates: number
  counted: boolean
  /** Why it does not count: the reasons, joined by "; ". */
  doubt: string | null
  isInitial: boolean
  isBeyond: boolean
  /** Readings differ by more than their repeatability: a third jar decides. */
  wantsThirdJar: boolean
  /** The series' standing as it was judged on this day, from this and the earlier points. */
  standing: Standing
  /** All readings of the day, repeats and doubted ones too. */
  readingIds: string[]
  /** Those the mean is made of; none where the point does not count. */
  countedIds: string[]
}

/** The least-squares line with what its confidence band needs. */
export type Trend = {
  n: number
  slope: number
  intercept: number
  meanTime: number
  meanValue: number
  sumSquaresTime: number
  /** Residual SD, never below the repeatability of the means. */
  sd: number
}

export type SeriesFinding = {
  band: Band
  initial: number
  standing: Standing
  /** Share of the way from the initial to the edge at the latest counted point: 0 at the initial, 1 at the edge. */
  used: number | null
  latest: number | null
  latestTime: number | null
  slope: number | null
  intercept: number | null
  /** One-sided, in the direction of the slope. */
  slopeP: number | null
  residualSd: number | null
  /** Week in which the trend meets the edge it moves to, and the 95 % limits of that; null where it does not. */
  leavesAt: number | null
  leavesAtLow: number | null
  leavesAtHigh: number | null
  points: readonly SeriesPoint[]
  trend: Trend | null
  rules: RuleFinding[]
}
