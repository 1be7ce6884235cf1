/** A device's clock further off than this is marked on what it recorded. */
const farOffMs = 15 * 60_000

export type Claim = { deviceNow: string; claimedAt: string }

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
