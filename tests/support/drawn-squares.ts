/** A filled path that consists of runs of modules, where it lies on the page, in points from the upper left. */
export type DrawnSquare = { left: number; top: number; module: number; dark: boolean[][] }

/** The QR symbols of a page's content stream: every filled path that has the size of one. */
export function drawnSquares(content: string): DrawnSquare[] {
  return content.split(/\bf\b/).flatMap((drawn) => {
    // What stands before the colour is the page's own clip.
    const block = drawn.split(/\bscn\b/).at(-1)!
    const points = [...block.matchAll(/(-?[\d.]+) (-?[\d.]+) [ml]\b/g)].map(
      ([, x, y]) => [Number(x), Number(y)] as const,
    )
    if (points.length < 100) return []
    const rects = Array.from({ length: Math.floor(points.length / 4) }, (_, at) => {
      const own = points.slice(at * 4, at * 4 + 4)
      const [xs, ys] = [own.map(([x]) => x), own.map(([, y]) => y)]
      return {
        x: Math.min(...xs),
        y: Math.min(...ys),
        w: Math.max(...xs) - Math.min(...xs),
        h: Math.max(...ys) - Math.min(...ys),
      }
    })
    const left = Math.min(...rects.map((one) => one.x))
    const top = Math.min(...rects.map((one) => one.y))
    const right = Math.max(...rects.map((one) => one.x + one.w))
    const side = (right - left) / 21
    const dark = Array.from({ length: 21 }, () => Array.from({ length: 21 }, () => false))
    for (const { x, y, w } of rects) {
      const [column, row] = [Math.round((x - left) / side), Math.round((y - top) / side)]
      for (let run = 0; run < Math.round(w / side); run++) dark[row]![column + run] = true
    }
    return [{ left, top, module: side, dark }]
  })
}
