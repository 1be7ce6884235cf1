import type { CurveInput, CurveSeries, TrendPoint } from '@/components/charts/curve-data'
import { type AttributeKey, attributeOf, type Attribute } from '@/lib/reading/schema/attributes'
import type { SeriesFinding } from '@/lib/science/series'
import type { CurvesPage } from '@/lib/study/queries/curves'
import { spokenDay } from '@/lib/study/rules/calendar'
import { shownValue, shownWithUnit } from '@/lib/study/rules/words'

type Series = CurvesPage['series'][number]

/** One plot for each attribute of one batch; separation stands first, then what regression serves. */
export function curveInputs(page: CurvesPage, batchId: string): CurveInput[] {
  const own = page.series.filter((series) => series.batchId === batchId)
  return page.study.attributes.flatMap((planned) => {
    const { attribute, method } = planned
    const series = own.filter((one) => one.attribute === attribute)
    const known = attributeOf(attribute, planned)
    const [first] = series
    if (!first || known.words) return []
    const isThousand = attribute === 'viscosity' && first.finding.initial >= 10_000
    const scale = isThousand ? 1000 : 1
    return [
      {
        title: known.label,
        attribute,
        unit: [isThousand ? 'thousand mPa·s' : (units[attribute] ?? known.unit), ...split(method)].filter(
          Boolean,
        ),
        decimals: scale === 1 ? axisDecimals(known) : 0,
        band: bandOf(first.finding, known, scale),
        series: [
          ...besideSeries(page, batchId, known, scale),
          ...page.stations.toReversed().flatMap((station) => {
            const one = series.find((candidate) => candidate.studyStationId === station.id)
            return one ? [seriesOf(one, station, known, scale)] : []
          }),
        ],
        notes: notesOf(series),
      },
    ]
  })
}

/** References of this study and the chosen batch of another one: their counted readings alone, on this study's time. */
function besideSeries(page: CurvesPage, batchId: string, attribute: Attribute, scale: number): CurveSeries[] {
  const references = page.batches
    .filter((batch) => batch.isReference && batch.id !== batchId)
    .flatMap((batch) =>
      page.series
        .filter((one) => one.batchId === batch.id && one.attribute === attribute.key)
        .flatMap((one) => {
          const station = page.stations.find(({ id }) => id === one.studyStationId)
          return station ? [{ ...station, beside: batch.code, points: one.finding.points }] : []
        }),
    )
  const earlier = (page.beside?.series ?? [])
    .filter((one) => one.attribute === attribute.key)
    .filter((one) =>
      page.stations.some(
        (station) =>
          station.isFreezeThaw === one.isFreezeThaw &&
          station.temperatureC === one.temperatureC &&
          station.variant === one.variant,
      ),
    )
    .map((one) => ({ ...one, beside: page.beside!.name }))
  return [...references, ...earlier].map(({ id, isFreezeThaw, temperatureC, beside, points }) => ({
    id: `${beside} ${id}`,
    label: String(temperatureC ?? 25).replace('-', '−'),
    kind: isFreezeThaw ? ('freeze-thaw' as const) : ('temperature' as const),
    temperatureC: temperatureC ?? 25,
    standing: 'untold' as const,
    beside,
    points: points
      .filter((point) => point.counted && point.time <= page.study.endWeeks)
      .map((point) => ({
        weeks: point.time,
        value: point.mean / scale,
        text: shownWithUnit(attribute, point.mean),
      })),
  }))
}

/** The method in lines that fit beside the plot. */
function split(method: string): string[] {
  return method.split(', ').reduce<string[]>((lines, part) => {
    const last = lines.at(-1)
    if (last !== undefined && last.length + part.length < 20) lines[lines.length - 1] = `${last}, ${part}`
    else lines.push(part)
    return lines
  }, [])
}

function seriesOf(
  series: Series,
  station: CurvesPage['stations'][number],
  attribute: Attribute,
  scale: number,
): CurveSeries {
  const { finding } = series
  return {
    id: station.id,
    label: String(station.temperatureC ?? 25).replace('-', '−'),
    kind: station.isFreezeThaw ? 'freeze-thaw' : 'temperature',
    temperatureC: station.temperatureC ?? 25,
    standing: series.standing,
    points: finding.points.map((point) => ({
      weeks: point.time,
      value: point.mean / scale,
      text: shownWithUnit(attribute, point.mean),
      doubt: point.counted ? null : (point.doubt ?? 'takes no part in the trend'),
    })),
    trend: trendOf(series, station, attribute, scale),
    leaves:
      series.standing === 'leaning' && finding.leavesAt !== null
        ? { weeks: finding.leavesAt, low: finding.leavesAtLow, high: finding.leavesAtHigh }
        : null,
  }
}

/**
 * The line of a series as far as its own station is pulled. Only a trend that leans shows how sure it is: the
 * bands of all the steady ones would cover everything. Separation that is out follows no straight line any more.
 */
function trendOf(
  { line, standing }: Series,
  station: CurvesPage['stations'][number],
  attribute: Attribute,
  scale: number,
): TrendPoint[] | null {
  if (line.length === 0 || standing === 'untold') return null
  if (attribute.key === 'separation' && standing !== 'leaning') return null
  const until = Math.max(...station.timePoints)
  const isLeaning = standing === 'leaning'
  return line
    .filter(({ time }) => isLeaning || time <= until)
    .map(({ time, mean, low, high }) => ({
      weeks: time,
      mean: mean / scale,
      low: (isLeaning ? low : mean) / scale,
      high: (isLeaning ? high : mean) / scale,
    }))
}

/** Figures of the axis; what is worth three figures has none behind the point from 100 on. */
function axisDecimals({ key, decimals }: Attribute): number {
  if (key === 'viscosity') return 0
  return decimals === 'three figures' ? 1 : decimals
}

const units: Partial<Record<AttributeKey, string>> = {
  separation: 'percent of fill height',
  mass: 'percent',
}

function bandOf({ band, initial }: SeriesFinding, attribute: Attribute, scale: number) {
  const { lower, upper } = band
  if (lower === null && upper === null) return null
  const shown = (value: number) => (scale === 1 ? shownValue(attribute, value) : (value / scale).toFixed(1))
  const unit = scale === 1 && attribute.unit === '%' ? ' %' : ''
  const text =
    lower === null
      ? `allowed up to ${shown(upper!)}${unit}`
      : upper === null
        ? `at least ${shown(lower)}${unit}`
        : `band ${shown(lower)} to ${shown(upper)}${unit}, initial ${shown(initial)}`
  return { lower: lower === null ? null : lower / scale, upper: upper === null ? null : upper / scale, text }
}

/** Weeks in which readings wait for a repeat, said once with the reason that most of them share. */
function notesOf(series: Series[]) {
  const notes = new Map<number, { text: string; count: number }>()
  for (const { finding } of series) {
    for (const point of finding.points) {
      if (point.counted || !point.doubt) continue
      const week = Math.round(point.time)
      const note = notes.get(week)
      if (note) note.count += 1
      else
        notes.set(week, {
          text: `${point.day ? `${spokenDay(point.day, false)}: ` : ''}${doubtWords(point.doubt)}`,
          count: 1,
        })
    }
  }
  return [...notes].map(([weeks, { text, count }]) => ({
    weeks,
    text: count > 1 ? `${text}. No trend uses these ${count}.` : `${text}. No trend uses it.`,
  }))
}

const knownDoubts: Record<string, string> = {
  jump: 'far from its own line',
  spread: 'replicates lie too far apart',
  torque: 'torque outside its range',
  'later check': 'its instrument proved bad later',
  'common shift': 'one instrument read off everywhere',
}

function doubtWords(doubt: string): string {
  return doubt
    .split('; ')
    .map((reason) => knownDoubts[reason] ?? reason)
    .join(', ')
}
