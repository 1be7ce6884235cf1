import { readDecimal } from '@/lib/number/rules'
import { zeroCelsius } from '@/lib/science/kelvin'
import { instantsOf, isTime, Offsets, provenOrder, readTime, type DateOrder } from './logger-time'

export type CsvRow = { line: number; cells: string[] }
/** What the person may say of the file where it does not say so itself. */
export type LoggerChoices = { order: DateOrder | null; unit: 'C' | 'F' | null; column: number | null }
export type LoggerRow = { line: number; at: number; temperatureC: number }
export type BadRow = { line: number; why: string; text: string }
export type ReadLog = {
  columns: string[]
  timeColumns: number[]
  column: number
  unit: 'C' | 'F'
  order: DateOrder | null
  /** The order of day and month cannot be told from the file, so it is asked. */
  asks: 'order' | null
  rows: LoggerRow[]
  bad: BadRow[]
  notes: string[]
}

const hottestC = 400

/** Reads a logger's table: which columns, which unit, which order of the date, and why a row cannot be taken. */
export function readLog(
  table: readonly CsvRow[],
  zone: string,
  now: number,
  choices: LoggerChoices,
): ReadLog | null {
  const first = table.findIndex((row) => timeColumnsOf(row.cells).length > 0)
  if (first === -1) return null
  const timeColumns = timeColumnsOf(table[first]!.cells)
  const columns = headerOf(table, first)
  const column = choices.column ?? temperatureColumn(table.slice(first, first + 50), columns, timeColumns)
  if (column === null) return null
  const unit = choices.unit ?? (/(°|º|deg|\()\s*F\b|fahrenheit/i.test(columns[column] ?? '') ? 'F' : 'C')
  const data = table.slice(first).filter((row) => row.cells.some((cell) => cell.trim() !== ''))
  const written = data.map((row) => timeColumns.map((at) => (row.cells[at] ?? '').trim()).join(' '))
  const order = choices.order ?? orderOf(written)
  const isOpen = order === null && written.some((text) => isEither(text))
  return {
    columns,
    timeColumns,
    column,
    unit,
    order,
    asks: isOpen ? 'order' : null,
    ...(isOpen
      ? { rows: [], bad: [], notes: [] }
      : takeRows(data, written, { zone, now, column, unit, order })),
  }
}

type How = { zone: string; now: number; column: number; unit: 'C' | 'F'; order: DateOrder | null }

function takeRows(data: readonly CsvRow[], written: readonly string[], how: How) {
  const offsets = new Offsets()
  const rows: LoggerRow[] = []
  const bad: BadRow[] = []
  const seen = new Map<number, LoggerRow>()
  let twice = 0
  let last = -Infinity
  data.forEach((row, index) => {
    const refuse = (why: string) =>
      bad.push({ line: row.line, why, text: row.cells.join(' | ').slice(0, 120) })
    const time = readTime(written[index]!, how.order)
    if (time.kind === 'unreadable')
      return refuse(written[index] ? `"${written[index]}" is no date and time.` : 'The time is missing.')
    const instants = time.kind === 'instant' ? [time.at] : instantsOf(time.wall, how.zone, offsets)
    if (instants.length === 0)
      return refuse(`In ${how.zone} the clocks skipped this time: they went forward.`)
    // In the hour that comes twice the rows' own order tells which of the two it is.
    const at = instants.find((instant) => instant > last) ?? instants.at(-1)!
    if (instants.length > 1) twice += 1
    const typed = (row.cells[how.column] ?? '').trim()
    const value = readDecimal(typed.replace(/\s*(°|º)?\s*[CF]$/i, ''))
    if (value === null)
      return refuse(typed === '' ? 'The temperature is missing.' : `"${typed}" is no temperature.`)
    const temperatureC = how.unit === 'F' ? Math.round(((value - 32) / 1.8) * 100) / 100 : value
    if (temperatureC <= -zeroCelsius) return refuse(`${typed} is below absolute zero.`)
    if (temperatureC > hottestC) return refuse(`${typed} is hotter than any station.`)
    if (at > how.now) return refuse('This time is still to come.')
    const known = seen.get(at)
    if (known && known.temperatureC === temperatureC)
      return refuse(`It is the same as line ${known.line}, so it is kept once.`)
    if (known) return refuse(`Line ${known.line} gives another temperature for the same time.`)
    last = at
    const taken = { line: row.line, at, temperatureC }
    seen.set(at, taken)
    rows.push(taken)
  })
  return { rows, bad, notes: notesOf(twice, how) }
}

function notesOf(twice: number, { zone, unit }: How): string[] {
  return [
    ...(twice > 0
      ? [
          `${twice} ${twice === 1 ? 'row lies' : 'rows lie'} in the hour that came twice in ${zone} when the clocks went back; their order tells which is meant.`,
        ]
      : []),
    ...(unit === 'F' ? ['The column is in °F and is kept in °C.'] : []),
  ]
}

/** One cell with date and time, or a date and beside it a time. */
function timeColumnsOf(cells: readonly string[]): number[] {
  for (const [index, cell] of cells.entries()) {
    const text = cell.trim()
    if (!isTime(text)) continue
    if (/\d:\d/.test(text)) return [index]
    const clock = cells.findIndex(
      (other, at) => at !== index && isTime(`${text} ${other.trim()}`) && /\d:\d/.test(other),
    )
    if (clock !== -1) return [index, clock]
  }
  return []
}

function headerOf(table: readonly CsvRow[], first: number): string[] {
  const above = table[first - 1]?.cells ?? []
  return table[first]!.cells.map((_, index) => (above[index] ?? '').trim() || `column ${index + 1}`)
}

/** Named as a temperature, else the first column of numbers beside the time that does not merely count the rows. */
function temperatureColumn(rows: readonly CsvRow[], columns: readonly string[], times: readonly number[]) {
  const numbers = columns.flatMap((_, index) => {
    if (times.includes(index)) return []
    const values = rows.flatMap(
      (row) => readDecimal((row.cells[index] ?? '').replace(/[°º]?[CF]$/i, '')) ?? [],
    )
    const isCount =
      values.length > 2 && values.every((value, at) => at === 0 || value === values[at - 1]! + 1)
    return values.length > 0 ? [{ index, isCount }] : []
  })
  const named = numbers.find(({ index }) => /temp|°|º|celsius|fahrenheit|\bC\b/i.test(columns[index]!))
  return (named ?? numbers.find(({ isCount }) => !isCount))?.index ?? null
}

function orderOf(written: readonly string[]): DateOrder | null {
  for (const text of written) {
    const proven = provenOrder(text)
    if (proven) return proven
  }
  return null
}

function isEither(text: string): boolean {
  const time = readTime(text, null)
  return time.kind === 'wall' && time.isEitherOrder
}
