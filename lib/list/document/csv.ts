import type { Cell } from './cell'

/**
 * RFC 4180: commas, CRLF, quotes doubled. It begins with a byte order mark, without which Excel reads °C and é as
 * Windows-1252. A text that a spreadsheet would run is kept from running by an apostrophe before it; numbers are not texts.
 */
export async function* csvOf(rows: AsyncIterable<Cell[]>): AsyncGenerator<Uint8Array> {
  const encoder = new TextEncoder()
  yield encoder.encode('\uFEFF')
  for await (const row of rows) yield encoder.encode(`${row.map(field).join(',')}\r\n`)
}

function field(cell: Cell): string {
  if (cell === null) return ''
  if (typeof cell === 'number') return String(cell)
  const text = typeof cell === 'string' ? harmless(cell) : cell.text
  return /[",\t\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

/** What begins as a formula does. A text that is a plain number, such as a reading typed as -3,2, computes nothing. */
export function wouldRun(text: string): boolean {
  return /^[=+\-@\t\r\n＝＋－＠]/.test(text) && !isPlainNumber(text)
}

function isPlainNumber(text: string): boolean {
  return /^[+-]?\d+([.,]\d+)?$/.test(text)
}

function harmless(text: string): string {
  return wouldRun(text) ? `'${text}` : text
}
