import { Figure } from './figure'
import { flagShapes, flagWidth } from './flag-shapes'

export function FlagMark({
  number,
  solid,
  title,
  className,
}: {
  number?: number | string
  /** Solid where something is out, hollow for the rest. */
  solid: boolean
  title?: string
  className?: string
}) {
  return (
    <Figure
      shapes={flagShapes({ number, solid, pole: number === undefined ? 27 : 0 })}
      view={{ x: -1, y: -1, width: flagWidth(number) + 2, height: number === undefined ? 28 : 21 }}
      title={title}
      className={className}
    />
  )
}
