import { attributeOf, type Describing } from '@/lib/reading/schema/attributes'
import type { SeriesFinding, Standing } from '@/lib/science/series'
import { addDays, spokenDay } from './calendar'
import { degrees, inSentence, type Phrase } from './finding'
import { capital, counted, withVariant } from './words'

type Series = {
  studyStationId: string
  batchId: string
  batchCode: string
  attribute: string
  standing: Standing
  outSinceWeeks: number | null
  leavesAtWeeks: number | null
  used: number | null
  finding: SeriesFinding
}
type Station = { id: string; kind: string; temperatureC: number | null; variant?: string }

/** What the curves say that the sheet does not: the day on which a trend leaves its band, and how sure that is. */
export function curvesFinding(input: {
  study: { startedOn: string; today: string }
  plan: Describing
  stations: Station[]
  batches: { id: string }[]
  series: Series[]
}): { headline: Phrase[]; sentence: string } {
  const { study } = input
  // Words against the initial have no curve.
  const series = input.series.filter(({ attribute }) => !attributeOf(attribute, input.plan).words)
  const day = (weeks: number, withYear = true) =>
    spokenDay(addDays(study.startedOn, Math.round(weeks * 7)), withYear)
  const leaning = series
    .filter((one) => one.standing === 'leaning' && one.leavesAtWeeks !== null)
    // A forecast that has passed says nothing any more: the readings since then do.
    .filter((one) => addDays(study.startedOn, Math.round(one.leavesAtWeeks! * 7)) >= study.today)
    .toSorted((a, b) => a.leavesAtWeeks! - b.leavesAtWeeks!)
  const out = series
    .filter((one) => one.standing === 'out')
    .toSorted((a, b) => (a.outSinceWeeks ?? 0) - (b.outSinceWeeks ?? 0))
  const [first] = leaning
  if (first) {
    const { leavesAtLow, leavesAtHigh, points } = first.finding
    const counting = points.filter((point) => point.counted).length
    const limits =
      leavesAtLow === null || leavesAtHigh === null
        ? `From ${counted(counting, 'reading')}.`
        : `${day(leavesAtLow, false)} to ${day(leavesAtHigh, false)} at 95 % confidence, from ${counted(counting, 'reading')}.`
    return {
      headline: [
        ...where(input, first, true),
        {
          text: ` ${inSentence(first.attribute)} leaves its band about ${day(first.leavesAtWeeks!)}`,
          isStrong: false,
        },
      ],
      sentence: [limits, ...out.slice(0, 2).map((one) => outSentence(input, one, day))].join(' '),
    }
  }
  const [worst] = out
  if (worst) {
    return {
      headline: [
        ...where(input, worst, true),
        {
          text: ` ${inSentence(worst.attribute)} left its band${worst.outSinceWeeks === null ? '' : ` about ${day(worst.outSinceWeeks)}`}`,
          isStrong: false,
        },
      ],
      sentence: out
        .slice(1, 3)
        .map((one) => outSentence(input, one, day))
        .join(' '),
    }
  }
  const nearest = series.filter((one) => (one.used ?? 0) > 0.005).toSorted((a, b) => b.used! - a.used!)[0]
  const isTold = series.some((one) => one.standing !== 'untold')
  return {
    headline: isTold
      ? [
          { text: 'No trend', isStrong: true },
          { text: ' leads out of its band', isStrong: false },
        ]
      : [{ text: 'Too few readings for a trend', isStrong: false }],
    sentence: nearest
      ? `Nearest its edge: ${inSentence(nearest.attribute)} ${text(where(input, nearest, false))}, ${Math.round(nearest.used! * 100)} % of the band used.`
      : 'A trend needs five time points, the initial among them.',
  }
}

function outSentence(
  input: { stations: Station[]; batches: { id: string }[] },
  one: Series,
  day: (weeks: number, withYear?: boolean) => string,
): string {
  const since = one.outSinceWeeks === null ? 'is out' : `left its band about ${day(one.outSinceWeeks, false)}`
  return `${capital(text(where(input, one, true)))} ${inSentence(one.attribute)} ${since}.`
}

function where(
  { stations, batches }: { stations: Station[]; batches: { id: string }[] },
  one: Series,
  isFirst: boolean,
): Phrase[] {
  const station = stations.find((s) => s.id === one.studyStationId)
  const [before, name] =
    station?.kind === 'freeze-thaw'
      ? ['in ', 'freeze-thaw']
      : station?.kind === 'transport'
        ? ['on the ', 'road']
        : ['at ', withVariant(degrees(station?.temperatureC ?? null), station?.variant)]
  const batch = batches.length > 1 ? [{ text: ` in ${one.batchCode}`, isStrong: false }] : []
  return [
    { text: isFirst ? capital(before) : before, isStrong: false },
    { text: name, isStrong: true },
    ...batch,
  ]
}

function text(phrases: Phrase[]): string {
  return phrases.map((phrase) => phrase.text).join('')
}
