import { attributeName } from '@/lib/reading/schema/attributes'
import type { Standing } from '@/lib/science/series'
import { addDays, spokenDay } from './calendar'
import { capital, counted, listed, numberWord, withVariant } from './words'

export type FindingStation = {
  id: string
  temperatureC: number | null
  kind: string
  variant?: string
  timePoints: number[]
}
export type FindingSeries = {
  studyStationId: string
  batchCode: string
  attribute: string
  standing: Standing
  used: number | null
  outSinceWeeks: number | null
  leavesAtWeeks: number | null
  latestWeeks: number | null
}
export type FindingInput = {
  startedOn: string
  endWeeks: number
  state: string
  stations: FindingStation[]
  series: FindingSeries[]
  batchCodes: string[]
  /** What waits for an answer; a rule that fired and is not confirmed yet is a finding too. */
  flags: { studyStationId: string | null; attribute: string; rule: string }[]
  /** Those on what stands beside the study: they wait too, and are no finding. */
  flagsBeside?: number
  /** Jars asked for today, and those of them that are read. */
  today: { due: number; done: number }
  nextPullOn: string | null
}
/** What stands in the weight of the finding, and what is around it. */
export type Phrase = { text: string; isStrong: boolean }
export type Finding = { headline: Phrase[]; sentence: string }

/** The finding of a study: what came apart or leans, where and since when; under it what holds and what waits. */
export function studyFinding(input: FindingInput): Finding {
  const outs = byStation(input, 'out')
  const leans = byStation(input, 'leaning').filter(
    ({ station }) => !outs.some((out) => out.station.id === station.id),
  )
  const headline =
    outs.length > 0
      ? outHeadline(input, outs, leans)
      : leans.length > 0
        ? leanHeadline(input, leans)
        : (beginning(input) ?? calm(input))
  const told = outs.length > 0 || leans.length > 0 ? steadySentence(input) : nearestSentence(input)
  return { headline, sentence: [told, waitingSentence(input)].filter(Boolean).join(' ') }
}

type Found = { station: FindingStation; series: FindingSeries }

/** Of each station the series that says most: separation first, then the one that left first. */
function byStation({ stations, series }: FindingInput, standing: Standing): Found[] {
  return stations.flatMap((station) => {
    const found = series
      .filter((one) => one.studyStationId === station.id && one.standing === standing)
      .toSorted((a, b) => weight(a) - weight(b) || (a.outSinceWeeks ?? 0) - (b.outSinceWeeks ?? 0))
    return found[0] ? [{ station, series: found[0] }] : []
  })
}

function weight({ attribute }: FindingSeries): number {
  return attribute === 'separation' ? 0 : 1
}

function outHeadline(input: FindingInput, outs: Found[], leans: Found[]): Phrase[] {
  const sorted = outs.toSorted(
    (a, b) =>
      weight(a.series) - weight(b.series) || (a.series.outSinceWeeks ?? 0) - (b.series.outSinceWeeks ?? 0),
  )
  const attribute = sorted[0]!.series.attribute
  const same = sorted.filter((one) => one.series.attribute === attribute)
  const others = sorted.filter((one) => one.series.attribute !== attribute)
  const opening = attribute === 'separation' ? 'Comes apart' : `${attributeName(attribute)} is out`
  const since = attribute === 'separation' ? 'from' : 'since'
  return [
    ...opened(input, sorted[0]!, opening),
    ...same.flatMap((one, index) => [
      plain(joint(index, same.length)),
      ...place(one.station),
      ...when(input, one.station, since, one.series.outSinceWeeks),
    ]),
    ...others
      .slice(0, 2)
      .flatMap((one) => [
        plain(`, ${inSentence(one.series.attribute)} out`),
        plain(' '),
        ...place(one.station),
      ]),
    ...leaningTail(leans),
  ]
}

function leaningTail(leans: Found[]): Phrase[] {
  if (leans.length === 0) return []
  return [
    plain(', leaning'),
    ...leans.flatMap((one, index) => [plain(joint(index, leans.length)), ...place(one.station)]),
  ]
}

function leanHeadline(input: FindingInput, leans: Found[]): Phrase[] {
  const sorted = leans.toSorted(
    (a, b) => (a.series.leavesAtWeeks ?? Infinity) - (b.series.leavesAtWeeks ?? Infinity),
  )
  const first = sorted[0]!
  const same = sorted.filter((one) => one.series.attribute === first.series.attribute)
  const leaves = first.series.leavesAtWeeks
  return [
    ...opened(input, first, `${attributeName(first.series.attribute)} is leaning`),
    ...same.flatMap((one, index) => [plain(joint(index, same.length)), ...place(one.station)]),
    ...(leaves === null
      ? []
      : [plain(`, out about ${spokenDay(addDays(input.startedOn, Math.round(leaves * 7)))}`)]),
  ]
}

/** Nothing is out or leaning, yet a reading lies beyond its band unconfirmed, or separation has begun. */
function beginning({ stations, flags }: FindingInput): Phrase[] | null {
  const first = (rule: string) =>
    flags
      .filter((flag) => flag.rule === rule)
      .toSorted((a, b) => Number(b.attribute === 'separation') - Number(a.attribute === 'separation'))[0]
  const beyond = first('out')
  const flag = beyond ?? first('onset')
  const station = stations.find((one) => one.id === flag?.studyStationId)
  if (!flag || !station) return null
  if (!beyond) return [plain('Separation has begun '), ...place(station)]
  return [
    plain(`${attributeName(beyond.attribute)} was read beyond its band `),
    ...place(station),
    plain(', not confirmed yet'),
  ]
}

function calm(input: FindingInput): Phrase[] {
  const latest = Math.max(0, ...input.series.map((one) => one.latestWeeks ?? 0))
  if (latest === 0) {
    if (input.nextPullOn === null) return [plain('Nothing was pulled')]
    return [plain('Nothing to tell yet: the first jars are due on '), strong(spokenDay(input.nextPullOn))]
  }
  if (input.series.every((one) => one.standing === 'untold')) {
    return [plain('Too early to tell after '), strong(timeSpan(latest, input.endWeeks))]
  }
  const count = input.stations.length
  const where = count === 1 ? [plain(' at its station')] : [plain(` at all ${numberWord(count)} stations`)]
  return [strong('Steady'), ...where, plain(' after '), strong(timeSpan(latest, input.endWeeks))]
}

/** With several batches the one that is meant comes first. */
function opened(input: FindingInput, found: Found, text: string): Phrase[] {
  if (input.batchCodes.length < 2) return [plain(text)]
  const rest = text.startsWith('pH') ? text : text.charAt(0).toLowerCase() + text.slice(1)
  return [strong(found.series.batchCode), plain(` ${rest}`)]
}

function joint(index: number, count: number): string {
  if (index === 0) return ' '
  return index === count - 1 ? ' and ' : ', '
}

function place(station: FindingStation): Phrase[] {
  if (station.kind === 'freeze-thaw') return [plain('in '), strong('freeze-thaw')]
  if (station.kind === 'transport') return [plain('on the '), strong('road')]
  return [plain('at '), strong(withVariant(degrees(station.temperatureC), station.variant))]
}

function when(input: FindingInput, station: FindingStation, since: string, weeks: number | null): Phrase[] {
  if (weeks === null) return []
  return [plain(` ${since} ${timeWords(station, weeks, input.endWeeks)}`)]
}

/** Freeze-thaw counts its cycles, the road its legs, a study of more than a year its months. */
export function timeWords(station: FindingStation, weeks: number, endWeeks: number): string {
  if (station.kind !== 'temperature') {
    const number = station.timePoints.filter((point) => point <= weeks + 0.5).length
    return `${station.kind === 'freeze-thaw' ? 'cycle' : 'leg'} ${Math.max(1, number)}`
  }
  return endWeeks > 52 ? `month ${Math.round((weeks / 13) * 3)}` : `week ${Math.round(weeks)}`
}

function timeSpan(weeks: number, endWeeks: number): string {
  if (endWeeks > 52) return counted(Math.round((weeks / 13) * 3), 'month')
  return counted(Math.round(weeks), 'week')
}

function steadySentence(input: FindingInput): string {
  const steady = input.stations.filter((station) => {
    const own = input.series.filter((one) => one.studyStationId === station.id)
    return own.length > 0 && own.every((one) => one.standing === 'steady')
  })
  if (steady.length === 0) return ''
  const names = steady.map((station) => {
    if (station.kind === 'freeze-thaw') {
      const latest = Math.max(
        0,
        ...input.series.filter((s) => s.studyStationId === station.id).map((s) => s.latestWeeks ?? 0),
      )
      const cycles = station.timePoints.filter((point) => point <= latest + 0.5).length
      return `through ${counted(cycles, 'freeze-thaw cycle')}`
    }
    return station.kind === 'transport'
      ? 'on the road'
      : `at ${withVariant(degrees(station.temperatureC), station.variant)}`
  })
  return `Steady ${listed(names)}.`
}

function nearestSentence(input: FindingInput): string {
  const nearest = input.series
    .filter((one) => one.used !== null && one.used > 0.005)
    .toSorted((a, b) => b.used! - a.used!)[0]
  if (!nearest) return ''
  const station = input.stations.find((one) => one.id === nearest.studyStationId)!
  const where = place(station)
    .map((phrase) => phrase.text)
    .join('')
  return `Nearest its edge: ${inSentence(nearest.attribute)} ${where}, ${Math.round(nearest.used! * 100)} % of the band used.`
}

function waitingSentence({ flags: own, flagsBeside = 0, today, nextPullOn, state }: FindingInput): string {
  const open = own.length + flagsBeside
  const flags = open > 0 ? `${counted(open, 'flag')} ${open === 1 ? 'wants' : 'want'} an answer` : ''
  if (state === 'closed') return flags ? `${capital(flags)}.` : 'The study has ended.'
  const jars =
    today.due > 0
      ? todaysJars(today)
      : nextPullOn === null
        ? 'every pull is done'
        : `the next pull is on ${spokenDay(nextPullOn)}`
  return `${capital([flags, jars].filter(Boolean).join('; '))}.`
}

function todaysJars({ due, done }: { due: number; done: number }): string {
  if (due === 1) return done === 1 ? "today's jar is in" : "today's jar is still to be read"
  if (done === due) return `all of today's ${numberWord(due)} jars are in`
  if (done === 0) return `none of today's ${numberWord(due)} jars is in`
  return `${numberWord(done)} of today's ${numberWord(due)} jars ${done === 1 ? 'is' : 'are'} in`
}

/** "pH" keeps its letters; the others are plain words. */
export function inSentence(attribute: string): string {
  const label = attributeName(attribute)
  return /^.?\p{Lu}/u.test(label.slice(1)) ? label : label.charAt(0).toLowerCase() + label.slice(1)
}

export function degrees(temperatureC: number | null): string {
  return temperatureC === null ? 'its station' : `${String(temperatureC).replace('-', '−')} °C`
}

function plain(text: string): Phrase {
  return { text, isStrong: false }
}

function strong(text: string): Phrase {
  return { text, isStrong: true }
}
