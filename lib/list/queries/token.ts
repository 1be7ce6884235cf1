import type { ListQuery, ValueKind } from '../schema'
import { sortOf, type Source } from './source'

/** The row at which a page ends: its value in the sort column as PostgreSQL writes it, and its id. */
export type Stop = { id: string; value: string | null }

const written: Record<ValueKind, RegExp> = {
  text: /^[^\0]*$/s,
  number: /^-?\d{1,30}(\.\d{1,40})?$/,
  day: /^\d{4}-\d\d-\d\d$/,
  instant: /^\d{4}-\d\d-\d\d \d\d:\d\d:\d\d(\.\d{1,6})?[+-]\d\d(:\d\d)?$/,
}
const ids = { uuid: /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/, bigint: /^\d{1,18}$/ }

export function writeToken({ value, id }: Stop): string {
  return Buffer.from(JSON.stringify([value, id])).toString('base64url')
}

/** A token that was changed by hand, or made for another order, shows the first page. */
export function readToken<Row>(source: Source<Row>, query: ListQuery): Stop | null {
  if (!query.place) return null
  try {
    const [value, id] = JSON.parse(Buffer.from(query.place.token, 'base64url').toString()) as unknown[]
    const { kind } = sortOf(source, query)
    if (typeof id !== 'string' || !ids[source.idKind].test(id)) return null
    if (value === null) return { id, value }
    if (typeof value !== 'string' || !written[kind].test(value)) return null
    const isDated = kind === 'day' || kind === 'instant'
    if (isDated && Number.isNaN(Date.parse(value.slice(0, 19).replace(' ', 'T')))) return null
    return { id, value }
  } catch {
    return null
  }
}
