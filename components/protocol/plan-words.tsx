import { planChanges } from '@/lib/protocol/rules/changes'
import { askedAt, stationName } from '@/lib/protocol/rules/plan'
import { cycleText } from '@/lib/protocol/rules/words'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { capital, counted, listed } from '@/lib/study/rules/words'

/** Cycles, and what is not read everywhere: what the grid of jars cannot show. */
export function StationWords({ plan }: { plan: ProtocolPlan }) {
  const sentences = plan.stations.flatMap((station, index) => {
    const name = stationName(station, index)
    const cycle = station.cycle ? [`${capital(name)}: a cycle is ${cycleText(station.cycle)}.`] : []
    const leftOut = plan.attributes.flatMap(({ attribute }) => {
      const weeks = station.timePoints.filter(
        (week) => !askedAt(plan, station, week).some((one) => one.attribute === attribute),
      )
      if (weeks.length === 0) return []
      return [
        `${capital(name)}: ${attributeOf(attribute).label} is not read in ${counted(weeks.length, 'week')}: ${listed(weeks.map(String))}.`,
      ]
    })
    return [...cycle, ...leftOut]
  })
  if (sentences.length === 0) return null
  return (
    <ul className="mt-3 text-15">
      {sentences.map((sentence) => (
        <li key={sentence}>{sentence}</li>
      ))}
    </ul>
  )
}

export function Changes({ before, after }: { before: ProtocolPlan; after: ProtocolPlan }) {
  const changes = planChanges(before, after)
  if (changes.length === 0) return <p>Nothing yet: it is a copy.</p>
  return (
    <ul className="ml-5 list-disc">
      {changes.map((sentence) => (
        <li key={sentence}>{sentence}</li>
      ))}
    </ul>
  )
}
