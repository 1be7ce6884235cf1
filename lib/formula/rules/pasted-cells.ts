/** The cells of a pasted block, row by row: quoted cells are kept whole, with the line breaks inside them as spaces. */
export function readCells(text: string): string[][] {
  const divider = dividerOf(text)
  const rows: string[][] = []
  let row: string[] = []
  let cell = ''
  let isQuoted = false
  const endCell = () => {
    row.push(cell.replace(/\s+/g, ' ').trim())
    cell = ''
  }
  const endRow = () => {
    endCell()
    if (row.some((one) => one !== '')) rows.push(divider === ',' ? joined(row) : row)
    row = []
  }
  for (let index = 0; index < text.length; index++) {
    const sign = text[index]!
    if (isQuoted && sign === '"' && text[index + 1] === '"') {
      cell += '"'
      index++
    } else if (sign === '"' && (isQuoted || cell.trim() === '')) isQuoted = !isQuoted
    else if (sign === divider && !isQuoted) endCell()
    else if ((sign === '\n' || sign === '\r') && !isQuoted) endRow()
    else cell += sign
  }
  endRow()
  return rows
}

/** Tabs before semicolons before commas: a comma may be part of a number or a name. */
function dividerOf(text: string): string {
  if (text.includes('\t')) return '\t'
  // A column of numbers with decimal commas has no divider at all.
  if (/^\s*(?:\d+,\d+\s*%?\s*)+$/.test(text.replace(/[^\S\r\n]/g, ''))) return '\t'
  return text.includes(';') ? ';' : ','
}

/** "1,2-Hexanediol" is one name although the comma divides. */
function joined(cells: string[]): string[] {
  return cells.reduce<string[]>((all, next) => {
    const last = all.at(-1)
    if (last !== undefined && /^\d$/.test(last) && /^\d-[A-Za-z]/.test(next))
      all[all.length - 1] = `${last},${next}`
    else all.push(next)
    return all
  }, [])
}
