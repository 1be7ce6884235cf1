import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import { minuteText } from '@/lib/report/rules'
import { shownWithUnit } from '@/lib/study/rules/words'
import { spokenDay } from '@/lib/study/rules/calendar'
import { fieldUnit, fieldWord } from './words'

type Row = Record<string, unknown>
export type Change = { field: string; before: string | null; after: string | null }

/** Of a changed row what differs; of a new or removed one what says something to a person. */
export function changesOf(
  entry: { operation: string; before: unknown; after: unknown },
  zone: string,
  people: ReadonlyMap<string, string>,
): Change[] {
  const was = rowOf(entry.before)
  const became = rowOf(entry.after)
  const text = (field: string, value: unknown, row: Row) =>
    isPerson(field) ? (people.get(String(value)) ?? null) : shown(field, value, row, zone)
  if (entry.operation === 'update') {
    return Object.keys(became).flatMap((field) => {
      if (isSilent(field) || same(was[field], became[field])) return []
      const [before, after] = [text(field, was[field], was), text(field, became[field], became)]
      return before === null && after === null ? [] : [{ field: fieldWord(field), before, after }]
    })
  }
  const isRemoved = entry.operation === 'delete'
  const row = isRemoved ? was : became
  return Object.keys(row).flatMap((field) => {
    if (isSilent(field) || /_(by|at)$|^(code|number|evidence)$/.test(field)) return []
    const value = text(field, row[field], row)
    if (value === null) return []
    return [{ field: fieldWord(field), before: isRemoved ? value : null, after: isRemoved ? null : value }]
  })
}

function isPerson(field: string): boolean {
  return field.endsWith('_by') || field === 'person_id'
}

/** Ids and counters tell nothing to a person; what they stand for is named beside the entry. */
function isSilent(field: string): boolean {
  return !isPerson(field) && /^(id|version)$|_ids?$/.test(field)
}

function rowOf(value: unknown): Row {
  return typeof value === 'object' && value !== null ? (value as Row) : {}
}

function same(a: unknown, b: unknown): boolean {
  return JSON.stringify(a) === JSON.stringify(b)
}

/** Longer than this nobody reads a value in a list; the whole of it is in its own page. */
const readable = 160

function shown(field: string, value: unknown, row: Row, zone: string): string | null {
  if (value === null || value === undefined || value === '') return null
  if (field === 'attribute' && typeof value === 'string') return attributeName(value)
  if (field === 'value' && typeof value === 'number' && typeof row['attribute'] === 'string')
    return shownWithUnit(attributeOf(row['attribute'], undefined), value)
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'number') return `${numberText(value)}${fieldUnit(field)}`
  if (typeof value === 'string') return stringText(field, value, zone)
  return nested(value, zone)
}

function numberText(value: number): string {
  return String(Number(value.toPrecision(6))).replace('-', '−')
}

function stringText(field: string, value: string, zone: string): string {
  if (/^\d{4}-\d\d-\d\dT/.test(value)) return minuteText(value, zone)
  if (/^\d{4}-\d\d-\d\d$/.test(value)) return spokenDay(value)
  if (/sha256$/.test(field)) return `${value.slice(0, 12)}…`
  if (value.length > readable)
    return field === 'content' ? `frozen, ${value.length} characters` : `${value.slice(0, readable)}…`
  return value
}

/** A detail such as layer heights, a plan or evidence: its own fields in a row, its parts counted. */
function nested(value: unknown, zone: string): string | null {
  if (Array.isArray(value)) {
    if (value.length === 0) return null
    const texts = value.filter((one) => typeof one !== 'object').map(String)
    return texts.length === value.length ? texts.join(', ').slice(0, readable) : `${value.length} parts`
  }
  const parts = Object.entries(value as Row).flatMap(([key, one]) => {
    const name = key.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`)
    const text = Array.isArray(one) || typeof one !== 'object' ? shown(name, one, {}, zone) : null
    return text === null || isSilent(name) ? [] : [`${fieldWord(name)} ${text}`]
  })
  if (parts.length === 0) return null
  const whole = parts.join(', ')
  return whole.length > readable ? `${whole.slice(0, readable)}…` : whole
}

/** How a person knows the row, and where it can be read. */
export function aboutRow(
  entry: { tableName: string | null; rowId: string | null; before: unknown; after: unknown },
  people: ReadonlyMap<string, string>,
): { name: string | null; href: string | null } {
  if (entry.tableName === 'person') return { name: people.get(entry.rowId ?? '') ?? null, href: null }
  const row = { ...rowOf(entry.before), ...rowOf(entry.after) }
  const text = (field: string) =>
    typeof row[field] === 'string' || typeof row[field] === 'number' ? String(row[field]) : null
  const code = text('code')
  const name = code ?? text('number') ?? text('name') ?? text('label')
  const places: Record<string, string> = {
    study: 'studies',
    batch: 'batches',
    formula: 'formulas',
    shelf_case: 'cases',
    protocol: 'protocols',
  }
  const place = places[entry.tableName ?? '']
  if (entry.tableName === 'flag') return { name, href: name && `/flags/${name}` }
  return { name, href: place && code ? `/${place}/${encodeURIComponent(code)}` : null }
}
