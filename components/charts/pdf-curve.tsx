import { PdfFigure } from '../marks/pdf-drawn'
import type { CurveInput } from './curve-data'
import { curveShapes } from './curve-shapes'

/** A plot of the same arrays in a @react-pdf document, `width` by `height` points. */
export function PdfCurve({
  input,
  endWeeks,
  ticks,
  markAt,
  width,
  height,
  fontFamily,
}: {
  input: CurveInput
  endWeeks: number
  /** Numbers under the plot: a place on the time axis and what is written there. */
  ticks: { weeks: number; text: string }[]
  /** A time that is pointed out with a line through the plot: the proposed months. */
  markAt?: number | null
  width: number
  height: number
  fontFamily?: string
}) {
  return (
    <PdfFigure
      shapes={curveShapes(input, { endWeeks, ticks, markAt: markAt ?? null, width, height })}
      view={{ x: 0, y: 0, width, height }}
      fontFamily={fontFamily}
    />
  )
}
