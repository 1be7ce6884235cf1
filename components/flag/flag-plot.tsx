'use client'

import { grouped } from '@/lib/number/rules'
import { useState } from 'react'
import type { CurveInput } from '@/components/charts/curve-data'
import { curveScale, markerOf, nearerEdge } from '@/components/charts/curve-geometry'
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
  // Today's tag keeps within the plot's width.
  const isLate = todayWeeks !== null && todayWeeks <= endWeeks && todayWeeks > endWeeks * 0.85
  const scale = timeScale(left + 20, width - (isLate ? 48 : 16), endWeeks)
  // A wider plot writes its band and its notes itself.
  const isNarrow = width - left < 560
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
        <svg
          width={width}
          height={height}
          overflow="visible"
          className="pointer-events-none absolute inset-0"
          aria-hidden
        >
          {isNarrow ? <BandWords input={input} left={left} /> : null}
          {ring ? <Ring input={input} ring={ring} width={width} left={left} x={scale.x(ring.weeks)} /> : null}
        </svg>
      </div>
      <p className={`text-15 ${hasTag ? 'pt-9' : 'pt-2'}`}>
        <b>{input.title}</b>
        {caption}
      </p>
      {trend ? <p className="text-15">{trend}</p> : null}
      {(isNarrow ? input.notes : [])?.map((note) => (
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

/** What the band allows, in the wash beyond the edge that the series moves to. */
function BandWords({ input: { band, series, decimals }, left }: { input: CurveInput; left: number }) {
  const [first] = series
  const edge = first ? nearerEdge(first, band?.lower, band?.upper) : null
  if (!band || edge === null) return null
  const isLower = edge === band.lower
  const y = height * (1 - curveScale(series, band).share(edge))
  const isOneSided = typeof band.lower !== 'number' || typeof band.upper !== 'number'
  return (
    <text
      x={left + 8}
      y={isLower ? Math.min(y + 19, height - 6) : Math.max(y - 8, 16)}
      fontSize={14}
      fontWeight={600}
      style={{ fill: 'var(--alarm)', ...halo('var(--wash)') }}
    >
      {isOneSided ? band.text : `allowed ${isLower ? 'down' : 'up'} to ${grouped(edge, decimals || 1)}`}
    </text>
  )
}

/**
 * The reading in question: solid, ringed in ink, named at the end of a line. A series comes from the left and
 * goes on the way it went, so what lies against its direction to the right is free.
 */
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
  const scale = curveScale(input.series, input.band)
  const y = height * (1 - scale.share(ring.value))
  const [series] = input.series
  if (!series) return null
  const isRising = ring.value > (series.points[0]?.value ?? ring.value)
  const reach = isRising ? (y + 90 < height ? 64 : -64) : y > 90 ? -64 : 64
  const length = ring.text.length * 9
  const textX = Math.max(left + 8, Math.min(x - 14, width - length - 8))
  return (
    <g>
      <path d={`M${x} ${y + Math.sign(reach) * 16}V${y + reach}`} stroke="var(--ink)" strokeWidth={1.25} />
      <Drawn
        shapes={stationMarkerShapes(markerOf(series, 0), { x, y, size: 13, stroke: 'alarm', fill: 'alarm' })}
      />
      <circle cx={x} cy={y} r={15} fill="none" stroke="var(--ink)" strokeWidth={2.5} />
      <text
        x={textX}
        y={y + reach + (reach < 0 ? -6 : 17)}
        fontSize={17}
        fontWeight={700}
        style={{ fill: 'var(--alarm)', ...halo('var(--paper)') }}
      >
        {ring.text}
      </text>
    </g>
  )
}
