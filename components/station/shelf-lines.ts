import { jarShapes } from '@/components/marks/jar-shapes'
import { moveShapes } from '@/components/marks/place'
import type { Role, Shape } from '@/components/marks/shape'
import type { StandingJar } from '@/lib/station/queries/places'

export const jarHeight = 30
export const lineHeight = 46
/** Width of the words in front of a line. */
export const nameWidth = 64
const least = 24
const most = 34

/** One line of the drawing: a whole shelf, or as many of its places as the width takes. */
export type ShelfLine = { shelf: number; from: number; to: number; pitch: number }

/** Shelves from the top. A shelf that is too wide goes on in lines of equal length. */
export function shelfLines(
  { shelves, placesPerShelf }: { shelves: number; placesPerShelf: number },
  width: number,
): ShelfLine[] {
  const fitting = Math.max(1, Math.floor((width - nameWidth) / least))
  const lines = Math.ceil(placesPerShelf / fitting)
  const each = Math.ceil(placesPerShelf / lines)
  const pitch = Math.max(least, Math.min(most, (width - nameWidth) / each))
  return Array.from({ length: shelves }, (_, shelf) =>
    Array.from({ length: lines }, (_, line) => ({
      shelf: shelf + 1,
      from: line * each + 1,
      to: Math.min(placesPerShelf, (line + 1) * each),
      pitch,
    })),
  ).flat()
}

export type Shown = 'plain' | 'quiet' | 'taken'

/** The jars and empty places of one line, standing on y = 0 from x = 0. */
export function lineShapes(
  line: ShelfLine,
  jars: readonly StandingJar[],
  shown: (jar: StandingJar) => Shown,
): Shape[] {
  return Array.from({ length: line.to - line.from + 1 }, (_, index) => {
    const jar = jars.find((one) => one.shelf === line.shelf && one.place === line.from + index)
    const x = (index + 0.5) * line.pitch
    if (!jar) return moveShapes(jarShapes({ height: jarHeight * 0.8, state: 'planned' }), x, 0)
    const drawn = jarShapes({
      height: jarHeight,
      // A measuring jar stands closed until it is pulled.
      kind: jar.kind === 'watch' ? 'watch' : 'spare',
      state: jar.state === 'resting' ? 'resting' : 'drawn',
    })
    const how = shown(jar)
    if (how === 'quiet') return moveShapes(quieted(drawn), x, 0)
    return moveShapes(drawn, x, how === 'taken' ? -9 : 0)
  }).flat()
}

function quieted(shapes: Shape[]): Shape[] {
  const soft = (role: Role | undefined) => (role === 'ink' ? 'rule' : role)
  return shapes.map((shape) => {
    const stroke = 'stroke' in shape ? { stroke: soft(shape.stroke) } : {}
    const fill = 'fill' in shape ? { fill: soft(shape.fill) } : {}
    return { ...shape, ...stroke, ...fill } as Shape
  })
}
