import Papa from 'papaparse'
import readWorkbook from 'read-excel-file/node'
import { describe, expect, it } from 'vitest'
import { cellOf, type Cell } from '@/lib/list/document/cell'
import { csvOf, wouldRun } from '@/lib/list/document/csv'
import { xlsxOf } from '@/lib/list/document/xlsx'
import type { Column } from '@/lib/list/schema'

// What is written is read back with readers that know nothing of the writer: papaparse and read-excel-file.

async function* of(rows: Cell[][]) {
  yield* rows
}

async function bytesOf(file: AsyncIterable<Uint8Array>): Promise<Buffer> {
  const parts: Uint8Array[] = []
  for await (const part of file) parts.push(part)
  return Buffer.concat(parts)
}

const csv = async (rows: Cell[][]) => (await bytesOf(csvOf(of(rows)))).toString()
const fields = async (rows: Cell[][]) =>
  Papa.parse<string[]>((await csv(rows)).slice(1).trimEnd(), { delimiter: ',' }).data
const sheet = async (rows: Cell[][]) => {
  const sheets = (await readWorkbook(
    await bytesOf(
      xlsxOf(
        of(rows),
        rows[0]!.map(() => 20),
      ),
    ),
  )) as unknown
  const [first] = sheets as { data: unknown[][] }[]
  return first!.data
}

// OWASP, "CSV Injection": a cell that begins with one of = + - @, tab or carriage return may be run as a formula.
const dangerous = ['=1+1', '+cmd', '-2+3', '@SUM(A1)', '\t=1', '\r=1', '=HYPERLINK("http://x","y")', '＝1+1']
const harmless = ['-3.2', '-3,2', '+5', '5,60', 'N86 = base', '45 °C, café', 'a "quoted" word', ' padded ']

describe('CSV', () => {
  it('A09: what would run is kept from it by an apostrophe', async () => {
    for (const text of dangerous) {
      expect([text, wouldRun(text)]).toEqual([text, true])
      expect((await fields([[text]]))[0]![0]).toBe(`'${text}`)
    }
  })

  it('A09: numbers stay numbers, texts of numbers too, and nothing else is touched', async () => {
    expect(await fields([[-3.2, 0, 1e-7]])).toEqual([['-3.2', '0', '1e-7']])
    for (const text of harmless) expect((await fields([[text, 'x']]))[0]).toEqual([text, 'x'])
  })

  it('begins with a byte order mark and keeps commas, quotes, line ends and what is empty', async () => {
    const rows = [
      ['head', 'more', 'last'],
      ['a,b', 'two\r\nlines', null],
      ['"', '', 'µ'],
    ]
    expect((await csv(rows)).charCodeAt(0)).toBe(0xfeff)
    expect(await fields(rows)).toEqual([
      ['head', 'more', 'last'],
      ['a,b', 'two\r\nlines', ''],
      ['"', '', 'µ'],
    ])
  })
})

describe('XLSX', () => {
  it('A09: numbers are numbers, texts are texts as they were, and none is a formula', async () => {
    const texts = [...dangerous.filter((text) => !/^[\t\r]/.test(text)), 'a < b & "c"', 'é °C 😀']
    const read = await sheet([['head', 'value'], ...texts.map((text, i) => [text, -3.2 - i])])
    expect(read.slice(1)).toEqual(texts.map((text, i) => [text, -3.2 - i]))
    const whole = (await bytesOf(xlsxOf(of([['=1+1']]), [10]))).toString('latin1')
    expect(whole.startsWith('PK')).toBe(true)
  })

  it('days and instants are dates, instants in the lab’s own zone over its clock change', async () => {
    const at = (kind: 'day' | 'instant', value: string) => {
      const column: Column<string> = { key: 'x', title: 'x', kind, value: (line) => line }
      return cellOf(column, value, 'Europe/Berlin')
    }
    const [winter, summer] = [
      at('instant', '2026-03-29T00:30:00.000Z'),
      at('instant', '2026-03-29T01:30:00.000Z'),
    ]
    // Germany's clocks went from 02:00 to 03:00 on that day (EU directive 2000/84/EC).
    expect(await fields([[winter, summer, at('day', '2026-03-29')]])).toEqual([
      ['2026-03-29 01:30:00', '2026-03-29 03:30:00', '2026-03-29'],
    ])
    const read = await sheet([
      ['a', 'b', 'c'],
      [winter, summer, at('day', '2026-03-29')],
    ])
    expect(read[1]!.map((cell) => (cell as Date).toISOString())).toEqual([
      '2026-03-29T01:30:00.000Z',
      '2026-03-29T03:30:00.000Z',
      '2026-03-29T00:00:00.000Z',
    ])
  })

  it('carries one day in every file, so that the same rows make the same bytes whenever they are written', async () => {
    const bytes = await bytesOf(xlsxOf(of([['a']]), [10]))
    // APPNOTE 4.4.6 [memory]: time and date of a local header at 10 and 12; 1 January 1980 is month 1 and day 1.
    expect([bytes.readUInt16LE(10), bytes.readUInt16LE(12)]).toEqual([0, (1 << 5) | 1])
  })

  it('holds more rows than one block, and more columns than the alphabet', async () => {
    const wide = Array.from({ length: 30 }, (_, i) => `column ${i}`)
    const rows = Array.from({ length: 3000 }, (_, i) => wide.map((_, at) => i * 100 + at))
    const read = await sheet([wide, ...rows])
    expect(read[0]).toEqual(wide)
    expect(read.length).toBe(3001)
    expect(read[3000]![29]).toBe(2999 * 100 + 29)
  }, 30_000)
})
