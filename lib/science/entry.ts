import { bandUsed, nearerEdge, toleranceBand } from './band'
import { assessSeries } from './drift'
import { assertFinite, assertNumbers } from './guard'
import { doubtsOf } from './judge-day'
import { mean, rangeOf } from './mean'
import type { Evidence, RuleFinding, SeriesInput } from './series'
import { bandShare, torqueDoubtWithin, torqueErrorPercent } from './viscosity'

/** A value as it stands on the pull screen, before it is saved. */
export type Entry = {
  time: number
  values: number[]
  /** Viscosity read as torque. */
  torquePercent?: number
  /** Entered as the repeat of a doubted reading: then it is only looked at for the torque and its own spread. */
  isRepeat?: boolean
}

/**
 * What speaks against a value at once: beyond the band, away from where the series leads, replicates too far apart,
 * torque where the instrument cannot be trusted. Judged against the series as it stands, so that saving the value
 * gives the same doubts. Empty where nothing does.
 */
export function doubtOnEntry(input: SeriesInput, entry: Entry): RuleFinding[] {
  assertFinite('time', entry.time)
  assertNumbers('values', entry.values, 1)
  const initial = mean(input.initial)
  const band = toleranceBand(input.tolerance, initial)
  const earlier = assessSeries({
    ...input,
    readings: input.readings.filter((reading) => reading.time < entry.time),
  }).points.filter((point) => point.counted)
  const candidate = {
    time: entry.time,
    mean: mean(entry.values),
    replicates: entry.values.length,
    range: rangeOf(entry.values),
  }
  const settled = new Set(entry.isRepeat ? ['out', 'jump'] : [])
  const found = doubtsOf(candidate, settled, earlier, band, input.repeatabilitySd).map(
    ({ rule, evidence }): RuleFinding => ({
      rule,
      level: 'doubt',
      at: entry.time,
      evidence: { ...evidence, used: bandUsed(band, initial, candidate.mean) },
    }),
  )
  const torque = torqueEvidence(entry, nearerEdge(band, initial), candidate.mean)
  if (torque) found.push({ rule: 'torque', level: 'doubt', at: entry.time, evidence: torque })
  return found
}

function torqueEvidence(entry: Entry, room: number, value: number): Evidence | null {
  const { torquePercent } = entry
  if (torquePercent === undefined || value === 0) return null
  const reason = torqueDoubtWithin(torquePercent, room, value)
  if (reason === null) return null
  return {
    torquePercent,
    errorPercent: torqueErrorPercent(torquePercent),
    bandPercent: bandShare(room, value) ?? null,
    reason,
  }
}
