/** A sheet of labels as its maker gives it: how many stand beside and below each other, and where, in millimetres. */
export type LabelGrid = {
  paper: 'A4' | 'Letter'
  columns: number
  rows: number
  widthMm: number
  heightMm: number
  /** From the sheet's left and upper edge to the first label. */
  leftMm: number
  topMm: number
  gapXMm: number
  gapYMm: number
}

/** [std: ISO 216 for A4; ANSI/ASME Y14.1, size A, for US Letter] */
export const papers = {
  A4: { name: 'A4', widthMm: 210, heightMm: 297 },
  Letter: { name: 'US Letter', widthMm: 215.9, heightMm: 279.4 },
} as const

export type GridFault = { path: keyof LabelGrid; sentence: string }

/** Sizes in which label sheets are commonly cut (common practice, no source). */
export const genericGrids: { key: string; grid: LabelGrid }[] = [
  grid('a4-3x7', 'A4', [3, 7], [63.5, 38.1], [7.25, 15.15], [2.5, 0]),
  grid('a4-2x7', 'A4', [2, 7], [99.1, 38.1], [4.65, 15.15], [2.5, 0]),
  grid('a4-3x8', 'A4', [3, 8], [70, 36], [0, 4.5], [0, 0]),
  grid('a4-4x10', 'A4', [4, 10], [48.5, 25.4], [8, 21.5], [0, 0]),
  grid('a4-5x13', 'A4', [5, 13], [38.1, 21.2], [4.75, 10.7], [2.5, 0]),
  grid('letter-3x10', 'Letter', [3, 10], [66.7, 25.4], [4.7, 12.7], [3.2, 0]),
  grid('letter-2x7', 'Letter', [2, 7], [101.6, 33.9], [3.95, 21.05], [4.8, 0]),
  grid('letter-2x10', 'Letter', [2, 10], [101.6, 25.4], [3.95, 12.7], [4.8, 0]),
]

function grid(
  key: string,
  paper: LabelGrid['paper'],
  [columns, rows]: [number, number],
  [widthMm, heightMm]: [number, number],
  [leftMm, topMm]: [number, number],
  [gapXMm, gapYMm]: [number, number],
) {
  return { key, grid: { paper, columns, rows, widthMm, heightMm, leftMm, topMm, gapXMm, gapYMm } }
}

/** "A4, 3 by 7, labels of 63.5 × 38.1 mm" */
export function gridName({ paper, columns, rows, widthMm, heightMm }: LabelGrid): string {
  return `${papers[paper].name}, ${columns} by ${rows}, labels of ${widthMm} × ${heightMm} mm`
}

export function labelsPerSheet({ columns, rows }: LabelGrid): number {
  return columns * rows
}

/** Where the label of this index lies on its sheet, counted along the rows from the upper left. */
export function labelPlace(grid: LabelGrid, index: number): { xMm: number; yMm: number } {
  const [column, row] = [index % grid.columns, Math.floor(index / grid.columns)]
  return {
    xMm: grid.leftMm + column * (grid.widthMm + grid.gapXMm),
    yMm: grid.topMm + row * (grid.heightMm + grid.gapYMm),
  }
}

/** A hundredth of a millimetre is the rounding of what was typed, not a label beside the sheet. */
const roundingMm = 0.01

/** What of a grid does not fit its sheet. */
export function sheetFaults(grid: LabelGrid): GridFault[] {
  const paper = papers[grid.paper]
  const reachX = grid.leftMm + grid.columns * grid.widthMm + (grid.columns - 1) * grid.gapXMm
  const reachY = grid.topMm + grid.rows * grid.heightMm + (grid.rows - 1) * grid.gapYMm
  const mm = (value: number) => `${Math.round(value * 100) / 100} mm`
  const faults: GridFault[] = []
  if (reachX > paper.widthMm + roundingMm) {
    faults.push({
      path: 'widthMm',
      sentence: `The columns reach ${mm(reachX)}, and ${paper.name} is ${mm(paper.widthMm)} wide. Make labels, gaps or the margin smaller.`,
    })
  }
  if (reachY > paper.heightMm + roundingMm) {
    faults.push({
      path: 'heightMm',
      sentence: `The rows reach ${mm(reachY)}, and ${paper.name} is ${mm(paper.heightMm)} high. Make labels, gaps or the margin smaller.`,
    })
  }
  return faults
}
