import type { StationMarker } from './heat'
import { polygonSteps } from './shape'
import type { Point, Role, Shape } from './shape'

/** A station's marker around a point; `size` is the circle's diameter, the others are cut to the same weight. */
export function stationMarkerShapes(
  marker: StationMarker,
  { x, y, size, stroke = 'ink', fill = 'paper' }: Spot,
): Shape[] {
  const r = size / 2
  const width = Math.max(1.25, size / 6)
  const outline = (points: Point[]): Shape[] => [
    {
      kind: 'path',
      steps: polygonSteps(points.map(([px, py]): Point => [x + px, y + py])),
      fill,
      stroke,
      width,
      join: 'miter',
    },
  ]
  switch (marker) {
    case 'circle':
      return [{ kind: 'circle', cx: x, cy: y, r, fill, stroke, width }]
    case 'square':
      return [
        { kind: 'rect', x: x - r * 0.92, y: y - r * 0.92, w: r * 1.84, h: r * 1.84, fill, stroke, width },
      ]
    case 'diamond':
      return outline([
        [0, -r * 1.2],
        [r * 1.2, 0],
        [0, r * 1.2],
        [-r * 1.2, 0],
      ])
    case 'triangle-up':
      return outline([
        [0, -r * 1.17],
        [r * 1.17, r * 0.83],
        [-r * 1.17, r * 0.83],
      ])
    case 'triangle-down':
      return outline([
        [0, r * 1.17],
        [r * 1.17, -r * 0.83],
        [-r * 1.17, -r * 0.83],
      ])
    case 'cross':
      return [
        {
          kind: 'line',
          x1: x - r,
          y1: y - r,
          x2: x + r,
          y2: y + r,
          stroke,
          width: width * 1.2,
          cap: 'round',
        },
        {
          kind: 'line',
          x1: x - r,
          y1: y + r,
          x2: x + r,
          y2: y - r,
          stroke,
          width: width * 1.2,
          cap: 'round',
        },
      ]
  }
}

type Spot = { x: number; y: number; size: number; stroke?: Role; fill?: Role }
