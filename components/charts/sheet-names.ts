import type { SheetCell, SheetRow } from './sheet-layout'
import { dayAfter, dayName, timeLabel, unitOf } from './time-scale'
import type { TimeUnit } from './time-scale'

/** How a row is called aloud and in the table. */
export function rowName(row: SheetRow): string {
  return row.kind === 'freeze-thaw' ? 'Freeze-thaw' : `${row.label} °C`
}

/** How a cell is called aloud: station, time, day, what was found, flags. */
export function cellName(row: SheetRow, cell: SheetCell, startOn: string, endWeeks: number): string {
  const unit: TimeUnit = unitOf(endWeeks)
  const day = dayName(dayAfter(startOn, cell.weeks), true)
  const flags = cell.flagNumbers ?? []
  const said = [
    cellFinding(cell),
    ...(cell.posture === 'leaning' ? ['leaning'] : []),
    ...(cell.posture === 'lying' ? ['out'] : []),
    ...(flags.length > 0 ? [`${flags.length === 1 ? 'flag' : 'flags'} ${flags.join(', ')}`] : []),
  ]
  return `${rowName(row)}, ${unit} ${timeLabel(cell.weeks, unit)} (${day}): ${said.join(', ')}`
}

export function cellFinding(cell: SheetCell): string {
  const happened = happenedIn(cell)
  if (cell.state !== 'read') return [cell.state, ...happened].join(', ')
  return [layersFinding(cell), ...noted(cell), ...happened].join(', ')
}

/** What happened to jars of the pull, where the place itself does not say it. */
export function happenedIn({ state, mishaps = [] }: SheetCell): string[] {
  return [...new Set(mishaps)].filter((kind) => kind !== state)
}

function layersFinding({ isTrace, separationPercent: percent, label }: SheetCell): string {
  if (isTrace) return 'separation a hairline'
  return typeof percent === 'number' ? `separation ${percent.toFixed(1)} %` : label || 'read'
}

/** What stands beside the separation and does not count into it. */
export function noted({ bleed, creamPercent }: SheetCell): string[] {
  return [
    ...(bleed ? [`bleed ${bleed} of 4`] : []),
    ...(creamPercent ? [`cream layer ${creamPercent.toFixed(1)} %`] : []),
  ]
}
