import { attributeOf, type AttributeKey, type Attribute } from '@/lib/reading/schema/attributes'
import { shownWithUnit, withVariant } from '@/lib/study/rules/words'
import { sentenceOf, type SentenceContext } from '@/lib/science/sentence'
import type { RuleFinding } from '@/lib/science/series'
import { addDays, dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { degrees, inSentence } from '@/lib/study/rules/finding'
import type { Frame, FrameStation } from '../queries/frame'

export function stationWords(
  station: Pick<FrameStation, 'isFreezeThaw' | 'temperatureC' | 'name' | 'variant'>,
): string {
  if (station.isFreezeThaw) return withVariant('freeze-thaw', station.variant)
  const name = station.temperatureC === null ? station.name : degrees(station.temperatureC)
  return withVariant(name, station.variant)
}

/** How the rules' sentences name a series of this study. */
export function sentenceContext(
  study: Pick<Frame['study'], 'startedAt' | 'zone' | 'plan'>,
  station: FrameStation,
  attribute: AttributeKey,
): SentenceContext {
  const known = attributeOf(attribute, study.plan)
  const startedOn = dayIn(study.zone, study.startedAt)
  return {
    station: stationWords(station),
    attribute: inSentence(attribute),
    value: (value) => shownWithUnit(known, value),
    when: (time) =>
      `week ${Math.round(time)} (${spokenDay(addDays(startedOn, Math.round(time * 7)), false)})`,
    isRelative: attribute === 'viscosity',
  }
}

/** What a rule found in this study's words. A step between words is no distance, so it is not told as one. */
export function ruleSentence(rule: RuleFinding, context: SentenceContext, attribute: Attribute): string {
  const { mean, repeat } = rule.evidence
  if (attribute.key === 'type' && rule.rule === 'out') {
    return `The emulsion at ${context.station} has turned over, ${context.when(rule.at)}. An extrapolation across a change of type is void.`
  }
  const isSingle = rule.rule === 'out' && rule.level === 'doubt' && typeof repeat !== 'number'
  if (!attribute.words || !isSingle || typeof mean !== 'number') return sentenceOf(rule, context)
  return `${attribute.label} at ${context.station} is "${context.value(mean)}", beyond the band. Look at a second jar before anyone worries.`
}
