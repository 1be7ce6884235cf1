import { addDays } from '@/lib/study/rules/calendar'
import { whyClosed, type LabCalendar } from '@/lib/study/rules/working-days'
import type { Workload } from '@/lib/study/rules/workload'
import { timeScale, type TimeScale } from './time-scale'

/** One week's standing column: `low` from the shelf up, `high` on top of it. */
export type Column = {
  monday: string
  x: number
  width: number
  low: number
  high: number
  jars: number
  isNamed: boolean
}
export type WorkloadLayout = {
  scale: TimeScale
  /** Height of the drawing; the shelf lies at its foot. */
  height: number
  shelf: number
  columns: Column[]
  /** Hairlines across, each at so many jars. */
  steps: { jars: number; y: number }[]
  /** Stretches of the shelf on which somebody is there, by day. */
  open: { from: number; to: number }[]
  late: { x: number; width: number; height: number } | null
}

const tall = 150
const top = 26

/** `low` and `high` say which part of a week stands in which manner: opened and watched, or before and added. */
export function workloadLayout(
  workload: Workload,
  parts: { low: number; high: number }[],
  calendar: LabCalendar,
  width: number,
  zero: number,
): WorkloadLayout {
  const { weeks, late } = workload
  const scale = timeScale(zero, width - 34, weeks.length)
  const most = Math.max(4, late, ...parts.map(({ low, high }) => low + high))
  const step = stepOf(most)
  const shelf = top + tall
  const px = (jars: number) => (jars / most) * tall
  const each = scale.x(1) - scale.x(0)
  const isRoomy = each >= 23
  const fullest = Math.max(...parts.map(({ low, high }) => low + high))
  const columns = weeks.map((week, at) => {
    const { low, high } = parts[at]!
    const jars = low + high
    return {
      monday: week.monday,
      x: scale.x(at) + each * 0.16,
      width: each * 0.68,
      low: px(low),
      high: px(high),
      jars,
      isNamed: jars > 0 && (isRoomy || jars === fullest),
    }
  })
  return {
    scale,
    height: shelf + 14,
    shelf,
    columns: onlyFirst(columns, isRoomy),
    steps: Array.from({ length: Math.floor(most / step) }, (_, at) => (at + 1) * step).map((jars) => ({
      jars,
      y: shelf - px(jars),
    })),
    open: openStretches(weeks[0]!.monday, weeks.length, scale, calendar),
    late: late > 0 ? { x: zero - 38, width: 20, height: px(late) } : null,
  }
}

/** Where there is no room for every number, only the first of the fullest weeks carries its own. */
function onlyFirst(columns: Column[], isRoomy: boolean): Column[] {
  if (isRoomy) return columns
  const first = columns.findIndex((one) => one.isNamed)
  return columns.map((one, at) => ({ ...one, isNamed: at === first }))
}

/** 1, 2 or 5 times a power of ten, so that two to five lines stand across. */
function stepOf(most: number): number {
  const power = 10 ** Math.floor(Math.log10(most))
  return (
    [0.2, 0.5, 1, 2].map((part) => part * power).find((step) => step >= 1 && most / step < 5) ?? power * 5
  )
}

function openStretches(monday: string, weeks: number, scale: TimeScale, calendar: LabCalendar) {
  const holidays = new Map(calendar.holidays.map((one) => [one.day, one.name]))
  const stretches: { from: number; to: number }[] = []
  for (let day = 0; day < weeks * 7; day++) {
    if (whyClosed(calendar, addDays(monday, day), holidays) !== null) continue
    const [from, to] = [scale.x(day / 7), scale.x((day + 1) / 7)]
    const last = stretches.at(-1)
    if (last && from - last.to < 0.01) last.to = to
    else stretches.push({ from, to })
  }
  return stretches
}
