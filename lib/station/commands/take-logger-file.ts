import { readFile } from 'node:fs/promises'
import { sql } from 'kysely'
import Papa from 'papaparse'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import type { Received } from '@/lib/http/upload'
import { keepWhole } from '@/lib/photo/commands/keep-whole'
import { loggerKey } from '@/lib/photo/rules/keys'
import { readLog, type CsvRow, type LoggerRow, type ReadLog } from '../rules/logger-file'
import { maxLoggerRows, type LoggerFields, type LoggerPreview } from '../schema'

const shownBad = 200

/** What the file would give, or, once the person takes it, what it gave. Sent twice it is taken once. */
export async function takeLoggerFile(
  trx: Trx,
  actor: Actor,
  stationId: string,
  file: Received,
  fields: LoggerFields,
  now: string,
): Promise<LoggerPreview> {
  const station = await claimStation(trx, stationId, fields.isTaken)
  const before = await trx
    .selectFrom('loggerFile')
    .select('sha256')
    .where('id', '=', fields.id)
    .executeTakeFirst()
  if (before && before.sha256 !== file.sha256)
    throw refuse.conflict('Another file was sent under this id. Choose the file again.')
  const table = tableOf(await readFile(file.path), station.zone, Date.parse(now))
  if (table.rows.length > maxLoggerRows)
    throw refuse.tooLarge(`The file has more than ${maxLoggerRows} lines. Split it and send the parts.`)
  const log = readLog(table.rows, station.zone, Date.parse(now), fields)
  if (!log) {
    throw refuse.invalid(
      'No line of this file holds a date, a time and a temperature. Export the log as CSV with one reading a line.',
      { file: 'No readings are found in it.' },
    )
  }
  const known = await knownRows(trx, stationId, log)
  const fresh = log.rows.filter((row) => !known.has(row.at))
  const preview = previewOf(
    table.delimiter,
    station.zone,
    log,
    known,
    fresh,
    await sentBefore(trx, stationId, file),
  )
  if (!fields.isTaken || before) return { ...preview, isTaken: before !== undefined }
  if (log.asks)
    throw refuse.invalid('Say first whether the day or the month comes first.', { order: 'Choose one.' })
  const [first, last] = [log.rows.at(0), log.rows.at(-1)]
  if (!first || !last)
    throw refuse.invalid('No row of this file can be taken.', { file: 'Every row is bad.' })
  await keepWhole(trx, loggerKey(file.sha256), file.path, 'text/csv')
  const times = log.rows.map((row) => row.at)
  await trx
    .insertInto('loggerFile')
    .values({
      id: fields.id,
      stationId,
      sha256: file.sha256,
      bytes: file.bytes,
      originalName: file.originalName,
      readAs: JSON.stringify(preview.readAs),
      takenRows: fresh.length,
      knownRows: preview.knownRows,
      badRows: log.bad.length,
      fromAt: new Date(times.reduce((a, b) => Math.min(a, b))).toISOString(),
      toAt: new Date(times.reduce((a, b) => Math.max(a, b))).toISOString(),
      recordedBy: actor.personId,
    })
    .execute()
  await insertRows(trx, actor, stationId, fields.id, fresh)
  return { ...preview, isTaken: true }
}

/** Of two who take a file for the same station at once the second waits, and finds the first one's rows. */
async function claimStation(trx: Trx, id: string, isTaken: boolean) {
  const station = await trx
    .selectFrom('station')
    .select(['id', 'name'])
    .select(sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'))
    .where('id', '=', id)
    .$if(isTaken, (query) => query.forNoKeyUpdate())
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  return station
}

const delimiters = [';', '\t', ',', '|'] as const
const sampleLines = 200

/** Loggers write UTF-8, UTF-16 or the old code page of western Windows; the delimiter is the one that gives most readings. */
function tableOf(bytes: Uint8Array, zone: string, now: number): { delimiter: string; rows: CsvRow[] } {
  const text = decoded(bytes).replace(/^\uFEFF/, '')
  const sample = text.split('\n').slice(0, sampleLines).join('\n')
  const given = { order: 'day first', unit: null, column: null } as const
  const readings = delimiters.map((one) => readLog(parsed(sample, one), zone, now, given)?.rows.length ?? 0)
  const delimiter = delimiters[readings.indexOf(Math.max(...readings))]!
  return { delimiter, rows: parsed(text, delimiter) }
}

function parsed(text: string, delimiter: string): CsvRow[] {
  let line = 1
  return Papa.parse<string[]>(text, { delimiter }).data.map((cells) => {
    const row = { line, cells }
    line += 1 + cells.reduce((sum, cell) => sum + (cell.match(/\n/g)?.length ?? 0), 0)
    return row
  })
}

function decoded(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    return new TextDecoder('windows-1252').decode(bytes)
  }
}

async function knownRows(trx: Trx, stationId: string, log: ReadLog): Promise<Map<number, number>> {
  if (log.rows.length === 0) return new Map()
  const times = log.rows.map((row) => row.at)
  const rows = await trx
    .selectFrom('stationTemperature')
    .select(['measuredAt', 'temperatureC'])
    .where('stationId', '=', stationId)
    .where('measuredAt', '>=', new Date(times.reduce((a, b) => Math.min(a, b))).toISOString())
    .where('measuredAt', '<=', new Date(times.reduce((a, b) => Math.max(a, b))).toISOString())
    .execute()
  return new Map(rows.map((row) => [Date.parse(row.measuredAt), row.temperatureC]))
}

async function sentBefore(trx: Trx, stationId: string, file: Received) {
  return trx
    .selectFrom('loggerFile')
    .innerJoin('person', 'person.id', 'loggerFile.recordedBy')
    .select(['person.name as by', 'loggerFile.recordedAt as at'])
    .where('loggerFile.stationId', '=', stationId)
    .where('loggerFile.sha256', '=', file.sha256)
    .orderBy('loggerFile.recordedAt')
    .executeTakeFirst()
}

function previewOf(
  delimiter: string,
  zone: string,
  log: ReadLog,
  known: ReadonlyMap<number, number>,
  fresh: readonly LoggerRow[],
  before: { by: string; at: string } | undefined,
): LoggerPreview {
  const values = fresh.map((row) => row.temperatureC)
  const other = log.rows.filter((row) => known.has(row.at) && known.get(row.at) !== row.temperatureC)
  return {
    isTaken: false,
    readAs: {
      delimiter,
      zone,
      columns: log.columns,
      timeColumns: log.timeColumns,
      column: log.column,
      unit: log.unit,
      order: log.order,
    },
    asks: log.asks,
    freshRows: fresh.length,
    knownRows: log.rows.length - fresh.length,
    otherRows: other.slice(0, shownBad).map((row) => ({ ...row, knownC: known.get(row.at)! })),
    badRows: log.bad.length,
    bad: log.bad.slice(0, shownBad),
    notes: log.notes,
    from: fresh[0] ? new Date(fresh[0].at).toISOString() : null,
    to: fresh.length > 0 ? new Date(fresh.at(-1)!.at).toISOString() : null,
    minC: values.length > 0 ? values.reduce((a, b) => Math.min(a, b)) : null,
    maxC: values.length > 0 ? values.reduce((a, b) => Math.max(a, b)) : null,
    sample: fresh.slice(0, 5).map((row) => ({ ...row, at: new Date(row.at).toISOString() })),
    before: before ?? null,
  }
}

async function insertRows(
  trx: Trx,
  actor: Actor,
  stationId: string,
  fileId: string,
  rows: readonly LoggerRow[],
) {
  const part = 10_000
  for (let from = 0; from < rows.length; from += part) {
    const some = rows.slice(from, from + part)
    await sql`
      insert into station_temperature (id, station_id, measured_at, temperature_c, source, logger_file_id, recorded_by)
      select id, ${stationId}::uuid, at, celsius, 'logger', ${fileId}::uuid, ${actor.personId}::uuid
      from unnest(${some.map(() => newId())}::uuid[],
        ${some.map((row) => new Date(row.at).toISOString())}::timestamptz[],
        ${some.map((row) => row.temperatureC)}::numeric[]) as taken (id, at, celsius)
    `.execute(trx)
  }
}
