import { placePoint, placeShapes } from './place'
import type { Placement } from './place'
import type { Point, Role, Shape, Stroke } from './shape'
import { jarFrame } from './jar-frame'
import type { JarFrame } from './jar-frame'
import { layerShapes } from './jar-layers'
import type { JarLayers } from './jar-layers'

export type JarKind = 'watch' | 'measuring' | 'spare' | 'retain'
export type JarState = 'drawn' | 'due' | 'planned' | 'missed' | 'resting' | 'broken' | 'spent'
export type Posture = 'upright' | 'leaning' | 'lying'

export type JarInput = JarLayers & {
  height: number
  kind?: JarKind
  state?: JarState
  posture?: Posture
  /** Drawn in the alarm colour; a jar that leans or lies always is. */
  alarm?: boolean
  /** Draw the lid off (a measuring jar on the bench) or on whatever the kind says. */
  open?: boolean
}

export const LEAN_DEGREES = 12
export const FALL_DEGREES = 90

export function jarShapes(input: JarInput): Shape[] {
  const frame = jarFrame(input.height)
  const posture = input.posture ?? 'upright'
  const colour: Role = input.alarm || posture !== 'upright' ? 'alarm' : 'ink'
  return placeShapes(standingJar(frame, input, colour), posturePlacement(frame, posture))
}

/**
 * Leaning turns about the right foot and steps a little to the left, so that the jar keeps to the
 * middle of its place; lying turns the lid to the right, as time runs, and rests on the same line.
 */
export function posturePlacement({ height, halfWidth }: JarFrame, posture: Posture): Placement {
  if (posture === 'leaning')
    return { degrees: LEAN_DEGREES, about: [halfWidth, 0], dx: -height * 0.07, dy: 0 }
  if (posture === 'lying') return { degrees: FALL_DEGREES, about: [0, 0], dx: -height / 2, dy: -halfWidth }
  return { degrees: 0, about: [0, 0], dx: 0, dy: 0 }
}

/** How much of its shelf a jar takes: fallen jars need their height. */
export function jarPitch(height: number, posture: Posture): number {
  return posture === 'lying' ? height : height * 0.6
}

/** Where the foot that the jar leans on stands, for shelves and tests. */
export function rightFoot(frame: JarFrame, posture: Posture): Point {
  return placePoint([frame.halfWidth, 0], posturePlacement(frame, posture))
}

function standingJar(frame: JarFrame, input: JarInput, colour: Role): Shape[] {
  switch (input.state ?? 'drawn') {
    case 'due':
      return [dottedJar(frame, 'ink')]
    case 'planned':
      return [dottedJar(frame, 'rule')]
    case 'missed':
      return [dottedJar(frame, 'ink'), crossOf(frame)]
    case 'resting':
      return [
        { ...glass(frame, colour, true), fill: 'paper' },
        lid(frame, colour),
        ...restBars(frame, colour),
      ]
    case 'broken':
      return brokenJar(frame, colour)
    case 'spent':
      return [glass(frame, 'soft', false), rim(frame, 'soft')]
    case 'drawn': {
      const open = input.open ?? input.kind === 'measuring'
      const shapes = [...layerShapes(frame, input), glass(frame, colour, !open)]
      if (open) return [...shapes, rim(frame, colour)]
      const closed = [...shapes, lid(frame, colour)]
      return input.kind === 'watch' ? [...closed, seal(frame, colour)] : closed
    }
  }
}

function glass(frame: JarFrame, stroke: Role, closed: boolean): Shape & { kind: 'path' } {
  const { halfGlass: x, glassFoot: y, footRadius: r } = frame
  const top = -(frame.height - frame.lidHeight)
  return {
    kind: 'path',
    stroke,
    width: frame.wall,
    steps: [
      ['M', -x, top],
      ['L', -x, y - r],
      ['Q', -x, y, -x + r, y],
      ['L', x - r, y],
      ['Q', x, y, x, y - r],
      ['L', x, top],
      ...(closed ? ([['Z']] as [['Z']]) : []),
    ],
  }
}

function lid({ height, lidHeight, lidHalfWidth }: JarFrame, fill: Role): Shape {
  return {
    kind: 'rect',
    x: -lidHalfWidth,
    y: -height,
    w: lidHalfWidth * 2,
    h: lidHeight,
    rx: lidHeight / 4,
    fill,
  }
}

function rim(frame: JarFrame, stroke: Role): Shape {
  const y = -(frame.height - frame.lidHeight)
  const [from, to] = [frame.height * 0.24, frame.height * 0.36]
  return {
    kind: 'path',
    stroke,
    width: frame.wall * 1.25,
    cap: 'round',
    steps: [
      ['M', -to, y],
      ['L', -from, y],
      ['M', from, y],
      ['L', to, y],
    ],
  }
}

function seal({ height }: JarFrame, stroke: Role): Shape {
  const half = Math.max(1.2, height * 0.06)
  return {
    kind: 'rect',
    x: -half,
    y: -(height + (height < 40 ? 0.6 : 1)),
    w: half * 2,
    h: Math.max(4.3, height * 0.225),
    fill: 'paper',
    stroke,
    width: height < 40 ? 0.8 : height < 100 ? 1.2 : 2.2,
  }
}

function dottedJar(frame: JarFrame, stroke: Role): Shape {
  const { halfGlass: x, glassFoot: foot, halfWidth, height, wall } = frame
  const top = -(height - frame.lidHeight)
  return {
    kind: 'path',
    stroke,
    width: wall,
    cap: 'round',
    dash: dotDash(wall),
    steps: [
      ['M', -x, top],
      ['L', -x, foot],
      ['L', x, foot],
      ['L', x, top],
      ['M', -halfWidth, -(height - wall / 2)],
      ['L', halfWidth, -(height - wall / 2)],
    ],
  }
}

export function dotDash(width: number): [number, number] {
  return [0.01, Math.max(3, width * 2.1)]
}

function crossOf({ height, wall }: JarFrame): Shape {
  const half = Math.max(2.2, height * 0.102)
  const y = -height * 0.42
  return {
    kind: 'path',
    stroke: 'ink',
    width: wall * 1.15,
    cap: 'round',
    steps: [
      ['M', -half, y - half],
      ['L', half, y + half],
      ['M', half, y - half],
      ['L', -half, y + half],
    ],
  }
}

function restBars({ height }: JarFrame, stroke: Role): Shape[] {
  const x = Math.max(2, height * 0.05625)
  const bar = { kind: 'line', y1: -height * 0.59, y2: -height * 0.29, stroke } as const
  const width = Math.max(1.6, height * 0.045)
  return [
    { ...bar, x1: -x, x2: -x, width },
    { ...bar, x1: x, x2: x, width },
  ]
}

/** The crack, as shares of the height, from the mouth down to the foot. */
const CRACK: Point[] = [
  [-0.012, -0.885],
  [0.096, -0.765],
  [-0.084, -0.585],
  [0.078, -0.425],
  [-0.06, -0.225],
]

function brokenJar(frame: JarFrame, stroke: Role): Shape[] {
  const { height, halfWidth, halfGlass: x, glassFoot: foot, footRadius: r, wall } = frame
  const top = -(height - frame.lidHeight)
  const crack: Point[] = [
    ...CRACK.map(([cx, cy]): Point => [cx * height, cy * height]),
    [0.048 * height, foot],
  ]
  const pen: Stroke = { stroke, width: wall, join: 'round' }
  const apart = Math.max(0.7, height * 0.03)
  const left: Shape = {
    kind: 'path',
    ...pen,
    steps: [
      ...crack.map(([cx, cy], index): ['M' | 'L', number, number] => [index === 0 ? 'M' : 'L', cx, cy]),
      ['L', -x + r, foot],
      ['Q', -x, foot, -x, foot - r],
      ['L', -x, top],
    ],
  }
  const right: Shape = {
    kind: 'path',
    ...pen,
    steps: [
      ...[...crack]
        .reverse()
        .map(([cx, cy], index): ['M' | 'L', number, number] => [index === 0 ? 'M' : 'L', cx, cy]),
      ['L', x, top],
      ['L', x, foot - r],
      ['Q', x, foot, x - r, foot],
      ['Z'],
    ],
  }
  return [
    ...placeShapes([left], { degrees: 0, about: [0, 0], dx: -apart, dy: 0 }),
    ...placeShapes([right], { degrees: 4, about: [halfWidth, 0], dx: apart + 0.5, dy: 0 }),
  ]
}
