import { Drawn } from '@/components/marks/drawn'
import { moveShapes } from '@/components/marks/place'
import { standingShapes } from '@/components/marks/standing-shapes'
import type { Shape } from '@/components/marks/shape'

/** The name, large, with its three jars on a line across the page. */
export function Masthead({ claim }: { claim?: string }) {
  return (
    <div className="border-b border-ink px-4 pt-6 sm:px-10 sm:pt-[30px]">
      <div className="flex items-end gap-4 sm:gap-[22px]">
        <Jars size={44} places={[16, 52, 108]} width={130} className="sm:hidden" />
        <Jars size={70} places={[26, 84, 174]} width={210} className="hidden sm:block" />
        <p className="pb-1 text-[2.625rem] font-720 leading-none tracking-[-0.02em] sm:pb-3 sm:text-64">
          Stillstand
        </p>
        {claim ? <p className="hidden pb-4 pl-9 text-24 leading-tight lg:block">{claim}</p> : null}
      </div>
    </div>
  )
}

function Jars({
  size,
  places,
  width,
  className,
}: {
  size: number
  places: [number, number, number]
  width: number
  className: string
}) {
  const standings = ['steady', 'leaning', 'out'] as const
  const shapes: Shape[] = standings.flatMap((standing, index) =>
    moveShapes(standingShapes({ standing, size, role: 'ink' }), places[index] ?? 0, 0),
  )
  return (
    <svg
      width={width}
      height={size}
      viewBox={`0 ${-size} ${width} ${size}`}
      overflow="visible"
      aria-hidden
      className={`shrink-0 ${className}`}
    >
      {/* Drawn this large, the outline of a small mark would look like wire. */}
      <Drawn
        shapes={shapes.map((shape) =>
          shape.kind !== 'text' && shape.stroke ? { ...shape, width: 2.6 } : shape,
        )}
      />
    </svg>
  )
}
