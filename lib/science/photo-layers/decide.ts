import {
  apartFromBeside,
  apartInLight,
  brightness,
  changesBeside,
  coloursOf,
  lightSlope,
  type Edge,
  type Segment,
} from './segments'
import type { Profile } from './profile'
import type { PhotoLines } from './propose'

export type Sureness = 'sure' | 'look again' | 'shows nothing'

type Decision = { sureness: Sureness; reasons: string[]; lines: PhotoLines | null }

export function decide(
  profile: Profile,
  within: { top: number; bottom: number },
  edges: readonly Edge[],
): Decision {
  const jar = within.bottom - within.top
  const reasons: string[] = []
  const near = 0.008 * jar
  const inJar = edges.filter(({ at }) => at > within.top + 0.03 * jar && at < within.bottom + 0.05 * jar)
  // The jar's own foot: the last edge about where its sides end.
  const last = inJar.findLast(({ at }) => at > within.bottom - 0.06 * jar)
  const bottom = last?.at ?? within.bottom
  const inner = inJar.filter(({ at }) => at < bottom - 0.5 * near)
  const marks = [within.top, ...inner.map(({ at }) => at), bottom]
  const segments: Segment[] = marks.slice(1).map((to, i) => ({ from: marks[i]!, to }))
  const colours = segments.map((s) => coloursOf(profile, padded(s)))
  const length = (s: Segment) => s.to - s.from

  const footMost = 0.085 * jar
  const footLeast = 0.012 * jar
  // The emulsion: of all colours the one that takes most rows of the jar, what it encloses counted in part (a label). The
  // lid and what lies in the foot are none.
  let best: { score: number; rows: number; same: boolean[] } | null = null
  for (let i = 1; i < segments.length; i += 1) {
    if (length(segments[i]!) < 0.04 * jar || bottom - segments[i]!.from < footMost) continue
    const slope = lightSlope(profile, padded(segments[i]!))
    const same = segments.map((s, j) => {
      if (j === 0 || length(s) <= near || bottom - s.from <= footMost) return false
      const rowsOff = (s.from + s.to - segments[i]!.from - segments[i]!.to) / 2
      const gain = Math.max(0.8, Math.min(1.25, 1 + slope * rowsOff))
      return j === i || apartInLight(colours[i]!, colours[j]!, gain, 0.04) < 10
    })
    const rows = segments.reduce((sum, s, j) => sum + (same[j] ? length(s) : 0), 0)
    const span = segments[same.lastIndexOf(true)]!.to - segments[same.indexOf(true)]!.from
    const seenThrough = 1 - Math.min(1, apartFromBeside(profile, padded(segments[i]!)) / 40)
    const score =
      (rows + 0.6 * (span - rows)) * (0.5 + brightness(colours[i]!) / 255) * (1 - 0.3 * seenThrough)
    if (!best || score > best.score) best = { score, rows, same }
  }
  if (!best || best.rows < 0.15 * jar)
    return {
      sureness: 'look again',
      reasons: ['No part of the jar is even enough to be the emulsion.'],
      lines: null,
    }
  const first = best.same.indexOf(true)
  const end = best.same.lastIndexOf(true)
  const topEdge = segments[first]!.from
  const bottomEdge = segments[end]!.to

  // Above it: oil, headspace, lid.
  const above = segments.slice(0, first).filter((s) => length(s) > near)
  const restBelow = bottom - bottomEdge
  if (above.length <= 1 && restBelow < 0.018 * jar)
    return { sureness: 'shows nothing', reasons: ['The jar is one colour from lid to foot.'], lines: null }

  let fillTop = topEdge
  if (above.length >= 2) {
    const candidates = above.slice(1)
    const distances = candidates.map((s) => apartFromBeside(profile, padded(s)))
    let headspace = distances.indexOf(Math.min(...distances))
    if (headspace < candidates.length - 2) {
      reasons.push('More than one layer lies above the emulsion.')
      headspace = candidates.length - 2
    }
    if (headspace === candidates.length - 1) fillTop = topEdge
    else fillTop = candidates[headspace]!.to
    const sorted = distances.toSorted((a, b) => a - b)
    if (candidates.length > 1 && sorted[0]! > 0.6 * sorted[1]!)
      reasons.push('Oil and headspace look alike here.')
  } else reasons.push('No headspace can be made out above the fill.')

  // Below it: water, foot.
  let base = bottomEdge
  const reach = Math.max(3, Math.round(jar * 0.009))
  const inFoot = inner.filter(
    ({ at }) => at > bottomEdge + near && bottom - at < footMost && bottom - at > footLeast,
  )
  // What changes beside the jar as well is seen through its foot.
  const own = inFoot.filter(({ at, strength }) => changesBeside(profile, at, reach) < 0.5 * strength)
  const seen = inFoot[0]
  const isLayer =
    seen !== undefined &&
    apartFromBeside(profile, padded({ from: bottomEdge, to: seen.at })) >
      Math.max(40, 1.6 * apartFromBeside(profile, padded({ from: seen.at, to: bottom })))
  const options = own.length > 0 || (restBelow <= footMost && !isLayer) ? own : inFoot
  if (options.length === 0 && inFoot.length > 0)
    reasons.push('Something shows in the foot of the jar that may be a layer.')
  const most = Math.max(...options.map(({ strength }) => strength))
  const strongest = options.find(({ strength }) => strength > 0.3 * most)
  if (restBelow > footMost) {
    if (strongest) base = strongest.at
    else {
      base = bottom
      reasons.push('The foot of the jar cannot be told from what is in it.')
    }
  } else if (strongest) {
    base = strongest.at
    reasons.push('A thin layer at the foot may be the glass itself.')
  }
  const fill = base - fillTop
  const strengthAt = (row: number) => edges.find(({ at }) => at === row)?.strength ?? 0
  const isBetween = (from: number, to: number) =>
    inner.some(({ at, strength }) => at > from + 2 * near && at < to - 2 * near && strength > 8)
  const isBeside = (row: number) =>
    inner.some(({ at }) => at !== row && at < bottomEdge + near && Math.abs(at - row) < 0.025 * fill)
  const emulsion = coloursOf(profile, { from: topEdge, to: bottomEdge })
  const looksAlike = (from: number, to: number) =>
    apartInLight(coloursOf(profile, padded({ from, to })), emulsion, 1, 0.22) < 12
  if (isBetween(fillTop, topEdge) || isBetween(bottomEdge, base))
    reasons.push('More edges show in a layer than a layer has.')
  if (topEdge - fillTop + base - bottomEdge > 0.45 * fill)
    reasons.push('The layers would be more than nearly half of the fill.')
  if ([fillTop, topEdge, bottomEdge].some((row) => strengthAt(row) < 16)) reasons.push('An edge is faint.')
  if (isBeside(fillTop) && fillTop === topEdge) reasons.push('A thin film may lie on the fill.')
  if (
    (topEdge > fillTop && looksAlike(fillTop, topEdge)) ||
    (bottomEdge < base && looksAlike(bottomEdge, base))
  )
    reasons.push('A layer and the emulsion look alike.')
  if (
    options.some(
      ({ at, strength }) => strength > 0.4 * strengthAt(base) && Math.abs(at - base) > 0.014 * fill,
    )
  )
    reasons.push('Two lines could be the base.')
  return {
    sureness: reasons.length === 0 ? 'sure' : 'look again',
    reasons,
    lines: { fillTop, topEdge, bottomEdge, base },
  }
}

/** Without the rows next to its edges, which mix two colours. */
function padded({ from, to }: Segment): Segment {
  const by = Math.min(4, (to - from) / 4)
  return { from: from + by, to: to - by }
}
