import type { JarState, Posture } from '../marks/jar-shapes'
import type { Standing } from '../marks/standing-shapes'
import { timeScale } from './time-scale'
import type { TimeScale } from './time-scale'

export type SheetCellState = 'read' | 'due' | 'planned' | 'missed' | 'resting' | 'broken' | 'lost'

export type SheetMishap = 'missed' | 'broken' | 'lost' | 'wrong jar' | 'pulled early'

export type SheetCell = {
  weeks: number
  state: SheetCellState
  topPercent?: number | null
  bottomPercent?: number | null
  separationPercent?: number | null
  detectionPercent?: number | null
  /** Seen and too thin for the ruler. */
  isTrace?: boolean
  bleed?: number
  creamPercent?: number
  /** What happened to jars of this pull besides being read: `broken`. */
  mishaps?: SheetMishap[]
  posture?: Posture
  href?: string | null
  /** What stands under the jar: `24.0`, `due`, `missed`. */
  label: string
  flagNumbers?: number[]
}

export type SheetRow = {
  id: string
  /** The station's number as written: `45`. */
  label: string
  kind: 'temperature' | 'freeze-thaw'
  temperatureC: number
  note: string
  standing: Standing
  cells: SheetCell[]
  /** When separation left its band, or is forecast to. */
  frontWeeks?: number | null
  frontForecastWeeks?: number | null
  leavesLow?: number | null
  leavesHigh?: number | null
  remark?: string | null
}

export type SheetFlag = {
  number: number
  sentence: string
  /** Said in the alarm colour after the sentence: `about 9 Jan 2027`. */
  strong?: string | null
  rowId: string
  weeks: number | null
  href: string
  level: 'out' | 'open'
}

export type SheetProps = {
  startOn: string
  endWeeks: number
  todayWeeks: number | null
  rows: SheetRow[]
  flags: SheetFlag[]
}

export type PlacedRow = {
  row: SheetRow
  top: number
  jarTop: number
  shelf: number
  bottom: number
  flags: SheetFlag[]
  /** Where the row's flag sentences, its remark and the like begin. */
  unspentX: number
}

export type SheetLayout = {
  glyph: number
  width: number
  height: number
  right: number
  scale: TimeScale
  points: number[]
  rows: PlacedRow[]
}

/** Room for a flag's sentence to the right of what is spent; with less the sentences go above the jars. */
const SENTENCE_ROOM = 300
const LINE = 22
const BELOW_SHELF = 29
const RIGHT_MARGIN = 20

/** Jars are 52 high, and 40 from seven rows on, so that a sheet keeps to one screen. */
export function glyphHeight(rowCount: number): number {
  return rowCount >= 7 ? 40 : 52
}

/** `sentencesBelow`: on a phone the flags' sentences follow the sheet, so no room is kept for them. */
export function sheetLayout(
  sheet: SheetProps,
  available: number,
  stationWidth: number,
  sentencesBelow = false,
): SheetLayout {
  const fair = (available - stationWidth - RIGHT_MARGIN) / span(sheet)
  const full = glyphHeight(sheet.rows.length)
  // Smaller jars before a sheet that has to be pushed sideways.
  const glyph = neededPerWeek(sheet.rows, full) > fair ? Math.min(full, 40) : full
  const points = [...new Set(sheet.rows.flatMap((row) => row.cells.map((cell) => cell.weeks)))].sort(
    (a, b) => a - b,
  )
  const perWeek = Math.max(neededPerWeek(sheet.rows, glyph), fair)
  const end = stationWidth + perWeek * span(sheet)
  const scale = timeScale(stationWidth, end, span(sheet))
  const right = end + RIGHT_MARGIN
  const rows: PlacedRow[] = []
  let top = 8
  for (const row of sheet.rows) {
    const flags = sheet.flags.filter((flag) => flag.rowId === row.id)
    const unspentX = unspentFrom(row, sheet, scale)
    const above = spaceAbove(sentencesBelow ? 0 : flags.length, right - unspentX)
    const jarTop = top + above
    const shelf = jarTop + glyph
    rows.push({ row, top, jarTop, shelf, bottom: shelf + BELOW_SHELF, flags, unspentX })
    top = shelf + BELOW_SHELF
  }
  return { glyph, width: right, height: top + 24, right, scale, points, rows }
}

export function hasRoomFor(placed: PlacedRow, right: number): boolean {
  return right - placed.unspentX >= SENTENCE_ROOM
}

function span({ endWeeks }: SheetProps): number {
  return endWeeks > 0 ? endWeeks : 1
}

function spaceAbove(lines: number, room: number): number {
  if (lines === 0) return 30
  return room >= SENTENCE_ROOM ? Math.max(30, lines * LINE + 1) : lines * LINE + 32
}

function unspentFrom(row: SheetRow, { todayWeeks, endWeeks }: SheetProps, scale: TimeScale): number {
  const spent = row.cells.filter((cell) => cell.state !== 'planned').map((cell) => cell.weeks)
  const isFreezeThaw = row.kind === 'freeze-thaw'
  const today = todayWeeks === null || isFreezeThaw ? 0 : Math.min(todayWeeks, endWeeks)
  return scale.x(Math.max(0, today, ...spent)) + (isFreezeThaw ? 40 : 30)
}

/** How far a jar reaches left and right of its week, as shares of its height. */
function reach(cell: SheetCell): { left: number; right: number } {
  if (cell.posture === 'lying') return { left: 0.5 - LYING_SHIFT, right: 0.5 + LYING_SHIFT }
  if (cell.posture === 'leaning') return { left: 0.36 + LEANING_SHIFT, right: 0.44 - LEANING_SHIFT }
  return { left: 0.32, right: 0.32 }
}

const LYING_SHIFT = 0.077
const LEANING_SHIFT = 0.02

/** A fallen jar lies a little after its week and a leaning one a little before, to keep clear of others. */
export function jarShift(cell: SheetCell, glyph: number): number {
  if (cell.posture === 'lying') return glyph * LYING_SHIFT
  if (cell.posture === 'leaning') return -glyph * LEANING_SHIFT
  return 0
}

/** The least scale at which no two neighbours on a shelf touch. */
function neededPerWeek(rows: SheetRow[], glyph: number): number {
  let needed = 0
  for (const { cells } of rows) {
    cells.forEach((cell, index) => {
      const next = cells[index + 1]
      if (!next || next.weeks <= cell.weeks) return
      const room = Math.max((reach(cell).right + reach(next).left) * glyph, 34)
      needed = Math.max(needed, Math.min(room / (next.weeks - cell.weeks), 80))
    })
  }
  return needed
}

export function jarStateOf(cell: SheetCell): JarState {
  if (cell.state === 'lost') return 'missed'
  return cell.state === 'read' ? 'drawn' : cell.state
}
