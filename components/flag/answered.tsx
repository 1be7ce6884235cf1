import type { FlagPage } from '@/lib/flag/queries/one'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { causeText } from './flag-words'

/** What was said about the flag, by whom and when, and who closed it. */
export function Answered({ flag }: { flag: FlagPage }) {
  const day = (instant: string | null) => (instant ? spokenDay(dayIn(flag.zone, instant)) : '')
  const isAnswered = flag.answeredBy !== null
  return (
    <div className="flex flex-col gap-3 text-15">
      {isAnswered ? (
        <>
          <Line name="Cause">{causeText(flag.cause)}</Line>
          <Line name="Why">{flag.why}</Line>
          <Line name="Action">{flag.action}</Line>
          <p className="border-t border-hair pt-2 text-14 text-soft">
            {flag.answeredByName}, {day(flag.answeredAt)}
          </p>
        </>
      ) : null}
      {flag.state === 'closed' ? (
        <p className="border-t border-ink pt-2">
          {flag.closingNote}
          <span className="block text-14 text-soft">
            {isAnswered ? `Closed by ${flag.closedByName}` : 'Closed by itself'}, {day(flag.closedAt)}
          </span>
        </p>
      ) : null}
    </div>
  )
}

function Line({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <div>
      <p className="font-650">{name}</p>
      <p className="whitespace-pre-line">{children}</p>
    </div>
  )
}
