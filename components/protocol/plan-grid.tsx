'use client'

import { Drawn } from '@/components/marks/drawn'
import { heatLine } from '@/components/marks/heat'
import { jarShapes } from '@/components/marks/jar-shapes'
import { moveShapes } from '@/components/marks/place'
import { StationLabel } from '@/components/ui/station-label'
import {
  askedAt,
  askedWeeks,
  pullLabel,
  stationName,
  variantOf,
  weeksOfPlan,
} from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'

type Props = {
  plan: ProtocolPlan
  /** Only where this is read; every pull where left out. */
  reads?: AttributeKey | undefined
  /** Present while the plan is a draft: presses put a pull in or take it out. */
  onToggle?: (station: number, week: number) => void
}

/** The plan as it will stand: each station a shelf, a jar at each of its time points. */
export function PlanGrid({ plan, reads, onToggle }: Props) {
  const weeks = weeksOfPlan(plan)
  if (plan.stations.length === 0) return <p className="text-soft">No station yet.</p>
  return (
    <div className="relative overflow-x-auto" role="region" aria-label="Plan" tabIndex={0}>
      <table className="border-collapse text-15">
        <caption className="sr-only">Stations by time points</caption>
        <thead>
          <tr>
            <th scope="col" className="w-[130px] pb-1 text-left text-13 font-430 text-soft">
              {plan.endWeeks > 52 ? 'month' : 'week'}
            </th>
            {weeks.map((week) => (
              <th key={week} scope="col" className="min-w-[44px] pb-1 text-center font-650">
                {plan.endWeeks > 52 && week % 13 === 0 ? (week / 13) * 3 : week}
              </th>
            ))}
            <th scope="col" className="pb-1 pl-4 text-left text-13 font-430 whitespace-nowrap text-soft">
              jars a batch
            </th>
          </tr>
        </thead>
        <tbody>
          {plan.stations.map((station, index) => (
            <tr key={index}>
              <th
                scope="row"
                className={`${variantOf(station) ? 'h-[78px]' : 'h-[58px]'} pr-3 text-left align-bottom`}
                style={shelf(station)}
              >
                <StationLabel
                  celsius={station.kind === 'temperature' ? station.temperatureC : null}
                  name={station.kind === 'transport' ? 'on road' : undefined}
                  size={34}
                />
                {variantOf(station) ? (
                  <span className="block text-13 font-430 text-soft">{variantOf(station)}</span>
                ) : null}
              </th>
              {weeks.map((week) => (
                <td key={week} className="h-[58px] p-0 text-center align-bottom" style={shelf(station)}>
                  <Place
                    station={station}
                    index={index}
                    week={week}
                    plan={plan}
                    reads={reads}
                    onToggle={onToggle}
                  />
                </td>
              ))}
              <td className="min-w-[150px] pl-4 align-bottom text-14 text-soft xl:whitespace-nowrap">
                {jarsText(plan, station)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

function Place({
  station,
  index,
  week,
  plan,
  reads,
  onToggle,
}: {
  station: PlannedStation
  index: number
  week: number
  plan: ProtocolPlan
  reads: AttributeKey | undefined
  onToggle?: Props['onToggle']
}) {
  const isPulled = station.timePoints.includes(week)
  const isRead =
    isPulled && (!reads || askedAt(plan, station, week).some(({ attribute }) => attribute === reads))
  const label = [
    stationName(station, index),
    isPulled ? pullLabel(station, week, plan.endWeeks) : `week ${week}`,
    ...(reads ? [attributeName(reads)] : []),
  ].join(', ')
  if (reads && !isPulled) return null
  const drawing = (
    <svg viewBox="-16 -36 32 37" width={32} height={37} className="mx-auto block" aria-hidden>
      {isPulled || onToggle ? (
        <Drawn shapes={moveShapes(jarShapes({ height: 32, state: isRead ? 'drawn' : 'planned' }), 0, 0)} />
      ) : null}
    </svg>
  )
  if (!onToggle) {
    return isPulled ? (
      <span aria-label={isRead ? label : `${label}, left out`} role="img" className="block">
        {drawing}
      </span>
    ) : null
  }
  return (
    <button
      type="button"
      aria-pressed={isRead}
      aria-label={label}
      className="block min-h-[44px] w-full min-w-[44px] content-end"
      onClick={() => onToggle(index, week)}
    >
      {drawing}
    </button>
  )
}

function shelf(station: PlannedStation) {
  const isCold = station.temperatureC === null
  return {
    borderBottom: isCold
      ? '1.5px dashed var(--ink)'
      : `${heatLine(station.temperatureC!)}px solid var(--ink)`,
  }
}

function jarsText(plan: ProtocolPlan, station: PlannedStation): string {
  const { watchJars, measuringJarsPerPull, spares, voice, windowDays } = station
  const measuring = measuringJarsPerPull * askedWeeks(plan, station, 'measuring').length
  return `${watchJars} watch, ${measuring} measuring, ${spares} spare; ${voice}, window ${windowDays} d`
}
