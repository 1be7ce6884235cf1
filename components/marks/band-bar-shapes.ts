import { bandUsed, isBeyondBand, isNearEdge } from '@/lib/science/band'
import { dotDash } from './jar-shapes'
import type { Role, Shape } from './shape'
import { stripes } from './texture'

export type BandBarInput = {
  width: number
  /** Height of the band's window: 7 at the desk, 14 at the bench. */
  height?: number
  lower?: number | null
  upper?: number | null
  initial?: number | null
  last?: number | null
  now?: number | null
  /** Share of the band used from which the solid dot is ringed. */
  edgeFrom?: number
}

export type BandScale = { min: number; max: number; place: (value: number) => number }

/** The drawing hangs on its window's middle: y 0. It reaches `bandBarReach` above and below. */
export function bandBarReach(height = 7): number {
  return height < 10 ? 10 : height * 1.15
}

/**
 * What the bar's width stands for. A two-sided band takes three fifths of it; a one-sided band takes a
 * third from its initial, or less where a value further out can still be shown; past that an arrow.
 */
export function bandScale({ width, lower, upper, initial, last, now }: BandBarInput): BandScale {
  const values = [initial, last, now].filter(isNumber)
  const scale = (min: number, max: number): BandScale => ({
    min,
    max,
    place: (value) => (max === min ? width / 2 : ((value - min) / (max - min)) * width),
  })
  if (isNumber(lower) && isNumber(upper)) {
    const margin = (upper - lower) * 0.34
    return scale(lower - margin, upper + margin)
  }
  if (isNumber(upper)) {
    const base = Math.min(initial ?? 0, upper)
    const span = upper - base || Math.abs(upper) || 1
    const reach = Math.max(...values, base + span * 2.4)
    return scale(base, reach - base > span * 15 ? base + span * 3 : base + (reach - base) * 1.25)
  }
  if (isNumber(lower)) {
    const base = Math.max(initial ?? lower + (Math.abs(lower) || 1), lower)
    const span = base - lower || Math.abs(lower) || 1
    const reach = Math.min(...values, base - span * 2.4)
    const top = Math.max(...values, base)
    return scale(base - reach > span * 15 ? base - span * 3 : base - (base - reach) * 1.25, top)
  }
  if (values.length === 0) return scale(0, 1)
  const [low, high] = [Math.min(...values), Math.max(...values)]
  const margin = (high - low || Math.abs(high) || 1) * 0.6
  return scale(low - margin, high + margin)
}

export function bandBarShapes(input: BandBarInput): Shape[] {
  const { width, height = 7, lower, upper, initial, last, now } = input
  const pen = height < 10 ? DESK : benchPen(height)
  const scale = bandScale(input)
  const from = isNumber(lower) ? scale.place(lower) : 0
  const to = isNumber(upper) ? scale.place(upper) : width
  const shapes: Shape[] = []
  if (!isNumber(lower) && !isNumber(upper)) {
    shapes.push({
      kind: 'line',
      x1: 0,
      x2: width,
      y1: 0,
      y2: 0,
      stroke: 'soft',
      width: 1.25,
      cap: 'round',
      dash: dotDash(1.25),
    })
  } else {
    shapes.push(...outside(0, from, height), ...outside(to, width, height))
    shapes.push({
      kind: 'rect',
      x: from,
      y: -height / 2,
      w: to - from,
      h: height,
      fill: 'paper',
      stroke: 'ink',
      width: pen.window,
    })
    if (isNumber(lower)) shapes.push(upright(from, pen.edge, pen.edgeReach))
    if (isNumber(upper)) shapes.push(upright(to, pen.edge, pen.edgeReach))
    if (isNumber(initial) && isOn(initial, scale))
      shapes.push(upright(scale.place(initial), pen.window, pen.initialReach))
  }
  if (isNumber(last)) shapes.push(...spot(last, scale, width, pen, 'last', nearnessOf(last, input)))
  if (isNumber(now)) shapes.push(...spot(now, scale, width, pen, 'now', nearnessOf(now, input)))
  return shapes
}

/** Whether a value is beyond the band, or so near its edge that its dot is ringed. Without an initial nothing is near. */
function nearnessOf(value: number, input: BandBarInput): Nearness {
  const band = { lower: input.lower ?? null, upper: input.upper ?? null }
  if (isBeyondBand(band, value)) return 'beyond'
  const used = isNumber(input.initial) ? bandUsed(band, input.initial, value) : null
  return used !== null && isNearEdge(used, input.edgeFrom) ? 'near' : 'inside'
}

type Nearness = 'inside' | 'near' | 'beyond'

type Pen = {
  window: number
  edge: number
  edgeReach: number
  initialReach: number
  last: number
  lastLine: number
  now: number
  halo: number
  ring: number
  ringLine: number
}

const DESK: Pen = {
  window: 1.25,
  edge: 2,
  edgeReach: 6,
  initialReach: 8,
  last: 4.3,
  lastLine: 1.6,
  now: 5,
  halo: 1,
  ring: 8,
  ringLine: 2,
}

function benchPen(height: number): Pen {
  const k = height / 14
  return {
    window: 2,
    edge: 3,
    edgeReach: 12 * k,
    initialReach: 15 * k,
    last: 9.46 * k,
    lastLine: 2.5,
    now: 11 * k,
    halo: 2,
    ring: 15.5 * k,
    ringLine: 3,
  }
}

function outside(from: number, to: number, height: number): Shape[] {
  if (to - from <= 0) return []
  const half = height / 2
  const steps = stripes(
    [
      [from, -half],
      [to, -half],
      [to, half],
      [from, half],
    ],
    5,
    1,
    'falling',
  )
  return steps.length > 0 ? [{ kind: 'path', steps, fill: 'soft' }] : []
}

function upright(x: number, width: number, reach: number): Shape {
  return { kind: 'line', x1: x, x2: x, y1: -reach, y2: reach, stroke: 'ink', width }
}

function spot(
  value: number,
  scale: BandScale,
  width: number,
  pen: Pen,
  when: 'last' | 'now',
  nearness: Nearness,
): Shape[] {
  const isOut = nearness === 'beyond'
  const colour: Role = isOut && when === 'now' ? 'alarm' : 'ink'
  if (!isOn(value, scale)) return arrow(value > scale.max, width, pen, when, isOut ? 'alarm' : 'ink')
  const cx = scale.place(value)
  if (when === 'last')
    return [{ kind: 'circle', cx, cy: 0, r: pen.last, fill: 'paper', stroke: 'ink', width: pen.lastLine }]
  const solid: Shape = {
    kind: 'circle',
    cx,
    cy: 0,
    r: pen.now,
    fill: colour,
    stroke: 'paper',
    width: pen.halo,
  }
  if (nearness !== 'near') return [solid]
  return [solid, { kind: 'circle', cx, cy: 0, r: pen.ring, stroke: 'alarm', width: pen.ringLine }]
}

/** What is off the scale is pointed at from within the bar's end, so that no frame can cut it off. */
function arrow(isRight: boolean, width: number, pen: Pen, when: 'last' | 'now', colour: Role): Shape[] {
  const long = pen.now * 1.5
  const tip = isRight ? width : 0
  const base = isRight ? tip - long : tip + long
  const shape: Shape = {
    kind: 'path',
    steps: [['M', tip, 0], ['L', base, -pen.now], ['L', base, pen.now], ['Z']],
    fill: when === 'now' ? colour : 'paper',
    stroke: when === 'now' ? 'paper' : colour,
    width: when === 'now' ? pen.halo : pen.lastLine,
    join: 'round',
  }
  return [shape]
}

function isOn(value: number, { min, max }: BandScale): boolean {
  const slack = Math.abs(max - min) * 1e-9
  return value >= min - slack && value <= max + slack
}

function isNumber(value: number | null | undefined): value is number {
  return typeof value === 'number' && Number.isFinite(value)
}
