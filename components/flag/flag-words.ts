import type { FlagLine } from '@/lib/flag/queries/list'
import type { FlagPage } from '@/lib/flag/queries/one'
import { nextWords } from '@/lib/flag/rules/list'
import type { FlagCause } from '@/lib/flag/schema'
import type { AttributeKey } from '@/lib/reading/schema/attributes'
import type { Standing } from '@/components/marks/standing-shapes'

export const causeWords: Record<FlagCause, string> = {
  product: 'The product changes',
  measurement: 'The measurement',
  instrument: 'The instrument',
  station: 'The station',
  'not known': 'Not known yet',
}

export function causeText(cause: string | null): string {
  return cause === null ? '' : (causeWords[cause as FlagCause] ?? cause)
}

type Leveled = Pick<FlagLine, 'level' | 'rule'>

/** The level as one says it: what it is at now, or what only wants a look. */
export function levelWord({ level, rule }: Leveled): string {
  if (level !== 'flag') return level
  if (rule === 'onset') return 'begun'
  return rule === 'edge' ? 'near its edge' : 'a look'
}

/** The jar that says it; what leaves the standing as it was has none. */
export function levelStanding({ level }: Pick<FlagLine, 'level'>): Standing | null {
  if (level === 'out' || level === 'leaning') return level
  return level === 'doubt' ? 'untold' : null
}

/** Who has the next word about a flag, and whether that is one of this person's roles. */
export function whoIsNext(
  flag: Pick<FlagLine, 'state' | 'level' | 'voice' | 'closedBy' | 'closedAt' | 'answeredBy'>,
  rights: { mayAnswer: boolean; mayCloseOut: boolean },
): { text: string; isMine: boolean } {
  const isMine = flag.state === 'answered' ? rights.mayCloseOut : flag.state === 'open' && rights.mayAnswer
  return { text: nextWords(flag), isMine }
}

/** The noun for what an attribute is read with. */
export function instrumentNoun(attribute: string): string {
  const nouns: Partial<Record<AttributeKey, string>> = {
    viscosity: 'viscometer',
    ph: 'pH meter',
    mass: 'balance',
  }
  return nouns[attribute as AttributeKey] ?? 'instrument'
}

/** What the flag is about as a number: what it was raised with, or the reading itself. */
export function flaggedValue({
  evidence,
  readingValue,
}: Pick<FlagPage, 'evidence' | 'readingValue'>): number | null {
  for (const key of ['mean', 'percent']) {
    const value = evidence[key]
    if (typeof value === 'number') return value
  }
  return readingValue
}

/** Downwards from the initial: by its evidence, its value or its slope. */
export function isDownwards(flag: FlagPage): boolean {
  const { side, slope } = flag.evidence
  if (typeof side === 'string') return side === 'lower'
  if (typeof slope === 'number') return slope < 0
  const value = flaggedValue(flag)
  const initial = flag.series?.finding.initial
  return value !== null && initial !== undefined && value < initial
}

/** A number is parted neither from its unit nor at its thin gap at the end of a line. */
export function whole(text: string): string {
  return text
    .replace(/\u2009/g, '\u2060\u2009\u2060')
    .replace(/(\d) (%|°C|mPa·s|rpm|days?|times)/g, '$1\u00a0$2')
}
