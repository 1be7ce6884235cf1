import { PdfFigure } from '../marks/pdf-drawn'
import { carryHeight, carryShapes } from './carry-shapes'
import type { CarryInput } from './carry-data'

/** The same drawing in a @react-pdf document, `width` points wide. */
export function PdfCarry({
  input,
  width,
  fontFamily,
}: {
  input: CarryInput
  width: number
  fontFamily?: string
}) {
  const drawn = 972
  return (
    <PdfFigure
      shapes={carryShapes(input, drawn)}
      view={{ x: 0, y: 0, width: drawn, height: carryHeight(input) }}
      scale={width / drawn}
      fontFamily={fontFamily}
    />
  )
}
