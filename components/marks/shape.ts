/**
 * What every mark is made of: plain lines, circles, paths, rectangles and words with resolved
 * coordinates. Screen and PDF draw the same list, so nothing here may lean on a feature that one of
 * them lacks (patterns, clips, nested transforms).
 */

/** A colour by what it means; the renderer knows what it looks like in its theme. */
export type Role =
  | 'ink'
  | 'soft'
  | 'rule'
  | 'hair'
  | 'alarm'
  | 'wash'
  | 'ground'
  | 'recess'
  | 'paper'
  | 'cream'
  | 'water'
  | 'oil'
  | 'oilLine'
  /** Drawn on a layer or on cream: dark in both themes. */
  | 'dot'
  /** Letters on a surface of ink or alarm. */
  | 'onInk'

export type Step =
  | ['M' | 'L', number, number]
  | ['Q', number, number, number, number]
  /** A circular arc of this radius to x, y, less than half a turn, clockwise where the last is 1. */
  | ['A', number, number, number, 0 | 1]
  | ['Z']

export type Stroke = {
  stroke?: Role
  width?: number
  dash?: [number, number]
  cap?: 'butt' | 'round'
  join?: 'miter' | 'round'
}

export type Line = { kind: 'line'; x1: number; y1: number; x2: number; y2: number } & Stroke
export type Circle = { kind: 'circle'; cx: number; cy: number; r: number; fill?: Role } & Stroke
export type Path = { kind: 'path'; steps: Step[]; fill?: Role; opacity?: number } & Stroke
export type Rect = {
  kind: 'rect'
  x: number
  y: number
  w: number
  h: number
  rx?: number
  fill?: Role
} & Stroke
export type Words = {
  kind: 'text'
  x: number
  y: number
  text: string
  size: number
  weight: number
  anchor: 'start' | 'middle' | 'end'
  fill: Role
  mono?: boolean
}

export type Shape = Line | Circle | Path | Rect | Words

export type Point = [number, number]
export type Bounds = { left: number; top: number; right: number; bottom: number }

/** Two decimals are a fiftieth of a pixel: small enough to be exact to the eye, short enough to send. */
export function round2(value: number): number {
  return Math.round(value * 100) / 100 + 0
}

export function pathData(steps: Step[]): string {
  return steps
    .map((step) => {
      switch (step[0]) {
        case 'Z':
          return 'Z'
        case 'A':
          return `A${round2(step[1])} ${round2(step[1])} 0 0 ${step[4]} ${round2(step[2])} ${round2(step[3])}`
        case 'Q':
          return `Q${round2(step[1])} ${round2(step[2])} ${round2(step[3])} ${round2(step[4])}`
        default:
          return `${step[0]}${round2(step[1])} ${round2(step[2])}`
      }
    })
    .join('')
}

export function polygonSteps(points: Point[]): Step[] {
  const steps: Step[] = points.map(([x, y], index) => [index === 0 ? 'M' : 'L', x, y])
  return steps.length > 0 ? [...steps, ['Z']] : []
}

/** A circle as two half arcs, so that many dots can share one path. */
export function dotSteps(cx: number, cy: number, r: number): Step[] {
  return [['M', cx - r, cy], ['A', r, cx + r, cy, 1], ['A', r, cx - r, cy, 1], ['Z']]
}
