'use client'

import { Drawn } from '../marks/drawn'
import { carryHeight, carryShapes } from './carry-shapes'
import type { CarryInput } from './carry-data'
import { useWidth } from './use-width'

/** How far each attribute carries, drawn; the case's table beside it says the same in numbers. */
export function Carry(input: CarryInput) {
  const [box, width] = useWidth<HTMLDivElement>(972)
  const height = carryHeight(input)
  return (
    <figure ref={box} className="min-w-0">
      <svg
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        overflow="visible"
        className="block"
        role="img"
        aria-label={carrySentence(input)}
      >
        <Drawn shapes={carryShapes(input, width)} />
      </svg>
      <figcaption className="flex flex-wrap justify-between gap-x-6 pt-1 text-13 text-soft">
        <span>a dot is a reading; a cross, a missing one</span>
        <span>Dashed: carried by the line. Past the red step nothing carries it.</span>
      </figcaption>
    </figure>
  )
}

export function carrySentence({ attributes, endMonths, proposedMonths, capMonths }: CarryInput): string {
  const said = attributes.map(({ name, months }) =>
    months === null
      ? `${name} stays inside past ${endMonths} months`
      : `${name} carries ${months.toFixed(1)} months`,
  )
  if (capMonths !== null) said.push(`the cap is ${capMonths} months`)
  if (proposedMonths !== null) said.push(`${proposedMonths} months are proposed`)
  return `${said.join('; ')}.`
}
