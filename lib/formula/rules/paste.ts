import { mostLines } from '../schema'
import { grouped, readDecimal } from '@/lib/number/rules'
import { readCells } from './pasted-cells'

export type PastedLine = {
  phase: string
  inciName: string
  function: string
  percent: string
  density: string
  price: string
  /** Null where the block does not say. */
  isInternal: boolean | null
}

export type Pasted =
  /** `leftOut`: rows with neither name nor share, such as headings, told to whoever pasted them. */
  | { kind: 'lines'; lines: PastedLine[]; leftOut: string[] }
  /** Numbers without names: they go into the cells from the one that has the focus, downwards. */
  | { kind: 'numbers'; rows: string[][] }
  | { kind: 'refused'; sentence: string }

type Field = Exclude<keyof PastedLine, 'isInternal'>

/** Words of a head row, in the order in which they are looked for. */
const heads: [Field | 'inside' | 'other', RegExp][] = [
  ['phase', /^phase$/i],
  ['inciName', /inci|ingredient|raw material|^name$|material/i],
  ['function', /function|role/i],
  ['density', /density|g\s*\/\s*m?l|g\s*\/\s*cm/i],
  ['price', /price|cost|per kg|\/\s*kg/i],
  ['percent', /%|percent|share|w\s*\/\s*w/i],
  ['inside', /inside|internal/i],
]

/** A block is not read further than this; what is longer is no formula. */
const mostSigns = 400_000

/**
 * Reads a block copied from a spreadsheet or a CSV file; null where the text is one cell, which the field
 * takes itself. With a head row its words name the columns. Without one they are told apart by what they
 * hold: a single letter is the phase, words are INCI name then function, numbers are % w/w, density, price
 * per kg in that order.
 */
export function readPasted(text: string): Pasted | null {
  const rowCount = text.split('\n').filter((row) => row.trim() !== '').length
  if (text.length > mostSigns || rowCount > 10 * mostLines) {
    return refused(
      `That is a block of ${grouped(rowCount, 0)} ${rowCount === 1 ? 'row' : 'rows'}, and a formula has at most ${mostLines} lines. Nothing was changed; paste the lines of one formula.`,
    )
  }
  const cells = readCells(text)
  if (cells.every((row) => row.length < 2) && cells.length < 2) return null
  const filled = cells.map((row) => row.filter((cell) => cell !== ''))
  if (filled.every((row) => row.length > 0 && row.every((cell) => isNumber(cell) || isRemainder(cell)))) {
    return { kind: 'numbers', rows: cells.map((row) => row.map(withoutPercent)) }
  }
  const columns = readHeads(cells[0] ?? [])
  const body = columns ? cells.slice(1) : cells
  const read = body.map((row) => (columns ? readByHeads(row, columns) : readByContent(row)))
  const lines = read.filter((line): line is PastedLine => line !== null)
  const leftOut = body.filter((_, index) => read[index] === null).map((row) => row.filter(Boolean).join(' '))
  if (lines.length === 0) {
    if (cells.length < 2) return null
    return refused(
      'Nothing in what you pasted reads as a line: each needs a name and its share in %, such as Glycerin and 5.0. Nothing was changed.',
    )
  }
  if (lines.length > mostLines) {
    return refused(
      `That are ${grouped(lines.length, 0)} lines, and a formula has at most ${mostLines}. Nothing was changed; paste fewer.`,
    )
  }
  return { kind: 'lines', lines, leftOut }
}

const refused = (sentence: string): Pasted => ({ kind: 'refused', sentence })
const withoutPercent = (cell: string) => cell.replace(/\s*%$/, '')
const isNumber = (cell: string) => readDecimal(withoutPercent(cell)) !== null
const isRemainder = (cell: string) => /^q\.?\s?s\.?(\s+(to|ad)\s+100\s*%?)?$/i.test(cell)
const isSum = (name: string) => /^(sub-?)?(total|sum)s?$/i.test(name)

function readHeads(row: string[]): (Field | 'inside' | 'other')[] | null {
  if (row.some(isNumber)) return null
  const found = row.map((cell) => heads.find(([, word]) => word.test(cell))?.[0] ?? 'other')
  return found.includes('inciName') && found.includes('percent') ? found : null
}

function emptyPasted(): PastedLine {
  return { phase: '', inciName: '', function: '', percent: '', density: '', price: '', isInternal: null }
}

function readByHeads(cells: string[], columns: (Field | 'inside' | 'other')[]): PastedLine | null {
  const line = emptyPasted()
  let isFilling = false
  for (const [index, cell] of cells.entries()) {
    const field = columns[index] ?? 'other'
    if (cell === '' || field === 'other') continue
    if (field === 'inside') line.isInternal = readInside(cell)
    else if (field === 'percent' && isRemainder(cell)) isFilling = true
    else if (field === 'phase') line.phase = phaseOf(cell)
    else if (field === 'inciName' || field === 'function') line[field] ||= cell
    else line[field] ||= withoutPercent(cell)
  }
  return whole(line, isFilling)
}

function readByContent(cells: string[]): PastedLine | null {
  const line = emptyPasted()
  for (const cell of cells) {
    const inside = readInside(cell)
    if (cell === '' || isRemainder(cell)) continue
    else if (isNumber(cell)) {
      const field = (['percent', 'density', 'price'] as const).find((name) => line[name] === '')
      if (field) line[field] = withoutPercent(cell)
    } else if (!line.phase && !line.inciName && /^(phase\s+)?[A-Za-z]\d?$/i.test(cell))
      line.phase = phaseOf(cell)
    else if (inside !== null && line.inciName) line.isInternal = inside
    else if (!line.inciName) line.inciName = cell
    else if (!line.function) line.function = cell
  }
  return whole(line, cells.some(isRemainder))
}

function whole(line: PastedLine, isFilling: boolean): PastedLine | null {
  if (line.inciName === '' || isSum(line.inciName)) return null
  return line.percent !== '' || isFilling ? line : null
}

function phaseOf(cell: string): string {
  return cell
    .replace(/^phase\s+/i, '')
    .replace(/[^A-Za-z0-9]/g, '')
    .toUpperCase()
    .slice(0, 20)
}

function readInside(cell: string): boolean | null {
  if (/^(internal|inside|in|yes|x)$/i.test(cell)) return true
  return /^(external|outside|out|no)$/i.test(cell) ? false : null
}
