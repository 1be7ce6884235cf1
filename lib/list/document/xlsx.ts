import type { Cell } from './cell'
import { wouldRun } from './csv'
import { zipOf } from './zip'

/**
 * A workbook of one sheet (ECMA-376), written row by row so that a hundred thousand take no more memory than one.
 * Numbers are numbers, days and instants are dates shown as ISO. A text is a text and cannot run; one that begins like
 * a formula is marked as quoted too, so that it stays a text when somebody edits it.
 */
export function xlsxOf(rows: AsyncIterable<Cell[]>, widths: readonly number[]): AsyncGenerator<Uint8Array> {
  return zipOf(files(rows, widths))
}

async function* files(rows: AsyncIterable<Cell[]>, widths: readonly number[]) {
  for (const [name, text] of Object.entries(frame)) yield { name, parts: only(text) }
  yield { name: 'xl/worksheets/sheet1.xml', parts: sheet(rows, widths) }
}

async function* only(text: string) {
  yield text
}

const styles = { plain: 0, day: 1, instant: 2, quoted: 3, head: 4 }

async function* sheet(rows: AsyncIterable<Cell[]>, widths: readonly number[]) {
  const columns = widths.map(
    (width, at) => `<col min="${at + 1}" max="${at + 1}" width="${width}" customWidth="1"/>`,
  )
  yield `${xml}<worksheet xmlns="${main}"><sheetViews><sheetView workbookViewId="0">`
  yield '<pane ySplit="1" topLeftCell="A2" activePane="bottomLeft" state="frozen"/></sheetView></sheetViews>'
  yield `<cols>${columns.join('')}</cols><sheetData>`
  let number = 0
  for await (const row of rows) {
    number += 1
    const cells = row.map((cell, at) => cellXml(cell, `${letters(at)}${number}`, number === 1))
    yield `<row r="${number}">${cells.join('')}</row>`
  }
  yield '</sheetData></worksheet>'
}

function cellXml(cell: Cell, place: string, isHead: boolean): string {
  if (cell === null) return ''
  if (typeof cell === 'number') return `<c r="${place}"><v>${cell}</v></c>`
  if (typeof cell !== 'string')
    return `<c r="${place}" s="${cell.hasTime ? styles.instant : styles.day}"><v>${cell.serial}</v></c>`
  const style = isHead ? styles.head : wouldRun(cell) ? styles.quoted : styles.plain
  return `<c r="${place}" s="${style}" t="inlineStr"><is><t xml:space="preserve">${escaped(cell)}</t></is></c>`
}

/** XML 1.0 has no place for other control characters, and a cell none for more than 32,767 signs. */
function escaped(text: string): string {
  return text
    .slice(0, 32_767)
    .replace(/[^\t\n\r\u0020-\uD7FF\uE000-\uFFFD\u{10000}-\u{10FFFF}]/gu, '')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('\r', '&#13;')
}

/** A, B, … Z, AA: the columns as a spreadsheet counts them. */
function letters(at: number): string {
  return at < 26 ? String.fromCharCode(65 + at) : letters(Math.floor(at / 26) - 1) + letters(at % 26)
}

const xml = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n'
const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main'
const relations = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships'
const packages = 'http://schemas.openxmlformats.org/package/2006'
const office = 'application/vnd.openxmlformats-officedocument.spreadsheetml'

const frame = {
  '[Content_Types].xml': `${xml}<Types xmlns="${packages}/content-types">
<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>
<Default Extension="xml" ContentType="application/xml"/>
<Override PartName="/xl/workbook.xml" ContentType="${office}.sheet.main+xml"/>
<Override PartName="/xl/styles.xml" ContentType="${office}.styles+xml"/>
<Override PartName="/xl/worksheets/sheet1.xml" ContentType="${office}.worksheet+xml"/></Types>`,
  '_rels/.rels': `${xml}<Relationships xmlns="${packages}/relationships">
<Relationship Id="rId1" Type="${relations}/officeDocument" Target="xl/workbook.xml"/></Relationships>`,
  'xl/workbook.xml': `${xml}<workbook xmlns="${main}" xmlns:r="${relations}">
<sheets><sheet name="List" sheetId="1" r:id="rId1"/></sheets></workbook>`,
  'xl/_rels/workbook.xml.rels': `${xml}<Relationships xmlns="${packages}/relationships">
<Relationship Id="rId1" Type="${relations}/worksheet" Target="worksheets/sheet1.xml"/>
<Relationship Id="rId2" Type="${relations}/styles" Target="styles.xml"/></Relationships>`,
  'xl/styles.xml': `${xml}<styleSheet xmlns="${main}">
<numFmts count="2"><numFmt numFmtId="164" formatCode="yyyy\\-mm\\-dd"/><numFmt numFmtId="165" formatCode="yyyy\\-mm\\-dd\\ hh:mm:ss"/></numFmts>
<fonts count="2"><font><sz val="11"/><name val="Calibri"/></font><font><b/><sz val="11"/><name val="Calibri"/></font></fonts>
<fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills>
<borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders>
<cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs>
<cellXfs count="5"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/>
<xf numFmtId="164" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/>
<xf numFmtId="165" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/>
<xf numFmtId="49" fontId="0" fillId="0" borderId="0" xfId="0" quotePrefix="1" applyNumberFormat="1"/>
<xf numFmtId="0" fontId="1" fillId="0" borderId="0" xfId="0" applyFont="1"/></cellXfs></styleSheet>`,
}
