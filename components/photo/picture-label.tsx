import { percentOf } from '@/lib/science/percent'

type Props = {
  /** Where it stands on the picture, in the picture's pixels. */
  x: number
  y: number
  width: number
  height: number
  /** Beside or under the place, in heights of the letters. */
  dy: string
  anchor: 'middle' | 'end'
  isBold: boolean
  children: string
}

/** A word on a photo: in an SVG without a view box of its own, so that it is as large on a small picture as on a large one. */
export function PictureLabel({ x, y, width, height, dy, anchor, isBold, children }: Props) {
  return (
    <text
      x={`${percentOf(x, width)}%`}
      y={`${percentOf(y, height)}%`}
      dx={anchor === 'end' ? '-0.4em' : 0}
      dy={dy}
      textAnchor={anchor}
      stroke="#FFFFFF"
      strokeWidth="4"
      paintOrder="stroke"
      className={`text-16 ${isBold ? 'font-700' : 'font-430'}`}
      style={{ fill: '#0E1D17' }}
    >
      {children}
    </text>
  )
}
