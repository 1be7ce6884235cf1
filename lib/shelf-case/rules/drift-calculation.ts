import { driftTopic, readSeries } from '@/lib/science/calc/drift'
import { assessSeries } from '@/lib/science/drift'
import { ScienceError } from '@/lib/science/guard'
import { mean } from '@/lib/science/mean'
import { isUsable, pullDays, type PullDay } from '@/lib/science/pull-day'
import type { SeriesFinding, SeriesInput } from '@/lib/science/series'
import type { DriftCalculation, DriftInput } from '@/lib/shelf-case/rules/content'

/**
 * A series as topic `drift` takes it: every measurement that takes part, repeats under the time of the pull they
 * repeat, and what a person set aside. Null where `calc` would not judge it (nothing read, or an initial outside).
 */
export function driftCalculation(series: SeriesInput): DriftCalculation | null {
  const days = pullDays(series).filter((day) => day.measurements.length > 0)
  if (days.length === 0) return null
  const entries = days.flatMap((day) => entriesOf(day, series.isSeparation))
  const settled = days.flatMap((day) => settledOf(day))
  const input: DriftInput = {
    times: entries.map((entry) => entry.time),
    values: entries.map((entry) => entry.values),
    initial: series.initial,
    tolerance: series.tolerance,
    endTime: series.endTime,
    repeatabilitySd: series.repeatabilitySd,
    ...(series.coldest ? { coldest: { times: series.coldest.times, values: series.coldest.values } } : {}),
    ...(series.isSeparation && series.detectionLimit !== undefined
      ? { detectionLimit: series.detectionLimit }
      : {}),
    ...(settled.length > 0 ? { settled } : {}),
  }
  try {
    return { topic: 'drift', input, output: driftTopic.run(input) as DriftCalculation['output'] }
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

/** The whole finding of a frozen series, as `drift` comes to it, with each day's mean and standing. */
export function findingOf(input: DriftInput): SeriesFinding {
  return assessSeries(readSeries(input))
}

function entriesOf(day: PullDay, isSeparation: boolean): { time: number; values: number[] }[] {
  const repeats = new Set(day.measurements.slice(1).flatMap((m) => m.readingIds))
  return day.measurements.map((measurement, i) => {
    // Of several watch jars the worst counts, so all of them are given.
    const made = day.readings.filter((reading) =>
      isSeparation && i === 0
        ? isUsable(reading) && !repeats.has(reading.id)
        : measurement.readingIds.includes(reading.id),
    )
    const values = isSeparation ? made.map((r) => mean(r.values)) : made.flatMap((r) => r.values)
    return { time: day.time, values }
  })
}

function settledOf(day: PullDay): NonNullable<DriftInput['settled']> {
  const rules = new Set(day.measurements.flatMap((m) => [...m.settled]))
  return (['jump', 'spread', 'out'] as const)
    .filter((rule) => rules.has(rule))
    .map((rule) => ({ time: day.time, rule }))
}
