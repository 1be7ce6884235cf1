'use client'

import { useWidth } from '@/components/charts/use-width'
import { heatLine } from '@/components/marks/heat'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { orderOf, type CycleState } from '@/lib/cycle/rules/state'

type Props = { place: CyclePlace; state: CycleState }

const [warmY, coldY, height] = [12, 46, 74]

/**
 * The cycles as the jars live them: down in the cold, up in the warm, dashed as freeze-thaw is everywhere and as heavy
 * as it is hot. What was done is ink, what is to come dotted; a half cut short or overdue is alarm.
 */
export function CycleWave({ place, state }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(700)
  const halves = Array.from({ length: place.cycles * 2 }, (_, index) => ({
    cycle: Math.floor(index / 2) + 1,
    half: index % 2 === 0 ? ('cold' as const) : ('warm' as const),
  }))
  const step = (width - 8) / Math.max(1, halves.length)
  return (
    <div ref={box} className="min-w-0">
      <svg width={width} height={height} className="block" role="img" aria-label={spoken(place, state)}>
        {halves.map((half, index) => {
          const x = 4 + index * step
          const y = half.half === 'cold' ? coldY : warmY
          const line = heatLine((half.half === 'cold' ? place.cycleLowC : place.cycleHighC) ?? 5) + 1
          const done = place.steps.find((one) => orderOf(one) === orderOf(half))
          const isNow = state.kind === 'running' && orderOf(state) === orderOf(half)
          const share = isNow ? Math.min(1, state.hours / (state.askedHours ?? state.hours * 2)) : 0
          const isAlarm = done ? isShort(place, done) : isNow && state.isOverdue
          const colour = isAlarm ? 'var(--alarm)' : 'var(--ink)'
          return (
            <g key={`${half.cycle} ${half.half}`}>
              {index > 0 ? (
                <path
                  d={`M${x} ${warmY}V${coldY}`}
                  stroke={done || isNow ? 'var(--ink)' : 'var(--rule)'}
                  strokeWidth="1"
                  strokeDasharray={done || isNow ? undefined : '1 4'}
                />
              ) : null}
              {done ? (
                <path d={`M${x} ${y}h${step}`} stroke={colour} strokeWidth={line} strokeDasharray="7 4" />
              ) : (
                <path
                  d={`M${x + share * step} ${y}h${(1 - share) * step}`}
                  stroke="var(--rule)"
                  strokeWidth="1.5"
                  strokeLinecap="round"
                  strokeDasharray="0.01 5"
                />
              )}
              {isNow ? (
                <>
                  <path
                    d={`M${x} ${y}h${share * step}`}
                    stroke={colour}
                    strokeWidth={line}
                    strokeDasharray="7 4"
                  />
                  <circle cx={x + share * step} cy={y} r="6" fill={colour} />
                </>
              ) : null}
              {half.half === 'cold' ? (
                <text
                  x={x + step}
                  y={height - 4}
                  fontSize={16}
                  textAnchor="middle"
                  fontWeight={state.kind !== 'over' && state.cycle === half.cycle ? 700 : 430}
                  style={{ fill: done || isNow ? 'var(--ink)' : 'var(--soft)' }}
                >
                  {half.cycle}
                </text>
              ) : null}
            </g>
          )
        })}
      </svg>
    </div>
  )
}

function isShort(place: CyclePlace, step: CyclePlace['steps'][number]): boolean {
  const hours = (Date.parse(step.endedAt) - Date.parse(step.begunAt)) / 3_600_000
  return shortfalls(place, { ...step, hours }, place.asked ?? undefined).length > 0
}

function spoken({ cycles, steps }: CyclePlace, state: CycleState): string {
  const whole = steps.filter((step) => step.half === 'warm').length
  const now =
    state.kind === 'over'
      ? 'all are over'
      : `${state.kind === 'running' ? 'running' : 'next'}: ${state.half} half of cycle ${state.cycle}`
  return `${whole} of ${cycles} cycles are whole; ${now}`
}
