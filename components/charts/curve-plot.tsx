'use client'

import { grouped } from '@/lib/number/rules'
import { useId } from 'react'
import type { Key } from 'react'
import { Area, ComposedChart, Line, Tooltip, XAxis, YAxis } from 'recharts'
import { colourOf, Drawn } from '../marks/drawn'
import { heatLine } from '../marks/heat'
import { stationMarkerShapes } from '../marks/station-marker-shapes'
import type { CurveFrame, CurveInput, CurvePlace, CurveSeries, CurveTime } from './curve-data'
import { colourRole, curveName, curveScale, markerOf, plotCurve } from './curve-geometry'
import type { PlottedCurve } from './curve-geometry'
import { CurveGround } from './curve-ground'
import { CurveMarks } from './curve-marks'
import { dayAfter, dayName, timeLabel, unitOf } from './time-scale'

type Row = { weeks: number } & Record<string, number | [number, number] | undefined>

/** One attribute over time: readings, trend, confidence band, forecast, band and leaving date. */
export function CurvePlot({ input, time, frame }: { input: CurveInput; time: CurveTime; frame: CurveFrame }) {
  const id = useId().replace(/[^a-zA-Z0-9]/g, '')
  const scale = curveScale(input.series, input.band)
  const curves = input.series.map((series) => plotCurve(series, scale, time.endWeeks))
  const rows = rowsOf(curves)
  const perWeek = (frame.end - frame.zero) / (time.endWeeks || 1)
  const from = -(frame.zero - frame.left) / perWeek
  const to = time.endWeeks + (frame.width - frame.end) / perWeek
  const texts = new Map(scale.ticks.map(({ value, share }) => [share, grouped(value, input.decimals)]))
  const place: CurvePlace = {
    left: frame.left,
    right: frame.width,
    top: 0,
    bottom: frame.height,
    x: (weeks) => frame.zero + weeks * perWeek,
    y: (share) => frame.height * (1 - share),
    isNarrow: frame.width - frame.left < 560,
  }
  return (
    <div className="relative" style={{ height: frame.height }}>
      <CurveGround input={input} scale={scale} place={place} />
      <ComposedChart
        width={frame.width}
        height={frame.height}
        data={rows}
        margin={{ top: 0, right: 0, bottom: 0, left: 0 }}
        className="absolute! inset-0 [&_svg]:overflow-visible"
        title={input.title}
      >
        <defs>
          <Hatch id={`${id}-alarm`} colour="var(--alarm)" />
          <Hatch id={`${id}-ink`} colour="var(--soft)" />
        </defs>
        <XAxis type="number" dataKey="weeks" domain={[from, to]} hide allowDataOverflow />
        <YAxis
          type="number"
          domain={[0, 1]}
          width={frame.left}
          axisLine={false}
          tickLine={false}
          interval={0}
          ticks={scale.ticks.map(({ share }) => share)}
          tickFormatter={(share: number) => texts.get(share) ?? ''}
          tick={{ fontSize: 14, fill: 'var(--ink)' }}
        />
        {curves.map((curve) => (
          <Area
            key={`c-${curve.series.id}`}
            dataKey={`c-${curve.series.id}`}
            stroke="none"
            fill={`url(#${id}-${colourRole(curve.series) === 'alarm' ? 'alarm' : 'ink'})`}
            fillOpacity={colourRole(curve.series) === 'alarm' ? 0.5 : 0.2}
            isAnimationActive={false}
            connectNulls
            activeDot={false}
            tooltipType="none"
          />
        ))}
        {curves.flatMap((curve, index) => {
          const line = curve.series.kind === 'freeze-thaw' ? 1.5 : heatLine(curve.series.temperatureC)
          const colour = colourOf(colourRole(curve.series))
          const hasTrend = curve.trend.length > 0
          const shared = {
            stroke: colour,
            dot: false,
            activeDot: false,
            isAnimationActive: false,
            connectNulls: true,
            tooltipType: 'none',
          } as const
          return [
            <Line
              key={`t-${curve.series.id}`}
              dataKey={`t-${curve.series.id}`}
              strokeWidth={line}
              {...shared}
            />,
            <Line
              key={`f-${curve.series.id}`}
              dataKey={`f-${curve.series.id}`}
              strokeWidth={line * 0.85}
              strokeDasharray="9 6"
              {...shared}
            />,
            <Line
              key={`v-${curve.series.id}`}
              dataKey={`v-${curve.series.id}`}
              {...shared}
              stroke={hasTrend ? 'none' : colour}
              strokeWidth={line}
              strokeDasharray={curve.series.kind === 'freeze-thaw' ? '9 5' : undefined}
              dot={(dot: { cx?: number; cy?: number; key?: Key | null }) => (
                <Marker key={dot.key} series={curve.series} index={index} x={dot.cx} y={dot.cy} />
              )}
            />,
          ]
        })}
        <Tooltip
          isAnimationActive={false}
          wrapperStyle={{ zIndex: 10 }}
          cursor={{ stroke: 'var(--rule)', strokeWidth: 1 }}
          content={({ label, active }) =>
            active && typeof label === 'number' ? (
              <Readings series={input.series} weeks={label} time={time} />
            ) : null
          }
        />
      </ComposedChart>
      <CurveMarks input={input} curves={curves} scale={scale} time={time} place={place} />
    </div>
  )
}

function Hatch({ id, colour }: { id: string; colour: string }) {
  return (
    <pattern id={id} width={6} height={6} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
      <rect width={2} height={6} fill={colour} />
    </pattern>
  )
}

function Marker({ series, index, x, y }: { series: CurveSeries; index: number; x?: number; y?: number }) {
  if (typeof x !== 'number' || typeof y !== 'number' || Number.isNaN(y)) return null
  const role = colourRole(series)
  const shapes = stationMarkerShapes(markerOf(series, index), {
    x,
    y,
    size: 9,
    stroke: role,
    fill: series.standing === 'out' ? 'alarm' : 'paper',
  })
  return <Drawn shapes={shapes} />
}

function rowsOf(curves: PlottedCurve[]): Row[] {
  const rows = new Map<number, Row>()
  const put = (weeks: number, key: string, value: number | [number, number]) => {
    const row = rows.get(weeks) ?? { weeks }
    rows.set(weeks, Object.assign(row, { [key]: value }))
  }
  for (const { series, measured, trend, forecast, confidence } of curves) {
    for (const { weeks, share } of measured) put(weeks, `v-${series.id}`, share)
    for (const { weeks, share } of trend) put(weeks, `t-${series.id}`, share)
    for (const { weeks, share } of forecast) put(weeks, `f-${series.id}`, share)
    for (const { weeks, low, high } of confidence) put(weeks, `c-${series.id}`, [low, high])
  }
  return [...rows.values()].sort((a, b) => a.weeks - b.weeks)
}

function Readings({ series, weeks, time }: { series: CurveSeries[]; weeks: number; time: CurveTime }) {
  const unit = unitOf(time.endWeeks)
  const found = series.flatMap((one) =>
    one.points.filter((point) => point.weeks === weeks).map((point) => ({ one, point })),
  )
  if (found.length === 0) return null
  return (
    <div className="rounded bg-ink px-3 py-2 text-14 text-onink">
      <p className="text-13">
        {unit} {timeLabel(weeks, unit)} ({dayName(dayAfter(time.startOn, weeks))})
      </p>
      {found.map(({ one, point }, index) => (
        <p key={`${one.id}-${index}`}>
          {curveName(one)} <b>{point.text}</b>
          {point.doubt ? `, in doubt: ${point.doubt}` : ''}
        </p>
      ))}
    </div>
  )
}
