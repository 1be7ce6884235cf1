import { TZDate } from '@date-fns/tz'
import { format } from 'date-fns'
import type { Column } from '../schema'

/** What stands in one cell of a file: a day or an instant knows its text and its serial number, days since 1899-12-30. */
export type Cell = string | number | { text: string; serial: number; hasTime: boolean } | null

const dayMs = 86_400_000
const firstDay = Date.UTC(1899, 11, 30)

/** A value as its column says what it is; instants in the lab's own zone. */
export function cellOf<Line>(column: Column<Line>, line: Line, timeZone: string): Cell {
  const value = column.value(line)
  if (value === null || value === '') return null
  if (typeof value === 'number') return Number.isFinite(value) ? value : null
  if (column.kind !== 'day' && column.kind !== 'instant') return value
  const hasTime = column.kind === 'instant'
  const text = hasTime ? format(new TZDate(value, timeZone), 'yyyy-MM-dd HH:mm:ss') : value.slice(0, 10)
  const at = Date.parse(hasTime ? `${text.replace(' ', 'T')}Z` : `${text}T00:00:00Z`)
  return { text, serial: (at - firstDay) / dayMs, hasTime }
}
