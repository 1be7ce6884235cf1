import { mean } from './mean'
import { isUsable, type PullDay } from './pull-day'
import { isAbove } from './rounding'
import type { RuleFinding } from './series'

/**
 * Separation has begun: above its detection limit on two jars of one day, or in two pulls in a row. A lag gives the
 * trend no time to warn, so this flag does not wait for it, nor for a repeat: it asks for two sightings itself.
 */
export function onsetOf(days: readonly PullDay[], detectionLimit: number): RuleFinding | null {
  let previous: number | null = null
  for (const day of days) {
    const jars = new Map<string, number>()
    for (const reading of day.readings.filter(isUsable)) {
      jars.set(reading.jar, Math.max(jars.get(reading.jar) ?? -Infinity, mean(reading.values)))
    }
    if (jars.size === 0) continue
    const above = [...jars.values()].filter((percent) => isAbove(percent, detectionLimit))
    if (above.length >= 2 || (above.length === 1 && previous !== null)) {
      return {
        rule: 'onset',
        level: 'flag',
        at: day.time,
        readingId: day.readings[0]!.id,
        evidence: {
          percent: Math.max(...above),
          detectionLimit,
          seenIn: above.length >= 2 ? 'two jars' : 'two pulls in a row',
          since: previous ?? day.time,
        },
      }
    }
    previous = above.length === 1 ? day.time : null
  }
  return null
}
