/** A row's stretch of the front: where it stands, and whether it has happened. Null: no front there. */
export type FrontRow = { top: number; bottom: number; x: number | null; isForecast: boolean }

export type Segment = { x1: number; y1: number; x2: number; y2: number }

export type Front = {
  wash: { x: number; y: number; w: number; h: number }[]
  solid: Segment[]
  dashed: Segment[]
}

/**
 * The stepped line between what still holds and what has left its band, warmest row first. A vertical
 * is solid where a row has left its band and dashed where it is forecast to; a step between two rows is
 * solid up to today and dashed after. The first row's top is open: it ends under the ruler.
 */
export function frontGeometry(rows: FrontRow[], todayX: number, right: number): Front {
  const front: Front = { wash: [], solid: [], dashed: [] }
  const level = (y: number, from: number, to: number) => {
    const [x1, x2] = [Math.min(from, to), Math.max(from, to)]
    if (x1 === x2) return
    if (x1 < todayX) front.solid.push({ x1, y1: y, x2: Math.min(x2, todayX), y2: y })
    if (x2 > todayX) front.dashed.push({ x1: Math.max(x1, todayX), y1: y, x2, y2: y })
  }
  rows.forEach(({ top, bottom, x, isForecast }, index) => {
    const above = rows[index - 1]
    if (x !== null) {
      front.wash.push({ x, y: top, w: right - x, h: bottom - top })
      const upright = { x1: x, y1: top, x2: x, y2: bottom }
      if (isForecast) front.dashed.push(upright)
      else front.solid.push(upright)
    }
    if (above && (above.x !== null || x !== null)) level(top, above.x ?? right, x ?? right)
    if (index === rows.length - 1 && x !== null) level(bottom, x, right)
  })
  return front
}
