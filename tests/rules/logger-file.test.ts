import { describe, expect, it } from 'vitest'
import { readLog, type LoggerChoices } from '@/lib/station/rules/logger-file'
import { instantsOf, Offsets, readTime } from '@/lib/station/rules/logger-time'

const zone = 'Europe/Berlin'
const now = Date.parse('2026-12-01T12:00:00Z')
const none: LoggerChoices = { order: null, unit: null, column: null }
const table = (text: string, delimiter = ';') =>
  text.split('\n').map((line, index) => ({ line: index + 1, cells: line.split(delimiter) }))
const read = (text: string, choices: Partial<LoggerChoices> = {}, delimiter = ';') =>
  readLog(table(text, delimiter), zone, now, { ...none, ...choices })!
const instants = (rows: { at: number }[]) => rows.map((row) => new Date(row.at).toISOString())

describe("a logger's file", () => {
  it('finds header, columns and decimal comma, and names each bad row with its line', () => {
    const log = read(
      [
        'Logger 7; oven 3',
        'No.;Date;Time;Temperature (°C);Humidity',
        '1;02.03.2026;08:00;45,1;20',
        '2;02.03.2026;08:10;---;20',
        '3;02.03.2026;25:10;45,2;20',
        '4;31.02.2026;08:20;45,2;20',
        '5;02.03.2026;08:30;;20',
        '6;02.03.2026;08:00;45,1;20',
        '7;02.03.2026;08:00;44,9;20',
        '8;02.03.2036;08:40;45,0;20',
        '9;02.03.2026;08:50;-300;20',
        '',
        '10;02.03.2026;09:00;45,3;20',
      ].join('\n'),
    )
    expect(log.timeColumns).toEqual([1, 2])
    expect(log.columns[log.column]).toBe('Temperature (°C)')
    expect(instants(log.rows)).toEqual(['2026-03-02T07:00:00.000Z', '2026-03-02T08:00:00.000Z'])
    expect(log.rows.map((row) => row.temperatureC)).toEqual([45.1, 45.3])
    expect(log.bad.map(({ line, why }) => [line, why])).toEqual([
      [4, '"---" is no temperature.'],
      [5, '"02.03.2026 25:10" is no date and time.'],
      [6, '"31.02.2026 08:20" is no date and time.'],
      [7, 'The temperature is missing.'],
      [8, 'It is the same as line 3, so it is kept once.'],
      [9, 'Line 3 gives another temperature for the same time.'],
      [10, 'This time is still to come.'],
      [11, '-300 is below absolute zero.'],
    ])
  })

  it('asks which of day and month comes first where nothing proves it, and does not guess', () => {
    const unclear = '03/04/2026 08:00,25.0\n05/04/2026 08:00,25.1'
    expect(read(unclear, {}, ',')).toMatchObject({ asks: 'order', rows: [] })
    expect(instants(read(unclear, { order: 'month first' }, ',').rows)[0]).toBe('2026-03-04T07:00:00.000Z')
    expect(instants(read(unclear, { order: 'day first' }, ',').rows)[0]).toBe('2026-04-03T06:00:00.000Z')
    const proven = read('03/04/2026 08:00,25.0\n03/14/2026 08:00,25.1', {}, ',')
    expect(proven).toMatchObject({ asks: null, order: 'month first' })
    expect(proven.rows).toHaveLength(2)
  })

  // EU summer time in 2026: forward on 29 March at 02:00, back on 25 October at 03:00 (Directive 2000/84/EC).
  it('takes no row of the hour that the clocks skipped', () => {
    const log = read('2026-03-29 01:30;5\n2026-03-29 02:30;5\n2026-03-29 03:30;5')
    expect(instants(log.rows)).toEqual(['2026-03-29T00:30:00.000Z', '2026-03-29T01:30:00.000Z'])
    expect(log.bad).toMatchObject([{ line: 2, why: expect.stringContaining('skipped') }])
  })

  it('tells the hour that comes twice apart by the order of the rows, and says so', () => {
    const log = read(['02:00', '02:30', '02:00', '02:30', '03:00'].map((t) => `2026-10-25 ${t};5`).join('\n'))
    expect(instants(log.rows)).toEqual([
      '2026-10-25T00:00:00.000Z',
      '2026-10-25T00:30:00.000Z',
      '2026-10-25T01:00:00.000Z',
      '2026-10-25T01:30:00.000Z',
      '2026-10-25T02:00:00.000Z',
    ])
    expect(log.notes[0]).toMatch(/^4 rows lie in the hour that came twice/)
  })

  it('keeps °F as °C: 32 °F is 0 °C and 212 °F is 100 °C', () => {
    const log = read('time;Temp (°F)\n2026-03-02 08:00;32\n2026-03-02 09:00;212')
    expect(log.unit).toBe('F')
    expect(log.rows.map((row) => row.temperatureC)).toEqual([0, 100])
  })

  it('does not take a row counter for the temperature', () => {
    const log = read('1;2026-03-02 08:00;5.1\n2;2026-03-02 09:00;5.3\n3;2026-03-02 10:00;5.2')
    expect(log.rows.map((row) => row.temperatureC)).toEqual([5.1, 5.3, 5.2])
  })

  it('reads 50,000 rows in one go', () => {
    const rows = Array.from({ length: 50_000 }, (_, i) => {
      const at = new Date(Date.UTC(2026, 0, 1) + i * 300_000).toISOString()
      return { line: i + 1, cells: [at.slice(0, 19).replace('T', ' '), String(40 + (i % 7) / 10)] }
    })
    const log = readLog(rows, zone, now, none)!
    // The skipped hour of March has twelve rows; none of October's is twice.
    expect(log.rows).toHaveLength(50_000 - 12)
  }, 60_000)
})

it.each([
  ['2026-03-02T08:00:00Z', Date.UTC(2026, 2, 2, 8)],
  ['2026-03-02 08:00:30+02:00', Date.UTC(2026, 2, 2, 6, 0, 30)],
])('an instant with its offset is taken as such: %s', (text, at) => {
  expect(readTime(text, null)).toEqual({ kind: 'instant', at })
})

it('reads a clock of twelve hours', () => {
  const noon = readTime('3/14/2026 12:05 PM', null)
  const night = readTime('3/14/2026 12:05 AM', null)
  expect(noon).toMatchObject({ wall: { hour: 12 } })
  expect(night).toMatchObject({ wall: { hour: 0, day: 14, month: 3 } })
})

it('a clock in Kathmandu is 5 h 45 min ahead', () => {
  const wall = { year: 2026, month: 1, day: 1, hour: 5, minute: 45, second: 0 }
  expect(instantsOf(wall, 'Asia/Kathmandu', new Offsets())).toEqual([Date.UTC(2026, 0, 1)])
})
