'use client'

import { useState } from 'react'
import type { ReactNode } from 'react'
import { colourOf, Drawn } from '../marks/drawn'
import { heatLine, heatWeight } from '../marks/heat'
import { stationMarkerShapes } from '../marks/station-marker-shapes'
import { StandingMark } from '../marks/standing-mark'
import type { CurveInput, CurveSeries, CurveTime } from './curve-data'
import { colourRole, curveName, markerOf } from './curve-geometry'
import { CurvePlot } from './curve-plot'
import { CurveTable } from './curve-table'
import { TimeRuler } from './time-ruler'
import { timeScale } from './time-scale'
import type { TimeScale } from './time-scale'
import { useWidth } from './use-width'

export type CurvesProps = CurveTime & {
  plots: CurveInput[]
  /** Heights of the plots; the first is the tallest where nothing is said. */
  heights?: number[]
  stickyTop?: number
  /** Drawn between ruler and plots on the same scale: the photo strip. */
  strip?: (scale: TimeScale, width: number) => ReactNode
  /** Puts a control about a series' name beside its plot: what it is computed from. */
  nameAs?: (input: CurveInput, series: CurveSeries, name: ReactNode) => ReactNode
}

/** The attributes of a study under one ruler, each with its band, trends and forecasts. */
export function Curves({ plots, heights, strip, nameAs, stickyTop = 0, ...time }: CurvesProps) {
  const [box, width] = useWidth<HTMLDivElement>(1360)
  const isNarrow = width < 760
  const zero = isNarrow ? 56 : 196
  const scale = timeScale(zero, width - (isNarrow ? 12 : 20), time.endWeeks)
  const points = [
    ...new Set(plots.flatMap(({ series }) => series.flatMap((one) => one.points.map(({ weeks }) => weeks)))),
  ].sort((a, b) => a - b)
  const isEndNamed = points.some((weeks) => Math.abs(weeks - time.endWeeks) < 0.5)
  return (
    <div ref={box} className="min-w-0">
      <div className="sticky z-20 bg-ground pt-1" style={{ top: stickyTop }}>
        <TimeRuler
          scale={scale}
          startOn={time.startOn}
          points={isEndNamed ? points : [...points, time.endWeeks]}
          todayWeeks={time.todayWeeks}
          width={width}
        />
      </div>
      {strip ? strip(scale, width) : null}
      {plots.map((input, index) => (
        <Plot
          key={input.title}
          input={input}
          time={time}
          width={width}
          scale={scale}
          height={heights?.[index] ?? (index === 0 ? 266 : 224)}
          isNarrow={isNarrow}
          nameAs={nameAs}
        />
      ))}
    </div>
  )
}

function Plot({
  input,
  time,
  width,
  scale,
  height,
  isNarrow,
  nameAs,
}: {
  input: CurveInput
  time: CurveTime
  width: number
  scale: TimeScale
  height: number
  isNarrow: boolean
  nameAs: CurvesProps['nameAs']
}) {
  const [isTable, setIsTable] = useState(false)
  const hasTag = input.series.some(({ leaves }) => leaves)
  const left = scale.zero - (isNarrow ? 14 : 22)
  return (
    <section aria-label={input.title} className={`relative pt-2 ${hasTag ? 'pb-10' : 'pb-4'}`}>
      <div className={isNarrow ? 'pb-2' : 'absolute top-2 left-0 z-10 w-[140px]'}>
        <h2 className="text-24 leading-tight font-650">{input.title}</h2>
        <p className="text-14 leading-snug text-soft">
          {input.unit.map((line) => (
            <span key={line} className={isNarrow ? 'mr-2' : 'block'}>
              {line}
            </span>
          ))}
        </p>
        {isNarrow && input.band ? <p className="text-14 font-600 text-alarm">{input.band.text}</p> : null}
        <ul className={isNarrow ? 'mt-1 flex flex-wrap gap-x-5' : 'mt-2'}>
          {input.series.map((series, index) =>
            series.beside ? null : (
              <Key
                key={series.id}
                series={series}
                index={index}
                nameAs={(name) => (nameAs ? nameAs(input, series, name) : name)}
              />
            ),
          )}
        </ul>
        <BesideKey names={[...new Set(input.series.flatMap(({ beside }) => beside ?? []))]} />
        <button
          type="button"
          className="min-h-9 text-left text-13 text-soft underline underline-offset-2"
          aria-expanded={isTable}
          onClick={() => setIsTable(!isTable)}
        >
          {isTable ? 'Put the table away' : 'Read as a table'}
        </button>
      </div>
      <CurvePlot
        input={input}
        time={time}
        frame={{ width, height, left, zero: scale.zero, end: scale.end }}
      />
      {isNarrow
        ? input.notes?.map((note) => (
            <p key={note.weeks} className={`text-14 ${hasTag ? 'relative top-8' : 'pt-1'}`}>
              {note.text}
            </p>
          ))
        : null}
      {isTable ? (
        <div className={hasTag ? 'pt-9' : 'pt-3'}>
          <CurveTable input={input} startOn={time.startOn} endWeeks={time.endWeeks} />
        </div>
      ) : null}
    </section>
  )
}

/** Soft lines of the same weights: what stands beside for comparison. */
function BesideKey({ names }: { names: string[] }) {
  if (names.length === 0) return null
  return (
    <p className="flex items-center gap-2.5 text-14 text-soft">
      <svg width={34} height={16} viewBox="-17 -8 34 16" aria-hidden className="block shrink-0">
        <path d="M-17 0H17" stroke="var(--soft)" strokeWidth={1.75} />
      </svg>
      {names.join(', ')}
    </p>
  )
}

type KeyProps = { series: CurveSeries; index: number; nameAs: (name: ReactNode) => ReactNode }

function Key({ series, index, nameAs }: KeyProps) {
  const role = colourRole(series)
  return (
    <li className="flex h-[30px] items-center gap-2.5 text-17 whitespace-nowrap">
      <svg width={34} height={16} viewBox="-17 -8 34 16" aria-hidden className="block shrink-0">
        <path
          d="M-17 0H17"
          stroke={colourOf(role)}
          strokeWidth={series.kind === 'freeze-thaw' ? 1.5 : heatLine(series.temperatureC)}
          strokeDasharray={series.kind === 'freeze-thaw' ? '6 4' : undefined}
        />
        <Drawn
          shapes={stationMarkerShapes(markerOf(series, index), {
            x: 0,
            y: 0,
            size: 10,
            stroke: role,
            fill: series.standing === 'out' ? 'alarm' : 'ground',
          })}
        />
      </svg>
      <span style={{ fontWeight: series.kind === 'batch' ? 600 : heatWeight(series.temperatureC) }}>
        {nameAs(curveName(series))}
      </span>
      <StandingMark standing={series.standing} size={16} title={series.standing} className="ml-auto" />
    </li>
  )
}
