import { sheetFaults, type GridFault, type LabelGrid } from './grid'

/** A jar's code of five characters at the highest correction is a symbol of version 1: 21 modules [std: ISO/IEC 18004]. */
const symbolModules = 21
/** White around it, on every side [std: ISO/IEC 18004]. */
export const quietModules = 4
const squareModules = symbolModules + 2 * quietModules
/**
 * Five dots of a printer with 300 dpi; its maker advises at least four [DENSO WAVE, qrcode.com, "Point for setting the
 * module size"]. A camera at arm's length reads it too (common practice, no source).
 */
export const smallestModuleMm = 0.42
/** Larger than this it reads no better, and the words want the room. */
const largestSquareMm = 32
/** Sheets shift in the printer: nothing stands nearer to a label's edge (common practice, no source). */
const edgeMm = 1.5
/** Six points, the smallest type that is read at arm's length (common practice, no source). */
const smallestTypeMm = 2.1
/** "−10·J4PC7" */
const longestCode = 9
/** Atkinson Hyperlegible Mono: the advance of every character, in parts of the type's size. */
const monoAdvance = 0.632

export type LabelLayout = {
  /** The square with its quiet zone. */
  square: { xMm: number; yMm: number; sideMm: number }
  moduleMm: number
  text: { xMm: number; yMm: number; widthMm: number; heightMm: number }
  codeMm: number
  lineMm: number
  lines: number
}

/** How a label of this size is filled: the square beside the words, or above them on a tall one. Null where it is too small. */
export function labelLayout(grid: Pick<LabelGrid, 'widthMm' | 'heightMm'>): LabelLayout | null {
  const [width, height] = [grid.widthMm - 2 * edgeMm, grid.heightMm - 2 * edgeMm]
  const smallest = squareModules * smallestModuleMm
  const beside = Math.min(height, largestSquareMm, Math.max(smallest, width * 0.42))
  const above = Math.min(width, largestSquareMm, Math.max(smallest, height * 0.6))
  const options = [
    filled(
      { xMm: edgeMm, yMm: edgeMm + (height - beside) / 2, sideMm: beside },
      { xMm: edgeMm + beside + 0.5, yMm: edgeMm, widthMm: width - beside - 0.5, heightMm: height },
    ),
    filled(
      { xMm: edgeMm + (width - above) / 2, yMm: edgeMm, sideMm: above },
      { xMm: edgeMm, yMm: edgeMm + above, widthMm: width, heightMm: height - above },
    ),
  ].filter((one) => one !== null)
  return options.toSorted((a, b) => b.lines - a.lines || b.codeMm - a.codeMm)[0] ?? null
}

function filled(square: LabelLayout['square'], text: LabelLayout['text']): LabelLayout | null {
  const moduleMm = square.sideMm / squareModules
  const codeMm = Math.min(text.widthMm / (longestCode * monoAdvance), text.heightMm * 0.42, 7)
  if (moduleMm < smallestModuleMm - 1e-9 || codeMm < smallestTypeMm) return null
  const room = text.heightMm - codeMm * codeLead
  // Smaller type before fewer lines, down to six points.
  const lineMm = Math.min(3, codeMm * 0.8, Math.max(smallestTypeMm, room / (4 * lineLead)))
  return {
    square,
    moduleMm,
    text,
    codeMm,
    lineMm,
    lines: Math.max(0, Math.min(5, Math.floor(room / (lineMm * lineLead) + 1e-9))),
  }
}

export const codeLead = 1.15
export const lineLead = 1.28

/** Why labels cannot be printed on this grid: beside the sheet, or too small for a square that can be read. */
export function gridFaults(grid: LabelGrid): GridFault[] {
  const faults = sheetFaults(grid)
  if (faults.length > 0 || labelLayout(grid)) return faults
  const least = Math.ceil((squareModules * smallestModuleMm + 2 * edgeMm) * 10) / 10
  const isLow = Math.min(grid.widthMm, grid.heightMm) < least
  return [
    {
      path: grid.widthMm < grid.heightMm ? 'widthMm' : 'heightMm',
      sentence: isLow
        ? `A label of ${grid.widthMm} × ${grid.heightMm} mm is too small for a square that can be read. It needs ${least} mm each way, for squares of ${smallestModuleMm} mm.`
        : `A label of ${grid.widthMm} × ${grid.heightMm} mm has no room for the code beside the square. Make it wider or higher.`,
    },
  ]
}

/**
 * A line that keeps inside the label: its type is made smaller down to six points, and what is still too long ends in
 * an ellipsis. Widths are taken a little too wide.
 */
export function fitLine(text: string, widthMm: number, sizeMm: number): { text: string; sizeMm: number } {
  const natural = advanceOf(text)
  if (natural * sizeMm <= widthMm) return { text, sizeMm }
  const smaller = Math.max(Math.min(sizeMm, smallestTypeMm), widthMm / natural)
  const room = widthMm / smaller
  if (natural <= room + 1e-9) return { text, sizeMm: smaller }
  const letters = [...text]
  while (letters.length > 0 && advanceOf(`${letters.join('')}…`) > room) letters.pop()
  return { text: `${letters.join('').trimEnd()}…`, sizeMm: smaller }
}

/** Advances of Atkinson Hyperlegible Next, rounded up, in parts of the size; what it lacks counts as a full square. */
function advanceOf(text: string): number {
  return [...text].reduce((sum, letter) => sum + (widths.find(([set]) => set.test(letter))?.[1] ?? 1), 0)
}

const widths: [RegExp, number][] = [
  [/[',.:;`j|·’]/, 0.25],
  [/[!()il"\[\]frt{}ìíîï /-]/, 0.4],
  [/[*1?cksvxyzçýÿ27JLaehnouàáâãäåèéêëñòóôõöøùúûü–]/, 0.55],
  [/[+03456789<=>ABCEFKPRSTVXYZ^bdgpqß−$ÀÁÂÃÄÅÈÉÊË×÷]/, 0.65],
  [/[#DGHNUw&OQÑÒÓÔÕÖØÙÚÛÜ…]/, 0.75],
  [/[@MmW%æœ]/, 0.95],
]
