import { Drawn } from './drawn'
import type { Shape } from './shape'

/**
 * A mark as an image of its own. With a title it is announced and shows it on hover; without one it is
 * left out of what is read aloud, because the words beside it say the same.
 */
export function Figure({
  shapes,
  view,
  title,
  className,
}: {
  shapes: Shape[]
  view: { x: number; y: number; width: number; height: number }
  title?: string
  className?: string
}) {
  return (
    <svg
      width={view.width}
      height={view.height}
      viewBox={`${view.x} ${view.y} ${view.width} ${view.height}`}
      overflow="visible"
      className={`block shrink-0 ${className ?? ''}`}
      {...(title ? { role: 'img', 'aria-label': title } : { 'aria-hidden': true })}
    >
      {title ? <title>{title}</title> : null}
      <Drawn shapes={shapes} />
    </svg>
  )
}
