import type { Shape } from './shape'

/** Digits of a SHA-256 in hexadecimal. */
const TEETH = 64

/**
 * A hash as a comb of 64 heights, one a hexadecimal digit from 1/16 of the height (0) to all of it (f),
 * on a line at y = height. Two hashes can so be compared by eye, on screen and on paper.
 */
export function hashCombShapes(
  sha256: string,
  { width, height }: { width: number; height: number },
): Shape[] {
  if (!/^[0-9a-f]{64}$/i.test(sha256))
    throw new RangeError('A hash comb needs a SHA-256 of 64 hexadecimal digits.')
  const pitch = width / TEETH
  const teeth = [...sha256].map((digit, index): Shape => {
    const tooth = ((Number.parseInt(digit, 16) + 1) / 16) * height
    return { kind: 'rect', x: index * pitch, y: height - tooth, w: pitch * 0.66, h: tooth, fill: 'ink' }
  })
  const line: Shape = {
    kind: 'line',
    x1: 0,
    x2: (TEETH - 1) * pitch + pitch * 0.66,
    y1: height + 1,
    y2: height + 1,
    stroke: 'ink',
    width: 1,
  }
  return [...teeth, line]
}
