'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import useSWR from 'swr'
import { FlagMark } from '@/components/marks/flag-mark'
import { Phrases } from '@/components/study/phrases'
import { SeriesDetails } from '@/components/study/series-details'
import { FigureDetails } from '@/components/ui/figure-details'
import { Heading } from '@/components/ui/heading'
import type { FlagPage } from '@/lib/flag/queries/one'
import { flagKeys } from '@/lib/flag/keys'
import { fetcher } from '@/lib/http/fetcher'
import { attributeKey } from '@/lib/reading/schema/own'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { percentOf } from '@/lib/science/percent'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { shownValue, shownWithUnit } from '@/lib/study/rules/words'
import { AnswerPanel } from './answer-panel'
import { Comments } from './comments'
import type { FlagContext } from './flag-context'
import { flagHeadline, flagSentence } from './flag-headline'
import { flagFacts } from './flag-facts'
import { FlagPlot } from './flag-plot'
import { FlagShelf } from './flag-shelf'
import { stationText } from '@/lib/flag/rules/list'
import { flaggedValue, whole } from './flag-words'
import { howRaised, raisedSentence } from './how-raised'
import { Moved } from './moved'
import { NextFlag } from './next-flag'
import type { FlagRights } from './rights'

type Props = { number: number; context: FlagContext; rights: FlagRights }

/** One flag with all that a person needs to say what it was. */
export function FlagView({ number, context, rights }: Props) {
  const { data: flag, mutate } = useSWR<FlagPage>(flagKeys.one(number), fetcher)
  const router = useRouter()
  if (!flag) return null
  const changed = () => {
    void mutate()
    // The plot and the shelf were drawn by the server: they are drawn anew as well.
    router.refresh()
  }
  const raisedOn = dayIn(flag.zone, flag.raisedAt)
  const how = howRaised(flag)
  return (
    <>
      <div className="relative">
        <Heading
          crumb={<Crumb flag={flag} raisedOn={raisedOn} />}
          headline={<Phrases phrases={flagHeadline(flag)} />}
          sentence={whole(flagSentence(flag))}
        />
        <div className="mt-2 xl:absolute xl:right-0 xl:top-2 xl:mt-0">
          <NextFlag flag={flag} />
        </div>
      </div>
      <div className="mt-5 grid grid-cols-1 gap-x-12 gap-y-10 md:grid-cols-2 xl:grid-cols-[minmax(0,520px)_minmax(0,1fr)_332px]">
        <div className="flex min-w-0 flex-col gap-7">
          {context.plot ? (
            <FlagPlot
              input={context.plot}
              startOn={flag.startedOn}
              endWeeks={context.endWeeks}
              todayWeeks={context.todayWeeks}
              ring={context.ring && { ...context.ring, text: ringText(flag) }}
              caption={whole(caption(flag, context.plot.unit[0] ?? ''))}
              trend={trendText(flag)}
            />
          ) : null}
          {context.shelf ? (
            <FlagShelf
              shelf={context.shelf}
              attribute={flag.words ? flag.attribute : 'separation'}
              detectionPercent={context.detectionPercent}
              allowed={whole(allowedOf(flag) ?? '')}
            />
          ) : null}
          <section aria-labelledby="how">
            <h2 id="how" className="text-15 font-650">
              How this flag was raised
            </h2>
            <p className="max-w-[62ch] text-15">
              {whole(`Rule: ${how.rule} ${how.numbers} ${raisedSentence(flag, raisedOn)}`)}
            </p>
            <p className="mt-1 flex flex-wrap gap-x-5 text-15">
              <FigureDetails figure={`flag ${flag.number}`} facts={() => flagFacts(flag)}>
                The rule and its numbers
              </FigureDetails>
              <OwnSeries flag={flag} />
            </p>
          </section>
        </div>
        <div className="order-3 min-w-0 md:order-none md:col-start-1 xl:col-start-auto">
          <Moved flag={flag} stationMeanC={context.shelf?.station.meanC ?? null} />
        </div>
        <aside className="flex min-w-0 flex-col gap-6 md:col-start-2 md:row-span-2 md:row-start-1 xl:col-start-3 xl:row-span-1">
          <AnswerPanel key={number} flag={flag} rights={rights} onChanged={changed} />
          <Comments flag={flag} mayComment={rights.mayComment} onDone={() => void mutate()} />
        </aside>
      </div>
    </>
  )
}

/** The series that the flag is about, as it stands since the latest reading. */
function OwnSeries({ flag }: { flag: FlagPage }) {
  const { batchId, studyStationId, series } = flag
  const attribute = attributeKey.safeParse(flag.attribute)
  if (!studyStationId || !series || !attribute.success) return null
  return (
    <SeriesDetails
      code={flag.studyCode}
      series={{ batchId, studyStationId, attribute: attribute.data }}
      figure={`${flag.label} at ${stationText(flag)}`}
    >
      The series as it stands now
    </SeriesDetails>
  )
}

function Crumb({ flag, raisedOn }: { flag: FlagPage; raisedOn: string }) {
  return (
    <span className="flex items-start gap-3">
      <FlagMark
        number={flag.number}
        solid={flag.level === 'out'}
        title={`Flag ${flag.number}`}
        className="mt-0.5"
      />
      <span>
        Study <Link href={`/studies/${encodeURIComponent(flag.studyCode)}`}>{flag.studyCode}</Link>, batch{' '}
        <Link href={`/batches/${encodeURIComponent(flag.batchCode)}`}>{flag.batchCode}</Link>,{' '}
        {flag.formulaName.toLowerCase()}. Raised {spokenDay(raisedOn, false)}
        {flag.jarName ? ` by ${flag.jarName}` : ''}
        {flag.readBy ? `, read by ${flag.readBy}` : ''}; {stateText(flag, raisedOn)}
      </span>
    </span>
  )
}

function stateText(flag: FlagPage, raisedOn: string): string {
  if (flag.state === 'closed') {
    return `closed${flag.closedAt ? ` ${spokenDay(dayIn(flag.zone, flag.closedAt), false)}` : ''}`
  }
  if (flag.state === 'answered') return 'answered, waits for QA'
  const days = Math.round((Date.parse(flag.today) - Date.parse(raisedOn)) / 86_400_000)
  return days < 1 ? 'raised today' : `open for ${days === 1 ? 'one day' : `${days} days`}`
}

function ringText(flag: FlagPage): string {
  const value = flag.readingValue ?? flaggedValue(flag)
  const text = value === null ? '' : shownValue(flag, value)
  return [text, flag.readOn ? `on ${spokenDay(flag.readOn, false)}` : ''].filter(Boolean).join(' ')
}

function caption(flag: FlagPage, unit: string): string {
  const initial = flag.series?.finding.initial
  return [
    unit && unit !== flag.method ? `, ${unit}` : '',
    flag.method ? `, ${flag.method}` : '',
    initial === undefined ? '.' : `. Initial ${shownWithUnit(flag, initial)}.`,
  ].join('')
}

/** The slope as one says it: in percent of the initial a week, in units where the initial is nothing. */
function trendText(flag: FlagPage): string | null {
  const finding = flag.series?.finding
  if (!finding || finding.slope === null || finding.slopeP === null || flag.attribute === 'separation')
    return null
  const { initial, slope } = finding
  const perWeek =
    flag.attribute === 'ph' || !initial
      ? `${sign(slope)}${Math.abs(slope).toFixed(3)}`
      : `${sign(slope)}${Math.abs(percentOf(slope, initial)).toFixed(1)} %`
  return `${perWeek} a week since the start${finding.slopeP > 0.05 ? ', which chance explains' : ''}.`
}

function sign(value: number): string {
  return value < 0 ? '−' : '+'
}

function allowedOf(flag: FlagPage): string | null {
  const of = flag.words ? flag.series : flag.separation
  const upper = of?.finding.band.upper
  if (typeof upper !== 'number') return null
  return `allowed up to ${shownWithUnit(flag.words ? flag : attributeOf('separation'), upper)}`
}
