import Link from 'next/link'
import { DayJarPart } from '@/components/day/day-jar-part'
import { ReviewForm } from '@/components/day/review-form'
import { Heading } from '@/components/ui/heading'
import { Section } from '@/components/ui/section'
import type { DayOnRecord } from '@/lib/day/queries/day'
import { photoKeys } from '@/lib/photo/keys'
import { dayText } from '@/lib/report/rules'
import { capital, counted, listed } from '@/lib/study/rules/words'

/** One day as QA reads it: each jar's entries with doubts and corrections, photos, what was not read, and the reviews. */
export function DayView({ day, mayReview }: { day: DayOnRecord; mayReview: boolean }) {
  const { readings, mishaps, jars, photos, reviews, unseenIds } = day
  const unseen = new Set(unseenIds)
  const doubted = readings.filter((one) => one.doubts.length > 0).length
  const changed = readings.filter((one) => one.supersedesId !== null).length
  const by = [...new Set([...readings, ...mishaps].map((one) => one.by))]
  const isAfter = reviews.length > 0
  return (
    <>
      <Heading
        crumb={<Link href="/days">All days</Link>}
        headline={
          <>
            <b>{capital(counted(jars.length, 'jar'))}</b> read on {dayText(day.day)}
            {unseen.size === 0 && reviews.length > 0 ? ', reviewed' : ''}
          </>
        }
        sentence={
          readings.length === 0 && mishaps.length === 0
            ? 'Nothing was entered on this day.'
            : `${capital(counted(readings.length, 'entry', 'entries'))} by ${listed(by)}; ${doubted} in doubt, ${changed} corrected or void, ${mishaps.length} noted besides.`
        }
      />
      <ul className="mt-4">
        {reviews.map((one) => (
          <li key={one.id} className="border-b border-hair py-1.5">
            Reviewed by <b>{one.by}</b>, {dayText(one.reviewedAt)}: {counted(one.entries, 'entry', 'entries')}
            {one.remark ? `. ${one.remark}` : ''}
          </li>
        ))}
      </ul>
      {isAfter && unseen.size > 0 ? (
        <p className="mt-3 border-l-[5px] border-ink pl-3">
          <b>{capital(counted(unseen.size, 'entry', 'entries'))} came after the review.</b> They are marked
          below and ask for another look.
        </p>
      ) : null}
      {mayReview && unseen.size > 0 ? (
        <ReviewForm day={day.day} entryIds={day.entryIds} isOwn={day.isOwn} />
      ) : null}
      {mishaps.length > 0 ? (
        <Section title="Not as planned" className="mt-6">
          <ul>
            {mishaps.map((one) => (
              <li key={one.id} className="border-b border-hair py-1.5">
                <b className="font-mono">{one.code}</b> of {one.studyCode}:{' '}
                {one.reason.toLowerCase() === one.kind ? one.kind : `${one.kind}, ${one.reason}`} ({one.by})
                {isAfter && unseen.has(one.id) ? <b> after the review</b> : null}
              </li>
            ))}
          </ul>
        </Section>
      ) : null}
      {jars.length > 0 ? (
        <Section title="Entries" className="mt-6">
          {jars.map((jar) => (
            <DayJarPart
              key={jar.pullJarId}
              jar={jar}
              readings={readings.filter((one) => one.pullJarId === jar.pullJarId)}
              isLate={(id) => isAfter && unseen.has(id)}
            />
          ))}
        </Section>
      ) : null}
      {photos.length > 0 ? (
        <Section title="Photos" className="mt-6">
          <ul className="flex flex-wrap gap-3">
            {photos.map((photo) => (
              <li key={photo.id} className="w-[140px]">
                {/* eslint-disable-next-line @next/next/no-img-element -- an own route, nothing to optimise */}
                <img
                  src={photoKeys.preview(photo.id)}
                  alt={`Jar ${photo.code}`}
                  loading="lazy"
                  className="h-[180px] w-full object-cover"
                />
                <span className="font-mono">{photo.code}</span>
              </li>
            ))}
          </ul>
        </Section>
      ) : null}
    </>
  )
}
