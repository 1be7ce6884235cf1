import type { Square } from '@/lib/science/patch'
import { PictureLabel } from './picture-label'

type Props = {
  src: string
  alt: string
  width: number
  height: number
  squares: { name: string; square: Square; isPicked?: boolean }[]
}

/** A photo under the patches that a colour is told from, each named. */
export function PhotoSquares({ src, alt, width, height, squares }: Props) {
  return (
    <>
      {/* eslint-disable-next-line @next/next/no-img-element -- in memory, or served through a permission check */}
      <img src={src} alt={alt} className="block h-auto w-full select-none" draggable={false} />
      <svg viewBox={`0 0 ${width} ${height}`} className="absolute inset-0 h-full w-full" aria-hidden>
        {squares.map(({ name, square: { x, y, side }, isPicked }) => (
          <g key={name}>
            {(['halo', 'line'] as const).map((kind) => (
              <rect
                key={kind}
                x={x - side / 2}
                y={y - side / 2}
                width={side}
                height={side}
                fill="none"
                stroke={kind === 'halo' ? '#FFFFFF' : '#0E1D17'}
                strokeWidth={(kind === 'halo' ? 5 : 2) + (isPicked ? 2 : 0)}
                vectorEffect="non-scaling-stroke"
              />
            ))}
          </g>
        ))}
      </svg>
      <svg className="absolute inset-0 h-full w-full" aria-hidden>
        {squares.map(({ name, square: { x, y, side }, isPicked }) => {
          // At the picture's upper edge there is no room over it.
          const isUnder = y - side / 2 < height / 8
          return (
            <PictureLabel
              key={name}
              {...{ x, width, height }}
              y={isUnder ? y + side / 2 : y - side / 2}
              dy={isUnder ? '1.2em' : '-0.5em'}
              anchor="middle"
              isBold={isPicked === true}
            >
              {name}
            </PictureLabel>
          )
        })}
      </svg>
    </>
  )
}
