import { Drawn } from '../marks/drawn'
import { stationMarkerShapes } from '../marks/station-marker-shapes'
import type { CurveInput, CurvePlace, CurveTime } from './curve-data'
import { doubtGroups, markerOf, nearerEdge, washes } from './curve-geometry'
import type { CurveScale, PlottedCurve } from './curve-geometry'
import { CurveNames } from './curve-names'
import { halo } from './halo'
import { dayAfter, dayName } from './time-scale'

/** What is written and drawn over a plot: the band's edges, today, doubts, leaving dates, names. */
export function CurveMarks({
  input,
  curves,
  scale,
  time,
  place,
}: {
  input: CurveInput
  curves: PlottedCurve[]
  scale: CurveScale
  time: CurveTime
  place: CurvePlace
}) {
  const { todayWeeks, endWeeks } = time
  const today = todayWeeks !== null && todayWeeks >= 0 && todayWeeks <= endWeeks ? todayWeeks : null
  const areas = washes(input.band, scale)
  const behind = (share: number) =>
    areas.some(([low, high]) => share >= low && share <= high) ? 'var(--wash)' : 'var(--paper)'
  return (
    <svg
      width={place.right}
      height={place.bottom}
      overflow="visible"
      className="pointer-events-none absolute inset-0"
      aria-hidden
    >
      <BandEdges input={input} scale={scale} place={place} />
      {today !== null ? (
        <path d={`M${place.x(today)} ${place.top}V${place.bottom}`} stroke="var(--ink)" strokeWidth={1.25} />
      ) : null}
      <Doubts input={input} curves={curves} place={place} />
      {curves.map((curve) => (
        <Leaving key={curve.series.id} curve={curve} input={input} scale={scale} place={place} time={time} />
      ))}
      <CurveNames
        curves={curves.filter(({ series }) => !series.beside)}
        place={place}
        today={today}
        behind={behind}
      />
    </svg>
  )
}

function BandEdges({
  input: { band },
  scale,
  place,
}: {
  input: CurveInput
  scale: CurveScale
  place: CurvePlace
}) {
  const edges = [band?.lower, band?.upper].filter((edge): edge is number => typeof edge === 'number')
  const textEdge = band?.upper ?? band?.lower
  const textY = typeof textEdge === 'number' ? place.y(scale.share(textEdge)) : 0
  const isInsideBelow = typeof band?.upper === 'number' && typeof band.lower === 'number'
  return (
    <>
      {scale.gap && !place.isNarrow ? (
        <text
          x={place.right - 8}
          y={place.top + 18}
          fontSize={13}
          textAnchor="end"
          style={{ fill: 'var(--soft)', ...halo('var(--wash)') }}
        >
          above the gap the scale is {scale.gap.times} times smaller
        </text>
      ) : null}
      {edges.map((edge) => (
        <path
          key={edge}
          d={`M${place.left} ${place.y(scale.share(edge))}H${place.right}`}
          stroke="var(--alarm)"
          strokeWidth={2}
        />
      ))}
      {band && typeof textEdge === 'number' && !place.isNarrow ? (
        <text
          x={isInsideBelow ? place.right - 8 : place.left + 8}
          y={typeof band.upper !== 'number' ? textY + 17 : isInsideBelow ? textY + 17 : textY - 8}
          fontSize={14}
          fontWeight={600}
          textAnchor={isInsideBelow ? 'end' : 'start'}
          style={{ fill: 'var(--alarm)' }}
        >
          {band.text}
        </text>
      ) : null}
    </>
  )
}

/** Readings that take no part stay where they were read, in soft, ringed by dots, with their reason. */
function Doubts({ input, curves, place }: { input: CurveInput; curves: PlottedCurve[]; place: CurvePlace }) {
  return (
    <>
      {curves.map(({ series, doubted }, index) =>
        doubted.map(({ weeks, share }) => (
          <Drawn
            key={`${series.id}-${weeks}-${share}`}
            shapes={stationMarkerShapes(markerOf(series, index), {
              x: place.x(weeks),
              y: place.y(share),
              size: 7.5,
              stroke: 'soft',
            })}
          />
        )),
      )}
      {doubtGroups(curves).map(({ weeks, low, high }) => {
        const [x, top, bottom] = [place.x(weeks), place.y(high) - 10, place.y(low) + 10]
        const note = place.isNarrow ? undefined : input.notes?.find((one) => one.weeks === weeks)
        return (
          <g key={weeks}>
            <rect
              x={x - 10}
              y={top}
              width={20}
              height={bottom - top}
              rx={10}
              fill="none"
              stroke="var(--ink)"
              strokeWidth={1.5}
              strokeDasharray="2 3"
            />
            {note ? (
              <>
                <path
                  d={`M${x} ${top}V${top - 16}H${x + 18}`}
                  fill="none"
                  stroke="var(--ink)"
                  strokeWidth={1.25}
                />
                <text x={x + 24} y={top - 11} fontSize={15} style={halo('var(--paper)')}>
                  {note.text}
                </text>
              </>
            ) : null}
          </g>
        )
      })}
    </>
  )
}

function Leaving({
  curve: { series },
  input: { band },
  scale,
  place,
  time,
}: {
  curve: PlottedCurve
  input: CurveInput
  scale: CurveScale
  place: CurvePlace
  time: CurveTime
}) {
  const leaves = series.leaves
  const edge = nearerEdge(series, band?.lower, band?.upper)
  if (!leaves || edge === null || place.x(leaves.weeks) > place.right) return null
  const y = place.y(scale.share(edge))
  const x = place.x(leaves.weeks)
  const x1 = leaves.low === null ? x : place.x(leaves.low)
  const isOpen = leaves.high === null || place.x(leaves.high) > place.right
  const x2 = isOpen || leaves.high === null ? place.right : place.x(leaves.high)
  const isRising = edge === band?.upper
  const tagX = Math.min(Math.max(x, place.left + 58), place.right - 58)
  const day = dayName(dayAfter(time.startOn, leaves.weeks), true)
  return (
    <g>
      <path d={`M${x} ${y}V${place.bottom + 6}`} stroke="var(--alarm)" strokeWidth={2} />
      <path d={`M${x1} ${y}H${x2}`} stroke="var(--alarm)" strokeWidth={5} />
      <path
        d={`M${x1} ${y - 8}v16${isOpen ? '' : `M${x2} ${y - 8}v16`}`}
        stroke="var(--alarm)"
        strokeWidth={2.5}
      />
      <circle cx={x} cy={y} r={7} fill="var(--alarm)" />
      <rect x={tagX - 56} y={place.bottom + 4} width={112} height={25} rx={3} fill="var(--alarm)" />
      <text
        x={tagX}
        y={place.bottom + 22}
        fontSize={16}
        fontWeight={700}
        textAnchor="middle"
        style={{ fill: 'var(--onink)' }}
      >
        {day}
      </text>
      {place.isNarrow || leaves.low === null || x1 - 60 < place.left ? null : (
        <text
          x={x1 - 8}
          y={isRising ? y - 9 : y + 18}
          fontSize={14}
          textAnchor="end"
          style={{ fill: 'var(--alarm)', ...halo('var(--wash)') }}
        >
          {dayName(dayAfter(time.startOn, leaves.low))}
        </text>
      )}
      {place.isNarrow || isOpen || leaves.high === null || x2 + 60 > place.right ? null : (
        <text
          x={x2 + 8}
          y={isRising ? y + 18 : y - 9}
          fontSize={14}
          style={{ fill: 'var(--alarm)', ...halo('var(--paper)') }}
        >
          {dayName(dayAfter(time.startOn, leaves.high))}
        </text>
      )}
    </g>
  )
}
