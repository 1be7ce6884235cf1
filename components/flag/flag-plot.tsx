'use client'

import { useState } from 'react'
import type { CurveInput } from '@/components/charts/curve-data'
import { colourRole, curveScale, markerOf } from '@/components/charts/curve-geometry'
import { CurvePlot } from '@/components/charts/curve-plot'
import { CurveTable } from '@/components/charts/curve-table'
import { halo } from '@/components/charts/halo'
import { TimeRuler } from '@/components/charts/time-ruler'
import { timeScale } from '@/components/charts/time-scale'
import { useWidth } from '@/components/charts/use-width'
import { Drawn } from '@/components/marks/drawn'
import { stationMarkerShapes } from '@/components/marks/station-marker-shapes'

type Props = {
  input: CurveInput
  startOn: string
  endWeeks: number
  todayWeeks: number | null
  ring: { weeks: number; value: number; text: string } | null
  /** Under the plot: method and initial. */
  caption: string
  /** How it moves: "−1.9 % a week since the start". */
  trend: string | null
}

const height = 340

/** The series that the flag is about, under the study's ruler, with the reading ringed. */
export function FlagPlot({ input, startOn, endWeeks, todayWeeks, ring, caption, trend }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(520)
  const [isTable, setIsTable] = useState(false)
  const left = 56
  const scale = timeScale(left + 20, width - 16, endWeeks)
  const points = [...new Set(input.series.flatMap((one) => one.points.map((point) => point.weeks)))].sort(
    (a, b) => a - b,
  )
  const last = points.at(-1) ?? 0
  const time = { startOn, endWeeks, todayWeeks }
  const hasTag = input.series.some(({ leaves }) => leaves)
  return (
    <div ref={box} className="min-w-0">
      <TimeRuler
        scale={scale}
        startOn={startOn}
        points={endWeeks - last < 0.5 ? points : [...points, endWeeks]}
        todayWeeks={todayWeeks}
        width={width}
      />
      <div className="relative">
        <CurvePlot
          input={input}
          time={time}
          frame={{ width, height, left, zero: scale.zero, end: scale.end }}
        />
        {ring ? <Ring input={input} ring={ring} width={width} left={left} x={scale.x(ring.weeks)} /> : null}
      </div>
      <p className={`text-15 ${hasTag ? 'pt-9' : 'pt-2'}`}>
        <b>{input.title}</b>
        {caption}
      </p>
      {input.band ? <p className="text-15 font-600 text-alarm">{input.band.text}</p> : null}
      {trend ? <p className="text-15">{trend}</p> : null}
      {input.notes?.map((note) => (
        <p key={note.weeks} className="text-14 text-soft">
          {note.text}
        </p>
      ))}
      <button
        type="button"
        data-screen-only
        className="min-h-9 text-left text-13 text-soft underline underline-offset-2"
        aria-expanded={isTable}
        onClick={() => setIsTable(!isTable)}
      >
        {isTable ? 'Put the table away' : 'Read as a table'}
      </button>
      {isTable ? <CurveTable input={input} startOn={startOn} endWeeks={endWeeks} /> : null}
    </div>
  )
}

/** The reading in question: solid, ringed in ink, named at the end of a line that keeps clear of its trend. */
function Ring({
  input,
  ring,
  width,
  left,
  x,
}: {
  input: CurveInput
  ring: NonNullable<Props['ring']>
  width: number
  left: number
  x: number
}) {
  const y = height * (1 - curveScale(input.series, input.band).share(ring.value))
  const series = input.series[0]
  if (!series) return null
  const role = colourRole(series)
  const isLow = y > height * 0.4
  const reach = isLow ? -70 : 70
  const textY = y + reach + (isLow ? -6 : 17)
  const half = ring.text.length * 4.6
  const textX = Math.min(Math.max(x, left + half + 8), width - half - 8)
  return (
    <svg
      width={width}
      height={height}
      overflow="visible"
      className="pointer-events-none absolute inset-0"
      aria-hidden
    >
      <path d={`M${x} ${y + Math.sign(reach) * 16}V${y + reach}`} stroke="var(--ink)" strokeWidth={1.25} />
      <Drawn
        shapes={stationMarkerShapes(markerOf(series, 0), { x, y, size: 13, stroke: 'alarm', fill: 'alarm' })}
      />
      <circle cx={x} cy={y} r={15} fill="none" stroke="var(--ink)" strokeWidth={2.5} />
      <text
        x={textX}
        y={textY}
        fontSize={17}
        fontWeight={700}
        textAnchor="middle"
        style={{ fill: role === 'soft' ? 'var(--ink)' : `var(--${role})`, ...halo('var(--paper)') }}
      >
        {ring.text}
      </text>
    </svg>
  )
}
