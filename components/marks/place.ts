import type { Bounds, Point, Shape, Step } from './shape'

/** A rigid placement: turned by `degrees` about `about` (clockwise, as y runs down), then moved. */
export type Placement = { degrees: number; about: Point; dx: number; dy: number }

export function placePoint([x, y]: Point, { degrees, about, dx, dy }: Placement): Point {
  const angle = (degrees * Math.PI) / 180
  const cos = Math.cos(angle)
  const sin = Math.sin(angle)
  const [ax, ay] = about
  return [ax + (x - ax) * cos - (y - ay) * sin + dx, ay + (x - ax) * sin + (y - ay) * cos + dy]
}

/** Shapes with the placement worked into their coordinates. Words keep upright, only their foot moves. */
export function placeShapes(shapes: Shape[], placement: Placement): Shape[] {
  return shapes.map((shape) => placeShape(shape, placement))
}

export function moveShapes(shapes: Shape[], dx: number, dy: number): Shape[] {
  return placeShapes(shapes, { degrees: 0, about: [0, 0], dx, dy })
}

function placeShape(shape: Shape, placement: Placement): Shape {
  switch (shape.kind) {
    case 'line': {
      const [x1, y1] = placePoint([shape.x1, shape.y1], placement)
      const [x2, y2] = placePoint([shape.x2, shape.y2], placement)
      return { ...shape, x1, y1, x2, y2 }
    }
    case 'circle': {
      const [cx, cy] = placePoint([shape.cx, shape.cy], placement)
      return { ...shape, cx, cy }
    }
    case 'path':
      return { ...shape, steps: shape.steps.map((step) => placeStep(step, placement)) }
    case 'text': {
      const [x, y] = placePoint([shape.x, shape.y], placement)
      return { ...shape, x, y }
    }
    case 'rect': {
      if (placement.degrees === 0) return { ...shape, x: shape.x + placement.dx, y: shape.y + placement.dy }
      const { kind, x, y, w, h, rx, ...rest } = shape
      void kind
      const steps = roundedRectSteps(x, y, w, h, rx ?? 0)
      return { kind: 'path', ...rest, steps: steps.map((step) => placeStep(step, placement)) }
    }
  }
}

function placeStep(step: Step, placement: Placement): Step {
  switch (step[0]) {
    case 'Z':
      return step
    case 'A': {
      const [x, y] = placePoint([step[2], step[3]], placement)
      return ['A', step[1], x, y, step[4]]
    }
    case 'Q': {
      const [cx, cy] = placePoint([step[1], step[2]], placement)
      const [x, y] = placePoint([step[3], step[4]], placement)
      return ['Q', cx, cy, x, y]
    }
    default: {
      const [x, y] = placePoint([step[1], step[2]], placement)
      return [step[0], x, y]
    }
  }
}

export function roundedRectSteps(x: number, y: number, w: number, h: number, radius: number): Step[] {
  const r = Math.min(radius, w / 2, h / 2)
  if (r <= 0) return [['M', x, y], ['L', x + w, y], ['L', x + w, y + h], ['L', x, y + h], ['Z']]
  return [
    ['M', x + r, y],
    ['L', x + w - r, y],
    ['A', r, x + w, y + r, 1],
    ['L', x + w, y + h - r],
    ['A', r, x + w - r, y + h, 1],
    ['L', x + r, y + h],
    ['A', r, x, y + h - r, 1],
    ['L', x, y + r],
    ['A', r, x + r, y, 1],
    ['Z'],
  ]
}

/** The box that holds the shapes, strokes included; words are left out, as their width is the font's. */
export function boundsOf(shapes: Shape[]): Bounds {
  const bounds: Bounds = { left: Infinity, top: Infinity, right: -Infinity, bottom: -Infinity }
  const hold = (x: number, y: number, by: number) => {
    bounds.left = Math.min(bounds.left, x - by)
    bounds.right = Math.max(bounds.right, x + by)
    bounds.top = Math.min(bounds.top, y - by)
    bounds.bottom = Math.max(bounds.bottom, y + by)
  }
  for (const shape of shapes) {
    if (shape.kind === 'text') continue
    const half = shape.stroke ? (shape.width ?? 1) / 2 : 0
    if (shape.kind === 'line') {
      hold(shape.x1, shape.y1, half)
      hold(shape.x2, shape.y2, half)
    } else if (shape.kind === 'circle') hold(shape.cx, shape.cy, shape.r + half)
    else if (shape.kind === 'rect') {
      hold(shape.x, shape.y, half)
      hold(shape.x + shape.w, shape.y + shape.h, half)
    } else {
      for (const step of shape.steps) {
        if (step[0] === 'A') hold(step[2], step[3], half)
        else if (step[0] === 'Q') hold(step[3], step[4], half)
        else if (step[0] !== 'Z') hold(step[1], step[2], half)
      }
    }
  }
  return bounds
}
