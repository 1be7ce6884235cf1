import { readDecimal } from './numbers'

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

/**
 * Reads a block copied from a spreadsheet, or null where the text is no block. Columns are told apart by
 * what they hold: a single letter is the phase, words are INCI name then function, numbers are
 * % w/w, density, price per kg in that order. Rows without a number (headings) are left out.
 */
export function readPastedLines(text: string): PastedLine[] | null {
  const rows = text.split(/\r?\n/).filter((row) => row.trim() !== '')
  const divider = rows.some((row) => row.includes('\t'))
    ? '\t'
    : rows.some((row) => row.includes(';'))
      ? ';'
      : ','
  const cells = rows.map((row) => splitRow(row, divider))
  if (cells.every((row) => row.length < 2)) return null
  const lines = cells.map(readRow).filter((line): line is PastedLine => line !== null)
  return lines.length ? lines : null
}

function readRow(cells: string[]): PastedLine | null {
  const line: PastedLine = {
    phase: '',
    inciName: '',
    function: '',
    percent: '',
    density: '',
    price: '',
    isInternal: null,
  }
  for (const cell of cells) {
    const number = cell.replace(/\s*%$/, '')
    if (cell === '') continue
    else if (readDecimal(number) !== null) {
      if (!line.percent) line.percent = number
      else if (!line.density) line.density = number
      else if (!line.price) line.price = number
    } else if (/^q\.?\s?s\.?( to 100)?$/i.test(cell)) continue
    else if (!line.phase && !line.inciName && /^[A-Za-z]\d?$/.test(cell)) line.phase = cell.toUpperCase()
    else if (/^(internal|inside|yes)$/i.test(cell)) line.isInternal = true
    else if (/^(external|outside|no)$/i.test(cell)) line.isInternal = false
    else if (!line.inciName) line.inciName = cell
    else if (!line.function) line.function = cell
  }
  return line.inciName && (line.percent || cells.some((cell) => /^q\.?\s?s/i.test(cell))) ? line : null
}

/** Quoted cells are kept whole, and "1,2-Hexanediol" is one name although the comma divides. */
function splitRow(row: string, divider: string): string[] {
  const cells: string[] = []
  let cell = ''
  let isQuoted = false
  for (const sign of row) {
    if (sign === '"') isQuoted = !isQuoted
    else if (sign === divider && !isQuoted) {
      cells.push(cell.trim())
      cell = ''
    } else cell += sign
  }
  cells.push(cell.trim())
  if (divider !== ',') return cells
  return cells.reduce<string[]>((joined, next) => {
    const last = joined.at(-1)
    if (last !== undefined && /^\d$/.test(last) && /^\d-[A-Za-z]/.test(next))
      joined[joined.length - 1] = `${last},${next}`
    else joined.push(next)
    return joined
  }, [])
}
