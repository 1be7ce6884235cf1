import { labelPlace, type LabelGrid } from '@/lib/label/rules/grid'
import { codeLead, fitLine, labelLayout, lineLead, quietModules } from '@/lib/label/rules/layout'
import type { Shape, Step } from '../marks/shape'

/** Side length in modules, and the dark ones as runs: from where, and how many. */
export type Qr = { size: number; runs: [x: number, y: number, length: number][] }
/** `code` is what stands for the eye, station first; `jarCode` is what the square holds. */
export type Label = { id: string; jarCode: string; code: string; lines: string[]; qr: Qr }

/** Points of the PDF in a millimetre. */
export const pointsPerMm = 72 / 25.4

/** One label of a sheet in points from the sheet's upper left corner: screen, printer and PDF draw the same shapes. */
export function labelShapes(
  grid: LabelGrid,
  index: number,
  label: Label,
): { square: Shape[]; words: Shape[] } {
  const at = labelPlace(grid, index)
  const layout = labelLayout(grid)
  if (!layout) return { square: [], words: [] }
  const x = (mm: number) => (at.xMm + mm) * pointsPerMm
  const y = (mm: number) => (at.yMm + mm) * pointsPerMm
  const { square, text, codeMm, lineMm } = layout
  const lines = label.lines.slice(0, layout.lines)
  const high = codeMm * codeLead + lines.length * lineMm * lineLead
  const begin = text.yMm + Math.max(0, (text.heightMm - high) / 2)
  const words = (textMm: number, sizeMm: number, content: string, isCode: boolean): Shape => ({
    kind: 'text',
    x: x(text.xMm),
    y: y(textMm),
    text: content,
    size: sizeMm * pointsPerMm,
    weight: isCode ? 700 : 400,
    anchor: 'start',
    fill: 'ink',
    mono: isCode,
  })
  return {
    square: [
      { kind: 'path', steps: modules(label.qr, x(square.xMm), y(square.yMm), square.sideMm), fill: 'ink' },
    ],
    words: [
      words(begin + codeMm * 0.85, codeMm, label.code, true),
      ...lines.map((line, row) => {
        const fitted = fitLine(line, text.widthMm, lineMm)
        const at = begin + codeMm * codeLead + (row + 0.85) * lineMm * lineLead
        return words(at, fitted.sizeMm, fitted.text, false)
      }),
    ],
  }
}

/** The dark modules as one path inside their quiet zone. */
function modules({ size, runs }: Qr, left: number, top: number, sideMm: number): Step[] {
  const dark = (sideMm * pointsPerMm) / (size + 2 * quietModules)
  return runs.flatMap(([column, row, length]): Step[] => {
    const [x, y] = [left + (column + quietModules) * dark, top + (row + quietModules) * dark]
    return [
      ['M', x, y],
      ['L', x + length * dark, y],
      ['L', x + length * dark, y + dark],
      ['L', x, y + dark],
      ['Z'],
    ]
  })
}
