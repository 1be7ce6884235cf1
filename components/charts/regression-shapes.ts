import { stationMarkerShapes } from '@/components/marks/station-marker-shapes'
import type { StationMarker } from '@/components/marks/heat'
import type { Shape, Step } from '@/components/marks/shape'
import { niceTicks } from './curve-geometry'
import { stripes } from '@/components/marks/texture'

export type RegressionBatch = {
  name: string
  t: number[]
  /** In the unit shown (already taken back from logarithms). */
  y: number[]
  /** The fitted line, sampled; beyond the data it is dashed. */
  line: { t: number; y: number }[]
  /** The confidence bound on the side that decides, sampled; only where it decides. */
  bound: { t: number; y: number }[]
}

export type RegressionPlotInput = {
  width: number
  height: number
  batches: RegressionBatch[]
  lower: number | null
  upper: number | null
  limitText: { lower?: string; upper?: string }
  dataMonths: number
  proposedMonths: number
  crossingMonths: number | null
  crossingSide: 'lower' | 'upper' | null
  /** Batch that decides, drawn in ink; the others are thinner. Null where one line serves all. */
  decides: string | null
  format: (y: number) => string
}

const markers: StationMarker[] = ['circle', 'square', 'triangle-up', 'triangle-down', 'diamond', 'cross']
const frame = { left: 52, right: 16, top: 14, bottom: 24 }

/** The regression of a case, drawn once for screen and paper: points, lines, bound, limit, crossing. */
export function regressionShapes(input: RegressionPlotInput): Shape[] {
  const last = Math.max(input.dataMonths, input.proposedMonths, Math.min(input.crossingMonths ?? 0, 60))
  const tMax = Math.ceil((last * 1.12) / 6) * 6 || 6
  const values = [
    ...input.batches.flatMap((b) => b.y),
    ...input.batches.flatMap((b) => b.line.filter((p) => p.t <= tMax).map((p) => p.y)),
    ...[input.lower, input.upper].filter((v) => v !== null),
  ]
  const [min, max] = [Math.min(...values), Math.max(...values)]
  const pad = (max - min || Math.abs(max) * 0.1 || 1) * 0.12
  const [low, high] = [min - pad, max + pad]
  const x = (t: number) => frame.left + (t / tMax) * (input.width - frame.left - frame.right)
  const y = (v: number) => frame.top + ((high - v) / (high - low)) * (input.height - frame.top - frame.bottom)
  const [x0, x1] = [x(0), x(tMax)]
  const shapes: Shape[] = [
    {
      kind: 'rect',
      x: x0,
      y: frame.top,
      w: x1 - x0,
      h: input.height - frame.top - frame.bottom,
      fill: 'paper',
    },
  ]
  const beyond = (from: number, to: number) => {
    const corners: [number, number][] = [
      [x0, from],
      [x1, from],
      [x1, to],
      [x0, to],
    ]
    shapes.push({ kind: 'rect', x: x0, y: from, w: x1 - x0, h: to - from, fill: 'wash' })
    shapes.push({ kind: 'path', steps: stripes(corners, 7, 0.6, 'rising'), fill: 'hair' })
  }
  if (input.upper !== null) beyond(frame.top, y(input.upper))
  if (input.lower !== null) beyond(y(input.lower), input.height - frame.bottom)
  for (const v of niceTicks(low, high, 5)) {
    shapes.push({ kind: 'line', x1: x0, x2: x1, y1: y(v), y2: y(v), stroke: 'hair', width: 1 })
    shapes.push(word(x0 - 7, y(v) + 4.5, input.format(v), 'end', 13))
  }
  for (let t = 0; t <= tMax; t += tMax > 36 ? 12 : 6) {
    shapes.push({
      kind: 'line',
      x1: x(t),
      x2: x(t),
      y1: input.height - frame.bottom,
      y2: input.height - frame.bottom + 4,
      stroke: 'ink',
      width: 1,
    })
    shapes.push(word(x(t), input.height - 5, String(t), 'middle', 13))
  }
  for (const side of ['lower', 'upper'] as const) {
    const limit = input[side]
    if (limit === null) continue
    shapes.push({ kind: 'line', x1: x0, x2: x1, y1: y(limit), y2: y(limit), stroke: 'alarm', width: 2 })
    const label = input.limitText[side]
    const at = side === 'lower' ? y(limit) - 6 : y(limit) + 16
    if (label) shapes.push({ ...word(x0 + 8, at, label, 'start', 13), weight: 700, fill: 'alarm' })
  }
  shapes.push({
    kind: 'line',
    x1: x(input.proposedMonths),
    x2: x(input.proposedMonths),
    y1: frame.top,
    y2: input.height - frame.bottom,
    stroke: 'ink',
    width: 1.75,
  })
  input.batches.forEach((batch, i) => {
    const isDeciding = input.decides === null || input.decides === batch.name
    const dataEnd = Math.max(...batch.t)
    const trace = (points: { t: number; y: number }[]): Step[] =>
      points.map((p, k): Step => [
        k === 0 ? 'M' : 'L',
        x(p.t),
        clamp(y(p.y), frame.top, input.height - frame.bottom),
      ])
    const turn = lineAt(batch.line, dataEnd)
    const seen = [...batch.line.filter((p) => p.t < dataEnd), turn]
    const ahead = [turn, ...batch.line.filter((p) => p.t > dataEnd && p.t <= tMax)]
    const width = isDeciding ? 2.5 : 1
    if (seen.length > 1) shapes.push({ kind: 'path', steps: trace(seen), stroke: 'ink', width })
    if (isDeciding && ahead.length > 1)
      shapes.push({ kind: 'path', steps: trace(ahead), stroke: 'ink', width, dash: [8, 5] })
    const bound = batch.bound.filter((p) => p.t <= tMax)
    if (bound.length > 1)
      shapes.push({ kind: 'path', steps: trace(bound), stroke: 'alarm', width: 1.5, dash: [2, 3] })
    batch.t.forEach((t, k) => {
      const value = batch.y[k]
      if (value === undefined) return
      shapes.push(
        ...stationMarkerShapes(markers[i % markers.length] ?? 'circle', {
          x: x(t),
          y: y(value),
          size: 8,
          fill: isDeciding && input.decides !== null ? 'ink' : 'paper',
        }),
      )
    })
  })
  if (input.crossingMonths !== null && input.crossingSide && input.crossingMonths <= tMax) {
    const limit = input[input.crossingSide]
    if (limit !== null) {
      const [cx, cy] = [x(input.crossingMonths), y(limit)]
      shapes.push({ kind: 'circle', cx, cy, r: 5.5, fill: 'alarm' })
      const label = input.crossingMonths.toFixed(1)
      const w = label.length * 8 + 16
      const below = input.crossingSide === 'lower'
      const top = below ? cy + 9 : cy - 9 - 22
      shapes.push({ kind: 'rect', x: cx - w / 2, y: top, w, h: 22, rx: 3, fill: 'alarm' })
      shapes.push({ ...word(cx, top + 16, label, 'middle', 15), weight: 700, fill: 'onInk' })
    }
  }
  shapes.push({
    kind: 'line',
    x1: x0,
    x2: x1,
    y1: input.height - frame.bottom,
    y2: input.height - frame.bottom,
    stroke: 'ink',
    width: 1.5,
  })
  return shapes
}

/** The key of batches: marker and name, left to right. */
export function regressionKeyShapes(batches: string[], width: number): Shape[] {
  return batches.flatMap((name, i): Shape[] => {
    const x = 8 + (i * (width - 8)) / Math.max(1, batches.length)
    return [
      ...stationMarkerShapes(markers[i % markers.length] ?? 'circle', { x, y: 8, size: 9 }),
      word(x + 11, 12.5, name, 'start', 13),
    ]
  })
}

function word(x: number, y: number, text: string, anchor: 'start' | 'middle' | 'end', size: number) {
  return { kind: 'text', x, y, text, size, weight: 430, anchor, fill: 'ink' } as Extract<
    Shape,
    { kind: 'text' }
  >
}

/** Between two samples the line is straight enough to the eye. */
function lineAt(line: { t: number; y: number }[], t: number): { t: number; y: number } {
  const next = line.findIndex((p) => p.t >= t)
  const [a, b] = [line[Math.max(0, next - 1)], line[next === -1 ? line.length - 1 : next]]
  if (!a || !b || b.t === a.t) return { t, y: (b ?? a)?.y ?? 0 }
  return { t, y: a.y + ((t - a.t) / (b.t - a.t)) * (b.y - a.y) }
}

function clamp(v: number, min: number, max: number): number {
  return Math.min(max, Math.max(min, v))
}
