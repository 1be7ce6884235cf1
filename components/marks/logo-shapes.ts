import { moveShapes } from './place'
import type { Shape } from './shape'
import { standingShapes } from './standing-shapes'

/** One jar stands, one leans, one lies, in ink: 65 wide and 22 high on a line at y 0. */
export function logoShapes(): Shape[] {
  return [
    ...moveShapes(standingShapes({ standing: 'steady', size: 22, role: 'ink' }), 7.5, 0),
    ...moveShapes(standingShapes({ standing: 'leaning', size: 22, role: 'ink' }), 24.5, 0),
    ...moveShapes(standingShapes({ standing: 'out', size: 22, role: 'ink' }), 52.5, 0),
  ]
}

export const LOGO_WIDTH = 64
export const LOGO_HEIGHT = 22
