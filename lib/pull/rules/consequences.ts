import type { AttributeKey } from '@/lib/reading/schema/attributes'
import { inSentence } from '@/lib/study/rules/finding'
import { counted, listed } from '@/lib/study/rules/words'
import { stationWords } from '@/lib/series/rules/spoken'

type Missed = {
  asks: string
  label: string
  temperatureC: number | null
  isFreezeThaw: boolean
  variant: string
  stationName: string
  /** Jars of the same batch that are asked the same in this pull. */
  others: number
  /** Later pulls that the jar is missing from with this one. */
  later: number
  /** Time points with a reading, by attribute; the initial is one. */
  points: Record<string, number>
}

/** What a jar that is not read means for the series it belongs to. Attributes with the same fate share a sentence. */
export function consequences(missed: Missed, attributes: readonly AttributeKey[]): string[] {
  const station = stationWords({ ...missed, name: missed.stationName })
  const when = missed.label.charAt(0).toUpperCase() + missed.label.slice(1)
  const later = missed.later > 0 ? [`It is missing from ${counted(missed.later, 'later pull')} as well.`] : []
  if (missed.others > 0) {
    const names = listed(attributes.map(inSentence))
    const rest = missed.others === 1 ? 'the other jar' : `the other ${missed.others} jars`
    return [`${when} of ${names} at ${station} rests on ${rest} of this pull.`, ...later]
  }
  const counts = [...new Set(attributes.map((key) => missed.points[key] ?? 0))].toSorted((a, b) => b - a)
  const sentences = counts.map((count) => {
    const names = attributes.filter((key) => (missed.points[key] ?? 0) === count).map(inSentence)
    const trend = names.length === 1 ? 'the trend goes' : 'the trends go'
    const rest = count === 0 ? 'it would have been the first' : `${trend} on with ${counted(count, 'point')}`
    return `${when} of ${listed(names)} at ${station} will have no reading; ${rest}.`
  })
  return [...sentences, ...later]
}
