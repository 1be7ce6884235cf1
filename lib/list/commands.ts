import { Readable } from 'node:stream'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { transact } from '@/lib/db/transact'
import { refuse } from '@/lib/http/errors'
import type { Download } from '@/lib/http/route'
import { getLab } from '@/lib/lab/queries'
import { dayIn } from '@/lib/study/rules/calendar'
import { grouped } from '@/lib/number/rules'
import { recordEvent } from '@/lib/trail/commands'
import { cellOf, type Cell } from './document/cell'
import { csvOf } from './document/csv'
import { xlsxOf } from './document/xlsx'
import { countUpTo, everyRow } from './queries/every-row'
import type { Source } from './queries/source'
import type { Column, FileQuery, List } from './schema'

/** More rows than this are not read as a file by anybody, and a spreadsheet would not open many more. */
export const mostRows = 100_000

type Asked<Row> = {
  list: List<Row>
  source: Source<Row>
  query: FileQuery
  /** What the list is of, where it is part of something. */
  of?: { code: string; studyId: string }
}

/** All pages of what is shown, as a file; that it was taken stands on the trail before its first byte leaves. */
export async function exportList<Row>(
  db: Db,
  actor: Actor,
  now: string,
  { list, source, query, of }: Asked<Row>,
): Promise<Download> {
  const count = await countUpTo(db, source, mostRows)
  if (count > mostRows)
    throw refuse.invalid(
      `There are more than ${grouped(mostRows, 0)} rows, and a file holds at most that many. Narrow the list by a search or a filter, then export it.`,
    )
  const release = takeTurn(actor.personId)
  try {
    const { timeZone } = await getLab(db)
    const name = of ? `${list.name} of ${of.code}` : list.name
    await transact(db, actor, { requestId: actor.requestId }, (trx) =>
      recordEvent(trx, {
        event: `exported the ${name}`,
        table: 'person',
        id: actor.personId,
        detail: detailOf(query, count, of?.studyId),
      }),
    )
    const columns = list.columns.filter((column) => query.columns.includes(column.key))
    const rows = cells(columns, everyRow(db, source, query), timeZone)
    const file = query.format === 'csv' ? csvOf(rows) : xlsxOf(rows, columns.map(widthOf))
    return {
      body: Readable.toWeb(Readable.from(until(file, release))) as ReadableStream<Uint8Array>,
      type: types[query.format],
      fileName: `${name.replaceAll(' ', '-')}-${dayIn(timeZone, now)}.${query.format}`,
    }
  } catch (thrown) {
    release()
    throw thrown
  }
}

const types = {
  csv: 'text/csv; charset=utf-8',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
}

async function* cells<Row>(
  columns: Column<Row>[],
  rows: AsyncIterable<Row>,
  timeZone: string,
): AsyncGenerator<Cell[]> {
  yield columns.map((column) => column.title)
  for await (const row of rows) yield columns.map((column) => cellOf(column, row, timeZone))
}

function widthOf<Line>({ kind = 'text' }: Column<Line>): number {
  return { text: 24, number: 12, day: 12, instant: 20 }[kind]
}

function detailOf({ format, q, filters, columns }: FileQuery, rows: number, studyId: string | undefined) {
  const set = Object.fromEntries(Object.entries(filters).filter(([, value]) => value !== ''))
  const found = { ...(q ? { search: q } : {}), ...(Object.keys(set).length > 0 ? { filters: set } : {}) }
  return { format, rows, ...found, columns, ...(studyId ? { study_id: studyId } : {}) }
}

const shared = globalThis as typeof globalThis & { stillstandExports?: Map<string, number> }
/** A file whose reader went away before its first byte is never ended by anybody. */
const longestMs = 120_000

/** One file at a time for each person, so that nobody's exports hold up the others' saving. */
function takeTurn(personId: string): () => void {
  const turns = (shared.stillstandExports ??= new Map())
  const begun = Date.now()
  if (begun - (turns.get(personId) ?? 0) < longestMs)
    throw refuse.slowDown(
      'Your last export is still being written. Wait until it is there, then take the next.',
      5,
    )
  turns.set(personId, begun)
  return () => {
    if (turns.get(personId) === begun) turns.delete(personId)
  }
}

async function* until(file: AsyncIterable<Uint8Array>, end: () => void): AsyncGenerator<Uint8Array> {
  try {
    yield* file
  } finally {
    end()
  }
}
