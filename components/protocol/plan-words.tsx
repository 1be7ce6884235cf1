import { planChanges } from '@/lib/protocol/rules/changes'
import { askedAt, stationName } from '@/lib/protocol/rules/plan'
import { cycleText } from '@/lib/protocol/rules/words'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { capital, listed } from '@/lib/study/rules/words'

/** Cycles, and what is not read everywhere: what the grid of jars cannot show. */
export function StationWords({ plan }: { plan: ProtocolPlan }) {
  const cycles = plan.stations.flatMap((station, index) =>
    station.cycle ? [`${capital(stationName(station, index))}: a cycle is ${cycleText(station.cycle)}.`] : [],
  )
  const sentences = [...cycles, ...plan.attributes.flatMap(({ attribute }) => leftOutWords(plan, attribute))]
  if (sentences.length === 0) return null
  return (
    <ul className="mt-3 text-15">
      {sentences.map((sentence) => (
        <li key={sentence}>{sentence}</li>
      ))}
    </ul>
  )
}

/** Stations that leave out the same weeks are named together. */
function leftOutWords(plan: ProtocolPlan, attribute: AttributeKey): string[] {
  const places = new Map<string, string[]>()
  plan.stations.forEach((station, index) => {
    const weeks = station.timePoints.filter(
      (week) => !askedAt(plan, station, week).some((one) => one.attribute === attribute),
    )
    if (weeks.length === 0) return
    const text = `${weeks.length === 1 ? 'week' : 'weeks'} ${listed(weeks.map(String))}`
    places.set(text, [...(places.get(text) ?? []), stationName(station, index)])
  })
  return [...places].map(
    ([weeks, names]) => `${attributeName(attribute)} is not read in ${weeks} at ${names.join('; ')}.`,
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
