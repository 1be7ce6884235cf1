import { dotDash } from './jar-shapes'
import { placeShapes } from './place'
import type { Role, Shape } from './shape'

export type Standing = 'steady' | 'leaning' | 'out' | 'untold'

export const TILT_DEGREES = 14

/**
 * The jar's outline alone, its foot's middle at 0, 0: upright and hollow, tilted and hollow, lying and
 * solid, or dotted. `shelf` adds the mark's own bit of line to stand on.
 */
export function standingShapes({
  standing,
  size,
  shelf = false,
  role,
}: {
  standing: Standing
  size: number
  shelf?: boolean
  role?: Role
}): Shape[] {
  const colour = role ?? standingRole(standing)
  const width = size < 20 ? 1.4 : 1.8
  const line: Shape[] = shelf
    ? [
        {
          kind: 'line',
          x1: -size * 0.72,
          x2: size * 0.72,
          y1: width * 0.55,
          y2: width * 0.55,
          stroke: colour,
          width: Math.max(1.2, width * 0.7),
        },
      ]
    : []
  return [...outline(standing, size, width, colour), ...line]
}

export function standingRole(standing: Standing): Role {
  if (standing === 'steady') return 'ink'
  return standing === 'untold' ? 'soft' : 'alarm'
}

function outline(standing: Standing, size: number, width: number, colour: Role): Shape[] {
  const x = size * 0.3 - width / 2 + 0.2
  const lidBottom = size * 0.84
  const body = (top: number, fill?: Role): Shape => ({
    kind: 'path',
    steps: [['M', -x, -top], ['L', -x, -width / 2], ['L', x, -width / 2], ['L', x, -top], ['Z']],
    stroke: colour,
    width,
    join: 'round',
    ...(fill ? { fill } : {}),
  })
  const lid: Shape = {
    kind: 'rect',
    x: -(size * 0.3 + 0.6),
    y: -size,
    w: size * 0.6 + 1.2,
    h: size * 0.16,
    rx: 1,
    fill: colour,
  }
  switch (standing) {
    case 'steady':
      return [body(lidBottom), lid]
    case 'leaning':
      return placeShapes([body(lidBottom), lid], {
        degrees: TILT_DEGREES,
        about: [size * 0.3, 0],
        dx: -size * 0.1,
        dy: 0,
      })
    // A solid jar needs the gap under its lid to be read as one.
    case 'out':
      return placeShapes([body(size * 0.72 + width / 4, colour), lid], {
        degrees: 90,
        about: [0, 0],
        dx: -size / 2,
        dy: -size * 0.3,
      })
    case 'untold': {
      const dotted = body(lidBottom)
      return [{ ...dotted, dash: dotDash(width * 0.905), cap: 'round' } as Shape]
    }
  }
}
