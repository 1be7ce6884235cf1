import type { Evidence, RuleFinding } from './series'

/** How a series is spoken of: its names and how its numbers and times are written, unit included. */
export type SentenceContext = {
  /** "45 °C" or "freeze-thaw". */
  station: string
  /** As inside a sentence: "viscosity", "pH". */
  attribute: string
  /** "39 300 mPa·s". */
  value: (value: number) => string
  /** "week 8 (27 Apr)". */
  when: (time: number) => string
  /** Distances are said in percent of the edge (viscosity) instead of units (pH, percentages). */
  isRelative?: boolean
}

/** A context that writes plain numbers, for `calc` and tests; pages bring their own formats. */
export function plainContext(station: string, attribute: string, unit = '', decimals = 2): SentenceContext {
  const tail = unit === '' ? '' : ` ${unit}`
  return {
    station,
    attribute,
    value: (value) => `${value.toFixed(decimals)}${tail}`,
    when: (time) => `week ${Number(time.toFixed(1))}`,
  }
}

/** What a rule found, in one or two sentences that say what happened, where, and what to do. */
export function sentenceOf(finding: RuleFinding, context: SentenceContext): string {
  const { evidence } = finding
  const { station, value, when } = context
  const subject = `${capitalised(context.attribute)} at ${station}`
  const n = (key: string) => numberIn(evidence, key)
  switch (finding.rule) {
    case 'out':
      return finding.level === 'out'
        ? outSentence(subject, evidence, context)
        : unconfirmed(subject, evidence, context)
    case 'edge':
      return `${subject} has used ${percent(n('used'))} of its band: ${value(n('mean'))}.`
    case 'lean':
      return `${subject} is leaning: its trend has used ${percent(n('usedNow'))} of the band${leaving(evidence, context)}.`
    case 'onset':
      return `Separation has begun at ${station}: ${value(n('percent'))} in ${when(finding.at)}, above the ${value(n('detectionLimit'))} that can be told from none, in ${evidence.seenIn}.`
    case 'jump':
      return typeof evidence.repeat === 'number'
        ? jarsDiffer(subject, evidence, context)
        : `${subject} read ${value(n('mean'))}, where ${evidence.from} leads to ${value(n('expected'))}. Measure again on a spare jar.`
    case 'spread':
      return typeof evidence.repeat === 'number'
        ? jarsDiffer(subject, evidence, context)
        : `The replicates of ${context.attribute} at ${station} lie ${value(n('range'))} apart, more than repeats explain. Measure again.`
    case 'torque':
      return `${evidence.reason}. Check spindle and speed against the initial.`
  }
}

function outSentence(subject: string, evidence: Evidence, context: SentenceContext): string {
  const confirmed = numberIn(evidence, 'confirmedBy') > 0 ? ', confirmed by a repeat' : ''
  return `${subject} is out of its band: ${context.value(numberIn(evidence, 'mean'))}, ${allowed(evidence, context)}${confirmed}.`
}

function unconfirmed(subject: string, evidence: Evidence, context: SentenceContext): string {
  if (typeof evidence.repeat === 'number') return jarsDiffer(subject, evidence, context)
  return `${subject} is ${distance(evidence, context)} the band. Measure a second jar before anyone worries.`
}

function jarsDiffer(subject: string, evidence: Evidence, context: SentenceContext): string {
  const first = context.value(numberIn(evidence, 'mean'))
  const repeat = context.value(numberIn(evidence, 'repeat'))
  return `${subject} read ${first} and ${repeat} in two jars, further apart than repeats explain. Measure a third; the median will count.`
}

function allowed(evidence: Evidence, context: SentenceContext): string {
  return `allowed ${evidence.side === 'lower' ? 'down' : 'up'} to ${context.value(numberIn(evidence, 'edge'))}`
}

function distance(evidence: Evidence, context: SentenceContext): string {
  const by = numberIn(evidence, 'by')
  const edge = numberIn(evidence, 'edge')
  const side = evidence.side === 'lower' ? 'below' : 'above'
  const far =
    context.isRelative && edge !== 0 ? `${((100 * by) / Math.abs(edge)).toFixed(1)} %` : context.value(by)
  return `${far} ${side}`
}

function leaving(evidence: Evidence, context: SentenceContext): string {
  if (typeof evidence.leavesAt !== 'number') {
    return ` and will have used ${percent(numberIn(evidence, 'usedAtEnd'))} when the study ends`
  }
  const { leavesAtLow: low, leavesAtHigh: high } = evidence
  const limits =
    typeof low === 'number' && typeof high === 'number'
      ? `, at the earliest ${context.when(low)}, at the latest ${context.when(high)}`
      : typeof low === 'number'
        ? `, at the earliest ${context.when(low)}`
        : ''
  return ` and leaves it about ${context.when(evidence.leavesAt)}${limits}`
}

function percent(share: number): string {
  return `${Math.round(100 * share)} %`
}

function numberIn(evidence: Evidence, key: string): number {
  const value = evidence[key]
  if (typeof value !== 'number') throw new TypeError(`The evidence has no number "${key}"`)
  return value
}

/** pH keeps its small letter. */
function capitalised(words: string): string {
  return /^[a-z][A-Z]/.test(words) ? words : words.charAt(0).toUpperCase() + words.slice(1)
}
