import { Figure } from './figure'
import { standingShapes } from './standing-shapes'
import type { Standing } from './standing-shapes'

export function StandingMark({
  standing,
  size = 20,
  shelf = false,
  title,
  className,
}: {
  standing: Standing
  size?: 16 | 20 | 26 | 34
  shelf?: boolean
  title?: string
  className?: string
}) {
  const width = shelf ? size * 1.44 : size
  return (
    <Figure
      shapes={standingShapes({ standing, size, shelf })}
      view={{ x: -width / 2, y: -size, width, height: size + (shelf ? 2 : 0) }}
      title={title}
      className={className}
    />
  )
}
