import { bandBarReach, bandBarShapes } from './band-bar-shapes'
import type { BandBarInput } from './band-bar-shapes'
import { Figure } from './figure'

export function BandBar({ title, className, ...bar }: BandBarInput & { title?: string; className?: string }) {
  const reach = bandBarReach(bar.height)
  return (
    <Figure
      shapes={bandBarShapes(bar)}
      view={{ x: 0, y: -reach, width: bar.width, height: reach * 2 }}
      title={title}
      className={className}
    />
  )
}
