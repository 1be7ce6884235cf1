import type { PhotoLines } from '@/lib/science/photo-lines'

export type Line = keyof PhotoLines

/** From the top of a jar down. */
export const lineOrder: readonly Line[] = ['fillTop', 'topEdge', 'bottomEdge', 'base']

export const lineNames: Record<Line, string> = {
  fillTop: 'Fill top',
  topEdge: 'Oil ends',
  bottomEdge: 'Water begins',
  base: 'Base',
}

/** Where they lie before anybody has proposed or moved them: a jar that fills the frame, without layers. */
export function firstLines(height: number): PhotoLines {
  const [fillTop, base] = [Math.round(height * 0.3), Math.round(height * 0.85)]
  return { fillTop, topEdge: fillTop, bottomEdge: base, base }
}

/**
 * One line moved to a row, no further than its neighbours allow. Where a layer is none, its inner line goes along with
 * the outer one.
 */
export function moved(lines: PhotoLines, line: Line, row: number, height: number): PhotoLines {
  const { fillTop, topEdge, bottomEdge, base } = lines
  const between = (low: number, high: number) => Math.round(Math.max(low, Math.min(high, row)) * 10) / 10
  switch (line) {
    case 'fillTop': {
      const isWithout = topEdge === fillTop
      const at = between(0, (isWithout ? bottomEdge : topEdge) - 1)
      return { ...lines, fillTop: at, topEdge: isWithout ? at : topEdge }
    }
    case 'topEdge':
      return { ...lines, topEdge: between(fillTop, bottomEdge) }
    case 'bottomEdge':
      return { ...lines, bottomEdge: between(topEdge, base) }
    case 'base': {
      const isWithout = bottomEdge === base
      const at = between((isWithout ? topEdge : bottomEdge) + 1, height)
      return { ...lines, base: at, bottomEdge: isWithout ? at : bottomEdge }
    }
  }
}

/** The line under a finger: the nearest, and of two in one row the one that can go the way the finger lies. */
export function nearestLine(lines: PhotoLines, row: number): Line {
  const distance = (line: Line) => Math.abs(lines[line] - row)
  const nearest = lineOrder.toSorted((a, b) => distance(a) - distance(b))[0]!
  if (nearest === 'fillTop' && lines.topEdge === lines.fillTop && row > lines.fillTop) return 'topEdge'
  if (nearest === 'bottomEdge' && lines.bottomEdge === lines.base && row > lines.base) return 'base'
  return nearest
}
