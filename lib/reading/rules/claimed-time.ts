import { refuse } from '@/lib/http/errors'

/** A device's clock further off than this is marked on what it recorded. */
const farOffMs = 15 * 60_000

export type Claim = { deviceNow: string; claimedAt: string }

/** What is told within two minutes happened now: the server's time is the record. */
const nowWithinMs = 120_000

/** When something was done that is told as it is done: now, or the earlier time that the person or a kept entry gives. */
export function doneAt(
  claim: { claimedAt?: string | undefined; deviceNow?: string | undefined },
  now: string,
) {
  if (!claim.claimedAt) return now
  const { measuredAt } = claimedInstant(
    { claimedAt: claim.claimedAt, deviceNow: claim.deviceNow ?? now },
    now,
  )
  return Date.parse(now) - Date.parse(measuredAt) < nowWithinMs ? now : measuredAt
}

/**
 * When it happened, by the server's clock: what the device claims, moved by how far the device is off, and never
 * later than now. `clock` says so where it was far off.
 */
export function claimedInstant(
  claim: Claim,
  now: string,
): { measuredAt: string; clock: { skewSeconds: number } | null } {
  const skewMs = Date.parse(now) - Date.parse(claim.deviceNow)
  const corrected = Date.parse(claim.claimedAt) + skewMs
  return {
    measuredAt: new Date(Math.min(corrected, Date.parse(now))).toISOString(),
    clock: Math.abs(skewMs) > farOffMs ? { skewSeconds: Math.round(skewMs / 1000) } : null,
  }
}

/** A time read off paper is no device's: it stands as it is written, and lies before now. */
export function paperInstant(claimedAt: string, now: string): { measuredAt: string; clock: null } {
  if (Date.parse(claimedAt) <= Date.parse(now))
    return { measuredAt: new Date(claimedAt).toISOString(), clock: null }
  const sentence = 'The time on paper lies ahead of now. Type when the jar was really measured.'
  throw refuse.invalid(sentence, { claimedAt: sentence })
}
