import type { Standing } from '../marks/standing-shapes'

export type CurvePoint = {
  weeks: number
  value: number
  /** The reading as it is written, with its unit. */
  text: string
  /** Why the reading takes no part in the trend, where it does not. */
  doubt?: string | null
}

/** A fitted mean with the limits of its confidence band at one time. */
export type TrendPoint = { weeks: number; mean: number; low: number; high: number }

export type CurveSeries = {
  id: string
  /** The station's number as written, or a batch's code where stations are not what differs. */
  label: string
  kind: 'temperature' | 'freeze-thaw' | 'batch'
  temperatureC: number
  standing: Standing
  points: CurvePoint[]
  /** In time order, from time zero to as far as the forecast is shown. */
  trend?: TrendPoint[] | null
  leaves?: { weeks: number; low: number | null; high: number | null } | null
  /** Set back where another series is the one that is looked at. */
  isQuiet?: boolean
  /** What it is a series of, where it only stands beside for comparison: drawn soft, judged by nobody. */
  beside?: string
}

export type CurveBand = {
  lower?: number | null
  upper?: number | null
  /** `allowed up to 2.0 %`. */
  text: string
}

export type CurveNote = { weeks: number; text: string }

export type CurveInput = {
  title: string
  /** The key of the attribute that it shows. */
  attribute?: string
  /** Lines of small print under the title: unit, method. */
  unit: string[]
  /** Decimals of the numbers on the axis. */
  decimals: number
  series: CurveSeries[]
  band: CurveBand | null
  /** Said beside the doubted readings of a week. */
  notes?: CurveNote[]
}

export type CurveFrame = {
  width: number
  height: number
  /** Left edge of the plot and where time zero and the end lie on it. */
  left: number
  zero: number
  end: number
}

export type CurveTime = { startOn: string; endWeeks: number; todayWeeks: number | null }

/** The plot in pixels: where times and shares of the height lie. */
export type CurvePlace = {
  left: number
  right: number
  top: number
  bottom: number
  x: (weeks: number) => number
  y: (share: number) => number
  /** Too narrow for sentences: they are written beside the plot instead. */
  isNarrow: boolean
}
