import type { FlagPage } from '@/lib/flag/queries/one'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted, shownWithUnit } from '@/lib/study/rules/words'
import { dayAt, share } from './flag-headline'

/** The rule in plain words, and the numbers that it fired on. */
export function howRaised(flag: FlagPage): { rule: string; numbers: string } {
  const { evidence } = flag
  const value = (key: string) => {
    const number = evidence[key]
    return typeof number === 'number' ? shownWithUnit(flag, number) : 'not known'
  }
  const side = evidence.side === 'lower' ? 'below' : 'above'
  switch (flag.rule) {
    case 'out':
      if (flag.level === 'out') {
        return {
          rule: 'out counts once a repeat on a spare jar, and the mean of the two, lie beyond the band as well.',
          numbers: `Here ${value('mean')} against an edge of ${value('edge')}, ${value('by')} ${side} it; ${confirmed(evidence.confirmedBy)}.`,
        }
      }
      return typeof evidence.repeat === 'number'
        ? {
            rule: 'two jars of one day may differ by no more than repeats explain; beyond that a third decides.',
            numbers: `Here ${value('mean')} and ${value('repeat')} lie ${value('difference')} apart, where repeats explain ${value('allowed')}.`,
          }
        : {
            rule: 'a reading beyond the band stays a doubt, and the standing as it was, until a second jar says the same.',
            numbers: `Here it is ${value('by')} ${side} the edge of ${value('edge')}.`,
          }
    case 'edge':
      return {
        rule: '80 % of the way from the initial to the edge is used.',
        numbers: `Here ${value('mean')}, from ${value('initial')} towards ${value('edge')}: ${share(evidence.used)}.`,
      }
    case 'lean':
      return {
        rule: 'a line through at least five times slopes more than chance explains, has used half of the band now and will have used most of it when the study ends.',
        numbers: leanNumbers(flag),
      }
    case 'onset':
      return {
        rule: 'separation above what can be told from none, on two jars of one day or in two pulls in a row.',
        numbers: `Here ${value('percent')} against ${value('detectionLimit')}, in ${evidence.seenIn}${typeof evidence.since === 'number' ? `, since ${dayAt(flag, evidence.since)}` : ''}.`,
      }
    case 'jump':
      return {
        rule: 'a reading further from its own line than the line can be trusted.',
        numbers: `Here ${value('mean')}, where ${evidence.from ?? 'the line'} leads to ${value('expected')}.`,
      }
    case 'spread':
      return {
        rule: 'replicates of one jar lie further apart than repeats explain.',
        numbers: `Here ${value('range')} apart.`,
      }
    case 'common shift':
      return {
        rule: 'on one day one instrument reads to the same side of the stations’ own lines nearly everywhere, the coldest too.',
        numbers: shiftNumbers(evidence),
      }
    default:
      return {
        rule: 'a reading compares only under the conditions of the initial, with an instrument that can be trusted.',
        numbers: flag.sentence,
      }
  }
}

/** What the flag carries stays as it was on its day. */
export function raisedSentence(flag: FlagPage, raisedOn: string): string {
  return `The flag carries these numbers; they stay as they were on ${spokenDay(raisedOn, false)}.`
}

function confirmed(count: unknown): string {
  if (typeof count !== 'number' || count === 0) return 'a person set the doubt aside, so that it counts'
  return `${counted(count, 'repeat confirms', 'repeats confirm')} it`
}

function leanNumbers(flag: FlagPage): string {
  const { times, slope, slopeP, usedNow, usedAtEnd, endTime, comparedWith } = flag.evidence
  const parts = [
    `Here ${times} times`,
    typeof slope === 'number' ? `${signed(slope, flag)} a week` : '',
    typeof slopeP === 'number' ? `p ${slopeP < 0.001 ? 'under 0.001' : slopeP.toFixed(3)}` : '',
    `${share(usedNow)} used now, ${share(usedAtEnd)} in week ${endTime}`,
  ].filter(Boolean)
  const against =
    comparedWith === 'difference'
      ? ' It also moves away from the coldest station, which the heat alone explains.'
      : ''
  return `${parts.join(', ')}.${against}`
}

function signed(slope: number, flag: FlagPage): string {
  const size = Math.abs(slope)
  const digits = size >= 100 ? 0 : size >= 1 ? 1 : 3
  return `${slope < 0 ? '−' : '+'}${size.toFixed(digits)}${flag.unit ? ` ${flag.unit}` : ''}`
}

function shiftNumbers(evidence: FlagPage['evidence']): string {
  const { residuals, beyondOne, median } = evidence
  const places = Array.isArray(residuals) ? residuals.length : 0
  const middle =
    typeof median === 'number' ? `, in the middle ${Math.abs(median).toFixed(1)} times their scatter` : ''
  return capital(`${beyondOne ?? 'some'} of ${places} places stand clearly to one side${middle}.`)
}
