import { Figure } from './figure'
import { jarShapes } from './jar-shapes'
import type { JarInput } from './jar-shapes'

/** A jar that stands on the lower edge of its own box; see jar-shapes for what each property draws. */
export function JarGlyph({ title, className, ...jar }: JarInput & { title?: string; className?: string }) {
  const width = jar.posture === 'lying' ? jar.height : jar.height * 0.64
  return (
    <Figure
      shapes={jarShapes(jar)}
      view={{ x: -width / 2, y: -jar.height, width, height: jar.height }}
      title={title}
      className={className}
    />
  )
}
