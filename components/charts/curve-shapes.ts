import { grouped } from '@/lib/number/rules'
import { heatLine } from '../marks/heat'
import type { Point, Shape, Step, Words } from '../marks/shape'
import { stationMarkerShapes } from '../marks/station-marker-shapes'
import { stripes } from '../marks/texture'
import type { CurveInput, CurveSeries } from './curve-data'
import {
  curveName,
  curveScale,
  doubtGroups,
  markerOf,
  nearerEdge,
  plotCurve,
  spreadNames,
  washes,
} from './curve-geometry'
import type { PlottedCurve, Spot } from './curve-geometry'

type Page = {
  endWeeks: number
  ticks: { weeks: number; text: string }[]
  markAt: number | null
  width: number
  height: number
}

type Plot = {
  left: number
  right: number
  top: number
  bottom: number
  x: (weeks: number) => number
  y: (share: number) => number
}

/**
 * A whole plot as shapes, for paper: the same scale, trends and limits as on screen, black on white,
 * with the outside of the band hatched instead of washed.
 */
export function curveShapes(input: CurveInput, page: Page): Shape[] {
  const scale = curveScale(input.series, input.band)
  const curves = input.series.map((series) => plotCurve(series, scale, page.endWeeks))
  const nameRoom = Math.max(60, ...curves.map(({ series }) => curveName(series).length * 5.4 + 14))
  const plot: Plot = {
    left: 38,
    right: page.width - 4,
    top: 6,
    bottom: page.height - 20,
    x: (weeks) => 46 + (weeks / (page.endWeeks || 1)) * (page.width - 46 - nameRoom),
    y: (share) => page.height - 20 - share * (page.height - 26),
  }
  return [
    ...grid(input, scale.ticks, plot),
    ...outside(input, washes(input.band, scale), plot),
    ...(scale.gap
      ? [
          {
            kind: 'rect',
            x: plot.left,
            y: plot.y(scale.gap.to),
            w: plot.right - plot.left,
            h: plot.y(scale.gap.from) - plot.y(scale.gap.to),
            fill: 'ground',
          } satisfies Shape,
        ]
      : []),
    ...curves.flatMap((curve, index) => curveLines(curve, index, plot)),
    ...doubtGroups(curves).map(({ weeks, low, high }): Shape => ({
      kind: 'rect',
      x: plot.x(weeks) - 6,
      y: plot.y(high) - 6,
      w: 12,
      h: plot.y(low) - plot.y(high) + 12,
      rx: 6,
      stroke: 'ink',
      width: 0.9,
      dash: [1.2, 2],
    })),
    ...curves.flatMap(({ series }) => leaving(series, input, scale.share, plot)),
    ...names(curves, plot),
    ...foot(page, plot),
  ]
}

function words(one: Omit<Words, 'kind' | 'weight' | 'anchor' | 'fill'> & Partial<Words>): Shape {
  return { weight: 430, anchor: 'start', fill: 'ink', ...one, kind: 'text' }
}

function grid(input: CurveInput, ticks: { value: number; share: number }[], plot: Plot): Shape[] {
  return ticks.flatMap(({ value, share }): Shape[] => [
    {
      kind: 'line',
      x1: plot.left,
      x2: plot.right,
      y1: plot.y(share),
      y2: plot.y(share),
      stroke: 'hair',
      width: 0.6,
    },
    words({
      x: plot.left - 5,
      y: plot.y(share) + 3,
      text: grouped(value, input.decimals),
      size: 8.5,
      anchor: 'end',
    }),
  ])
}

function outside({ band }: CurveInput, areas: [number, number][], plot: Plot): Shape[] {
  const shapes = areas.flatMap(([low, high]): Shape[] => {
    const [top, bottom] = [plot.y(Math.min(high, 1)), plot.y(Math.max(low, 0))]
    const edge = low === 0 ? top : bottom
    const outline: Point[] = [
      [plot.left, top],
      [plot.right, top],
      [plot.right, bottom],
      [plot.left, bottom],
    ]
    return [
      { kind: 'path', steps: stripes(outline, 5, 0.6, 'falling'), fill: 'rule' },
      { kind: 'line', x1: plot.left, x2: plot.right, y1: edge, y2: edge, stroke: 'ink', width: 1.5 },
    ]
  })
  return band ? [...shapes, ...bandWords(band.text, areas, plot)] : shapes
}

/** The band in words, on white so that hatching does not run through the letters. */
function bandWords(text: string, areas: [number, number][], plot: Plot): Shape[] {
  const last = areas.at(-1)
  if (!last) return []
  const isTwoSided = areas.length > 1
  const length = text.length * 4.9 + 8
  const edge = last[0] === 0 ? plot.y(last[1]) : plot.y(last[0])
  const x = isTwoSided ? plot.right - length : plot.left + 2
  const y = isTwoSided ? edge + 3 : edge - 14
  return [
    { kind: 'rect', x, y, w: length, h: 11.5, fill: 'ground' },
    words({ x: x + 4, y: y + 9, text, size: 8.5, weight: 650 }),
  ]
}

function steps(spots: Spot[], plot: Plot): Step[] {
  return spots.map(({ weeks, share }, index): Step => [index === 0 ? 'M' : 'L', plot.x(weeks), plot.y(share)])
}

function curveLines(curve: PlottedCurve, index: number, plot: Plot): Shape[] {
  const { series, measured, doubted, trend, forecast, confidence } = curve
  const width = series.kind === 'batch' ? 1.4 : heatLine(series.temperatureC) * 0.6
  const line = (spots: Spot[], dash?: [number, number]): Shape[] =>
    spots.length > 1
      ? [
          {
            kind: 'path',
            steps: steps(spots, plot),
            stroke: 'ink',
            width,
            join: 'round',
            ...(dash ? { dash } : {}),
          },
        ]
      : []
  const bounds = (['low', 'high'] as const).flatMap((side) =>
    confidence.length > 1
      ? [
          {
            kind: 'path',
            steps: steps(
              confidence.map((point) => ({ weeks: point.weeks, share: point[side] })),
              plot,
            ),
            stroke: 'soft',
            width: 0.6,
            dash: [1.5, 2],
          } satisfies Shape,
        ]
      : [],
  )
  const marker = markerOf(series, index)
  const marks = (spots: Spot[], stroke: 'ink' | 'soft') =>
    spots.flatMap(({ weeks, share }) =>
      stationMarkerShapes(marker, { x: plot.x(weeks), y: plot.y(share), size: 6, stroke }),
    )
  return [
    ...bounds,
    ...(trend.length > 0 ? [...line(trend), ...line(forecast, [5, 3])] : line(measured)),
    ...marks(measured, 'ink'),
    ...marks(doubted, 'soft'),
  ]
}

function leaving(
  series: CurveSeries,
  { band }: CurveInput,
  share: (value: number) => number,
  plot: Plot,
): Shape[] {
  const edge = nearerEdge(series, band?.lower, band?.upper)
  if (!series.leaves || edge === null) return []
  const [x, y] = [plot.x(series.leaves.weeks), plot.y(share(edge))]
  if (x > plot.right) return []
  const low = series.leaves.low === null ? x : plot.x(series.leaves.low)
  const high = series.leaves.high === null ? plot.right : Math.min(plot.right, plot.x(series.leaves.high))
  return [
    { kind: 'line', x1: low, x2: high, y1: y, y2: y, stroke: 'ink', width: 2.5 },
    { kind: 'circle', cx: x, cy: y, r: 3.5, fill: 'ink' },
  ]
}

function names(curves: PlottedCurve[], plot: Plot): Shape[] {
  const named = curves.filter(({ measured }) => measured.length > 0)
  const ys = spreadNames(
    named.map(({ name }) => plot.y(name.share) + 3),
    10,
    plot.top + 8,
    plot.bottom - 2,
  )
  return named.map(({ series, name }, index) =>
    words({
      x: plot.x(name.weeks) + 6,
      y: ys[index] ?? 0,
      text: curveName(series),
      size: 9,
      weight: series.temperatureC >= 40 ? 650 : 430,
    }),
  )
}

function foot({ ticks, markAt }: Page, plot: Plot): Shape[] {
  return [
    {
      kind: 'line',
      x1: plot.left,
      x2: plot.right,
      y1: plot.bottom,
      y2: plot.bottom,
      stroke: 'ink',
      width: 0.9,
    },
    ...ticks.flatMap(({ weeks, text }): Shape[] => [
      {
        kind: 'line',
        x1: plot.x(weeks),
        x2: plot.x(weeks),
        y1: plot.bottom,
        y2: plot.bottom + 4,
        stroke: 'ink',
        width: 0.9,
      },
      words({
        x: plot.x(weeks),
        y: plot.bottom + 14,
        text,
        size: 9,
        weight: weeks === markAt ? 700 : 430,
        anchor: 'middle',
      }),
    ]),
    ...(markAt === null
      ? []
      : [
          {
            kind: 'line',
            x1: plot.x(markAt),
            x2: plot.x(markAt),
            y1: plot.top,
            y2: plot.bottom,
            stroke: 'ink',
            width: 0.9,
          } satisfies Shape,
        ]),
  ]
}
