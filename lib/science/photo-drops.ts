import { assertFinite, assertPositive, ScienceError } from './guard'

/** Two ends of a stretch on a picture, in pixels. */
export type Stretch = { x1: number; y1: number; x2: number; y2: number }

export function lengthOf({ x1, y1, x2, y2 }: Stretch): number {
  return Math.hypot(x2 - x1, y2 - y1)
}

/** The shortest scale bar in pixels: an end set one pixel off then shifts every diameter by 5 % [common practice, no source]. */
export const shortestBarPx = 20

/** Diameters on a photo, in micrometres: their length in pixels × length of the scale bar ÷ its length in pixels. */
export function diametersOnPhoto(bar: Stretch & { um: number }, drops: readonly Stretch[]): number[] {
  assertPositive('um', bar.um)
  const barPx = lengthOf(bar)
  assertFinite('bar', barPx)
  if (barPx < shortestBarPx)
    throw new ScienceError('bar', `is ${barPx.toFixed(0)} pixels long, and needs ${shortestBarPx}`)
  return drops.map((drop, i) => {
    const px = lengthOf(drop)
    assertPositive(`drops[${i}]`, px)
    return (px * bar.um) / barPx
  })
}
