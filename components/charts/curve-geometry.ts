import { heatMarker } from '../marks/heat'
import type { StationMarker } from '../marks/heat'
import type { CurveBand, CurveSeries, TrendPoint } from './curve-data'

/** Place on the plot: weeks along, share of the height from the foot (0) to the top (1). */
export type Spot = { weeks: number; share: number }

export type CurveScale = {
  /** Share of the plot's height at which a value lies; beyond 0 to 1 it is off the plot. */
  share: (value: number) => number
  ticks: { value: number; share: number }[]
  /** Where the scale is broken: everything above is drawn `times` smaller. */
  gap: { from: number; to: number; times: number } | null
  /** The foot of the plot is zero and is drawn as a line. */
  isFromZero: boolean
}

/** Share of the height below the break, and the break itself. */
const BELOW_BREAK = 0.74
const BREAK = 0.02

/**
 * The vertical scale of one attribute. It holds the band, the readings and what of the forecasts lies
 * near. A one-sided limit that was far exceeded breaks the scale above twice the limit, because on one
 * straight scale everything that matters would lie on the floor.
 */
export function curveScale(series: CurveSeries[], band: CurveBand | null): CurveScale {
  const values = series.flatMap(({ points }) => points.map(({ value }) => value))
  const edges = [band?.lower, band?.upper].filter((edge): edge is number => typeof edge === 'number')
  const forecasts = series.flatMap(({ trend }) => (trend ?? []).flatMap(({ low, high }) => [low, high]))
  const all = [...values, ...edges]
  if (all.length === 0) return straight(0, 1, true)
  const [low, high] = [Math.min(...all), Math.max(...all)]
  const size = high - low || Math.abs(high) || 1
  const near = forecasts.filter((value) => value > low - size * 0.25 && value < high + size * 0.25)
  const floor = Math.min(low, ...near)
  const top = Math.max(high, ...near)
  const isFromZero = low >= 0 && low < size * 0.08
  const upper = band?.upper
  if (isFromZero && typeof upper === 'number' && edges.length === 1 && high > upper * 4)
    return broken(upper * 2, Math.max(...values) * 1.05)
  const margin = (top - floor || size) * 0.1
  return straight(isFromZero ? 0 : floor - margin, top + margin, isFromZero)
}

function straight(min: number, max: number, isFromZero: boolean): CurveScale {
  const share = (value: number) => (value - min) / (max - min)
  return {
    share,
    ticks: niceTicks(min, max, 5).map((value) => ({ value, share: share(value) })),
    gap: null,
    isFromZero,
  }
}

function broken(at: number, high: number): CurveScale {
  const step = niceStep(high, 3)
  const max = Math.ceil(high / step) * step
  const above = BELOW_BREAK + BREAK
  const share = (value: number) =>
    value <= at ? (value / at) * BELOW_BREAK : above + ((value - at) / (max - at)) * (1 - above)
  const lower = niceTicks(0, at, 4)
  const upper = niceTicks(at, max, 3).filter((value) => share(value) > above + 0.04)
  const times = (max - at) / (1 - above) / (at / BELOW_BREAK)
  return {
    share,
    ticks: [...lower, ...upper].map((value) => ({ value, share: share(value) })),
    gap: { from: BELOW_BREAK, to: above, times: Math.round(times) },
    isFromZero: true,
  }
}

/** Round steps of 1, 2 or 5 times a power of ten, about `count` of them. */
export function niceTicks(min: number, max: number, count: number): number[] {
  const step = niceStep(max - min, count)
  const ticks: number[] = []
  for (let index = Math.ceil(min / step - 1e-9); index * step <= max + step * 1e-9; index += 1)
    ticks.push(Number((index * step).toPrecision(12)))
  return ticks
}

function niceStep(range: number, count: number): number {
  const raw = range / count
  const power = 10 ** Math.floor(Math.log10(raw))
  const factor = raw / power
  return power * (factor < 1.5 ? 1 : factor < 3.5 ? 2 : factor < 7.5 ? 5 : 10)
}

export type PlottedCurve = {
  series: CurveSeries
  measured: Spot[]
  doubted: Spot[]
  /** The trend up to the latest reading that counts, and beyond it. */
  trend: Spot[]
  forecast: Spot[]
  confidence: { weeks: number; low: number; high: number }[]
  /** Where the series is named: at the right edge, or after its latest reading. */
  name: Spot & { side: 'edge' | 'after' }
}

export function plotCurve(series: CurveSeries, scale: CurveScale, endWeeks: number): PlottedCurve {
  const spot = (weeks: number, value: number): Spot => ({ weeks, share: scale.share(value) })
  const counted = series.points.filter(({ doubt }) => !doubt)
  const measured = counted.map(({ weeks, value }) => spot(weeks, value))
  const last = counted.at(-1)
  const trend = series.trend && series.trend.length > 1 ? series.trend : null
  const kept = trend ? withinPlot(trend, scale) : []
  const turn = last?.weeks ?? 0
  const at = trend ? meanAt(trend, turn) : null
  const solid = kept.filter(({ weeks }) => weeks < turn).map(({ weeks, mean }) => spot(weeks, mean))
  const dashed = kept.filter(({ weeks }) => weeks > turn).map(({ weeks, mean }) => spot(weeks, mean))
  const joint = at === null ? [] : [spot(turn, at)]
  const end = dashed.at(-1) ?? measured.at(-1) ?? { weeks: 0, share: 0 }
  return {
    series,
    measured,
    doubted: series.points.filter(({ doubt }) => doubt).map(({ weeks, value }) => spot(weeks, value)),
    trend: solid.length > 0 ? [...solid, ...joint] : [],
    forecast: dashed.length > 0 ? [...joint, ...dashed] : [],
    confidence: kept.map(({ weeks, low, high }) => ({
      weeks,
      low: clamp(scale.share(low)),
      high: clamp(scale.share(high)),
    })),
    name: { ...end, side: end.weeks > endWeeks * 0.92 ? 'edge' : 'after' },
  }
}

/** The fitted mean at a time between two of the points it was computed for. */
export function meanAt(trend: TrendPoint[], weeks: number): number | null {
  const next = trend.findIndex((point) => point.weeks >= weeks)
  const after = trend[next]
  if (!after) return trend.at(-1)?.mean ?? null
  const before = trend[next - 1]
  if (!before || after.weeks === before.weeks) return after.mean
  const share = (weeks - before.weeks) / (after.weeks - before.weeks)
  return before.mean + (after.mean - before.mean) * share
}

/** The trend up to where its mean leaves the plot for good. */
function withinPlot(trend: TrendPoint[], scale: CurveScale): TrendPoint[] {
  const firstOff = trend.findIndex(({ mean }, index) => {
    const share = scale.share(mean)
    return index > 0 && (share < 0 || share > 1)
  })
  return firstOff < 0 ? trend : trend.slice(0, firstOff)
}

function clamp(share: number): number {
  return Math.min(1, Math.max(0, share))
}

/** The areas outside the band, as shares of the height from low to high. */
export function washes(band: CurveBand | null, scale: CurveScale): [number, number][] {
  const areas: [number, number][] = []
  if (typeof band?.lower === 'number') areas.push([0, scale.share(band.lower)])
  if (typeof band?.upper === 'number') areas.push([scale.share(band.upper), 1])
  return areas.filter(([low, high]) => high > low)
}

/** Names moved up or down, in order, until each has `apart` pixels and all lie between the limits. */
export function spreadNames(ys: number[], apart: number, top: number, bottom: number): number[] {
  const order = ys.map((y, index) => ({ y, index })).sort((a, b) => a.y - b.y)
  let floor = top
  for (const one of order) {
    one.y = Math.max(one.y, floor)
    floor = one.y + apart
  }
  let ceiling = bottom
  for (const one of [...order].reverse()) {
    one.y = Math.min(one.y, ceiling)
    ceiling = one.y - apart
  }
  const placed = [...ys]
  for (const { y, index } of order) placed[index] = y
  return placed
}

/** Readings in doubt that share a week are ringed together. */
export function doubtGroups(curves: PlottedCurve[]): { weeks: number; low: number; high: number }[] {
  const groups = new Map<number, { weeks: number; low: number; high: number }>()
  for (const { doubted } of curves)
    for (const { weeks, share } of doubted) {
      const group = groups.get(weeks)
      groups.set(weeks, {
        weeks,
        low: Math.min(share, group?.low ?? share),
        high: Math.max(share, group?.high ?? share),
      })
    }
  return [...groups.values()]
}

export function curveName(series: CurveSeries): string {
  if (series.kind === 'batch') return series.label
  const name = series.kind === 'freeze-thaw' ? 'Freeze-thaw' : `${series.label} °C`
  return series.beside ? `${name}, ${series.beside}` : name
}

/** The edge that a series moves towards. */
export function nearerEdge(
  { trend, points }: CurveSeries,
  lower: number | null | undefined,
  upper: number | null | undefined,
): number | null {
  if (typeof lower !== 'number') return upper ?? null
  if (typeof upper !== 'number') return lower
  const first = trend?.[0]?.mean ?? points[0]?.value ?? 0
  const last = trend?.at(-1)?.mean ?? points.at(-1)?.value ?? 0
  return last < first ? lower : upper
}

/** Batches have no temperature of their own to be told apart by, so they take the markers in turn. */
const BATCH_MARKERS: StationMarker[] = [
  'circle',
  'square',
  'triangle-up',
  'triangle-down',
  'diamond',
  'cross',
]

export function markerOf(series: CurveSeries, index: number): StationMarker {
  if (series.kind !== 'batch') return heatMarker(series.temperatureC)
  return BATCH_MARKERS[index % BATCH_MARKERS.length] ?? 'circle'
}

/** Leaning and out in alarm; the rest in ink, or in soft beside the one that is looked at. */
export function colourRole(series: CurveSeries): 'alarm' | 'ink' | 'soft' {
  if (series.beside) return 'soft'
  if (series.standing === 'out' || series.standing === 'leaning') return 'alarm'
  return series.isQuiet ? 'soft' : 'ink'
}
