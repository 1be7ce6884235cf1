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
  if (cell.state !== 'read') return cell.state
  const percent = cell.separationPercent
  return typeof percent === 'number' ? `separation ${percent.toFixed(1)} %` : cell.label || 'read'
}
