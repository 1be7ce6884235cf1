import { curveInputs } from '@/components/study/curve-inputs'
import type { CurveInput } from '@/components/charts/curve-data'
import type { FlagPage } from '@/lib/flag/queries/one'
import type { CurvesPage } from '@/lib/study/queries/curves'
import type { SheetPage, SheetShelf } from '@/lib/study/queries/sheet'

/** What stands around a flag: its series as a plot, and the shelf of its station. */
export type FlagContext = {
  plot: CurveInput | null
  endWeeks: number
  todayWeeks: number | null
  /** The reading that is ringed. */
  ring: { weeks: number; value: number } | null
  shelf: Pick<SheetShelf, 'station' | 'cells'> | null
  detectionPercent: number
}

export function flagContext(flag: FlagPage, curves: CurvesPage, sheet: SheetPage): FlagContext {
  const all = curveInputs(curves, flag.batchId).find((one) => one.title === flag.label) ?? null
  // The gap keeps the name that follows the reading clear of its ring.
  const own = (all?.series ?? [])
    .filter((one) => one.id === flag.studyStationId)
    .map((one) => ({ ...one, label: `\u00a0${one.label}` }))
  const shelf =
    sheet.shelves
      .find((one) => one.batchId === flag.batchId)
      ?.rows.find((row) => row.station.id === flag.studyStationId) ?? null
  return {
    // A doubt about an instrument's day is about every station that it read.
    plot: all && {
      ...all,
      series: own.length > 0 ? own : all.series,
      notes: own.length > 0 ? all.notes : [],
    },
    endWeeks: sheet.study.endWeeks,
    todayWeeks: sheet.todayWeeks,
    ring: own.length > 0 ? ringOf(flag, own[0]!.points) : null,
    shelf: shelf && { station: shelf.station, cells: shelf.cells },
    detectionPercent: sheet.detectionPercent,
  }
}

/** The plot's points are the series' days in the same order. */
function ringOf(flag: FlagPage, points: { weeks: number; value: number }[]) {
  const days = flag.series?.finding.points ?? []
  const index = days.findIndex((day) => flag.readingId !== null && day.readingIds.includes(flag.readingId))
  const found =
    points[index] ??
    points.toSorted(
      (a, b) => Math.abs(a.weeks - (flag.atWeeks ?? 0)) - Math.abs(b.weeks - (flag.atWeeks ?? 0)),
    )[0]
  return found ? { weeks: found.weeks, value: found.value } : null
}
