import type { Actor } from '@/lib/auth/actor'
import { refuse } from '@/lib/http/errors'
import { attributeName } from '@/lib/reading/schema/attributes'
import type { Entry, JarToLog } from '@/lib/reading/schema/entry'
import type { KeptEntry, PullJar } from '../queries/pull-jar'

/**
 * Whether this was kept before, so that it is answered and nothing is written. An entry that is on record under
 * another jar, by another person or with other letters is no repeat, and is refused.
 */
export function isKeptBefore(jar: PullJar, actor: Actor, input: JarToLog): boolean {
  for (const kept of jar.keptEntries) {
    if (kept.pullJarId !== jar.id || kept.recordedBy !== actor.personId) {
      throw refuse.conflict(
        'One of these readings was kept before, for another jar. Reload, then enter it anew.',
      )
    }
    const sent = input.readings.find((one) => one.id === kept.id)!
    const isTyped = sent.typed === kept.typed
    if (isTyped && isHowKept(sent, kept)) continue
    const label = attributeName(kept.attribute)
    const how = isTyped ? ', with another instrument or under other conditions' : ''
    throw refuse.conflict(
      `${label} of jar ${jar.code} is on record as "${kept.typed}"${how}. Correct that reading, with the reason, instead of sending it anew.`,
      { kind: 'reading', readingId: kept.id },
    )
  }
  if (jar.keptEntries.length < input.readings.length) return false
  if (input.readings.length === 0) return jar.state === 'done' && jar.closedBy === actor.personId
  return input.isPartial || jar.state === 'done'
}

/** What belongs to the number is the same too, as far as it is said in single words and numbers. */
function isHowKept(sent: Entry, kept: KeptEntry): boolean {
  const isSame = ([key, value]: [string, unknown]) =>
    typeof value === 'object' || value === undefined || kept.detail[key] === value
  return (sent.instrumentId ?? null) === kept.instrumentId && Object.entries(sent.detail).every(isSame)
}
