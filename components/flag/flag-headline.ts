import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import type { FlagPage } from '@/lib/flag/queries/one'
import { addDays, spokenDay } from '@/lib/study/rules/calendar'
import { inSentence, type Phrase } from '@/lib/study/rules/finding'
import { listed, shownWithUnit } from '@/lib/study/rules/words'
import { stationText } from '@/lib/flag/rules/list'
import { flaggedValue, instrumentNoun, isDownwards } from './flag-words'
import { instrumentVerdict } from './instrument-verdict'

/** What happened, where, and how sure it is: the finding that someone must answer. */
export function flagHeadline(flag: FlagPage): Phrase[] {
  if (flag.rule === 'common shift') return shiftHeadline(flag)
  const verdict = instrumentVerdict(flag.sameInstrument)
  const tail =
    flag.instrumentCode && verdict === 'steady'
      ? [plain(`; the ${instrumentNoun(flag.attribute)} is steady`)]
      : flag.instrumentCode && verdict === 'moved'
        ? [plain(`; the ${instrumentNoun(flag.attribute)} read off elsewhere too`)]
        : []
  switch (flag.rule) {
    case 'out':
      return flag.level === 'out'
        ? [...opened(flag), plain(', '), strong('out'), plain(' of its band'), ...tail]
        : [
            ...opened(flag),
            plain(typeof flag.evidence.repeat === 'number' ? ', two jars differ' : ', not confirmed yet'),
            ...tail,
          ]
    case 'edge':
      return [...opened(flag), plain(`, ${share(flag.evidence.used)} of its band used`), ...tail]
    case 'lean':
      return [...opened(flag), ...leaving(flag)]
    case 'onset':
      return [plain('Begins to come apart'), ...place(flag)]
    case 'jump':
      return [
        plain(attributeName(flag.attribute)),
        ...place(flag),
        plain(' read far from its own line'),
        ...tail,
      ]
    case 'spread':
      return [plain(`Readings of ${inSentence(flag.attribute)}`), ...place(flag), plain(' lie too far apart')]
    default:
      return [plain(attributeName(flag.attribute)), ...place(flag), plain(` ${doubtWords(flag.rule)}`)]
  }
}

/** Under the headline: the number against its band, and what else moved. */
export function flagSentence(flag: FlagPage): string {
  const others = [jarsSentence(flag), instrumentSentence(flag)].filter(Boolean).join(', and ')
  return [valueSentence(flag), others ? `${capitalised(others)}.` : ''].filter(Boolean).join(' ')
}

function opened(flag: FlagPage): Phrase[] {
  return [plain(verbOf(flag)), ...place(flag)]
}

function verbOf(flag: FlagPage): string {
  const isDown = isDownwards(flag)
  switch (flag.attribute) {
    case 'separation':
      return 'Comes apart'
    case 'viscosity':
      return isDown ? 'Thins' : 'Thickens'
    case 'ph':
      return isDown ? 'pH falls' : 'pH rises'
    case 'mass':
      return isDown ? 'Loses mass' : 'Gains mass'
    case 'look':
      return 'Looks changed'
    case 'odour':
      return 'Smells changed'
    case 'leakage':
      return 'Leaks'
    case 'panelling':
      return 'The pack caves in'
    case 'pump':
      return 'The pump falters'
    default:
      return `${attributeName(flag.attribute)} ${isDown ? 'falls' : 'rises'}`
  }
}

function place(flag: FlagPage): Phrase[] {
  if (flag.studyStationId === null) return []
  return [plain(flag.isFreezeThaw ? ' in ' : ' at '), strong(stationText(flag))]
}

function leaving(flag: FlagPage): Phrase[] {
  const { leavesAt } = flag.evidence
  if (typeof leavesAt !== 'number') return [plain(' and leans')]
  return [plain(' and leaves its band about '), strong(dayAt(flag, leavesAt, true))]
}

function shiftHeadline(flag: FlagPage): Phrase[] {
  return [
    strong(flag.instrumentCode ?? 'One instrument'),
    plain(` read ${inSentence(flag.attribute)} ${flag.evidence.direction ?? 'off'} everywhere on `),
    strong(flag.onDay ? spokenDay(flag.onDay) : 'one day'),
  ]
}

function doubtWords(rule: string): string {
  switch (rule) {
    case 'torque':
      return 'was read outside the range of its spindle'
    case 'calibration':
      return 'was read with an instrument that wants calibrating'
    case 'later check':
      return 'was read before its instrument proved bad'
    case 'conditions':
      return 'was measured otherwise than at the start'
    case 'place':
      return 'was read from a jar that stood elsewhere'
    case 'cycle':
      return 'was read after a cycle cut short'
    case 'type':
      return 'changed its emulsion type'
    default:
      return 'may not compare'
  }
}

function valueSentence(flag: FlagPage): string {
  const value = flaggedValue(flag)
  if (value === null || flag.rule === 'common shift') return flag.sentence
  const text = shownWithUnit(flag, value)
  const on = flag.readOn ? ` on ${spokenDay(flag.readOn, false)}` : ''
  const { edge, side, used, detectionLimit, expected, repeat } = flag.evidence
  const limit =
    typeof edge === 'number'
      ? `allowed ${side === 'lower' ? 'down' : 'up'} to ${shownWithUnit(flag, edge)}`
      : ''
  if (typeof repeat === 'number')
    return `${text} and ${shownWithUnit(flag, repeat)} in two jars, further apart than repeats explain; a third decides.`
  if (flag.rule === 'out') return `${capitalised(text)}${on}, ${limit}.`
  if (typeof used === 'number') return `${capitalised(text)}${on} has used ${share(used)} of its band.`
  if (typeof detectionLimit === 'number')
    return `${text}${on}, above the ${shownWithUnit(attributeOf('separation'), detectionLimit)} that can be told from none.`
  if (typeof expected === 'number')
    return `${text}${on}, where its own line leads to ${shownWithUnit(flag, expected)}.`
  if (flag.rule === 'lean') return leanSentence(flag)
  return flag.sentence
}

function leanSentence(flag: FlagPage): string {
  const { usedNow, leavesAtLow, leavesAtHigh, times } = flag.evidence
  const limits =
    typeof leavesAtLow === 'number' && typeof leavesAtHigh === 'number'
      ? ` and leaves it between ${dayAt(flag, leavesAtLow)} and ${dayAt(flag, leavesAtHigh)}, at 95 % confidence`
      : typeof leavesAtLow === 'number'
        ? `, and leaves it on ${dayAt(flag, leavesAtLow)} at the earliest`
        : ''
  return `Its trend through ${times} times has used ${share(usedNow)} of the band${limits}.`
}

function jarsSentence(flag: FlagPage): string {
  const others = flag.sameJar.filter((row) => row.attribute !== flag.attribute)
  if (others.length === 0) return ''
  const beyond = [...new Set(others.filter((row) => row.isBeyond).map((row) => inSentence(row.attribute)))]
  return beyond.length > 0
    ? `${listed(beyond)} ${beyond.length === 1 ? 'is' : 'are'} beyond the band as well`
    : 'nothing else in the pull left its band'
}

function instrumentSentence(flag: FlagPage): string {
  if (!flag.instrumentCode) return ''
  const verdict = instrumentVerdict(flag.sameInstrument)
  if (verdict === 'steady') return `nothing else on ${flag.instrumentCode} moved that day`
  return verdict === 'moved' ? `others on ${flag.instrumentCode} moved to the same side that day` : ''
}

export function dayAt(flag: Pick<FlagPage, 'startedOn'>, weeks: number, withYear = false): string {
  return spokenDay(addDays(flag.startedOn, Math.round(weeks * 7)), withYear)
}

export function share(value: unknown): string {
  return typeof value === 'number' ? `${Math.round(value * 100)} %` : 'a part'
}

/** pH keeps its small letter. */
function capitalised(text: string): string {
  return text.startsWith('pH') ? text : text.charAt(0).toUpperCase() + text.slice(1)
}

function plain(text: string): Phrase {
  return { text, isStrong: false }
}

function strong(text: string): Phrase {
  return { text, isStrong: true }
}
