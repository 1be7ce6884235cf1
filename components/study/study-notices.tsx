import type { ShownStudy } from '@/lib/study/queries/sheet'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'

/** What whoever reads the sheet must know before its figures: what it can never carry, and what was changed. */
export function StudyNotices({ study }: { study: ShownStudy }) {
  const { amendments } = study
  const last = amendments.at(-1)
  return (
    <>
      {study.protocolApproval === 'not approved' ? (
        <p className="mt-2 text-15">
          QA had not approved version {study.protocolNumber} of {study.protocolCode} when this study began:{' '}
          <b>it cannot carry a signed shelf life.</b>
        </p>
      ) : null}
      {last ? (
        <p className="mt-2 text-15">
          <a href="#amendments" className="underline underline-offset-4">
            {capital(counted(amendments.length, 'amendment'))}
          </a>{' '}
          since it began, the last on {spokenDay(last.madeOn)}.
        </p>
      ) : null}
    </>
  )
}

/** Every change to the plan since the start, at the sheet's foot. */
export function Amendments({ study: { amendments } }: { study: ShownStudy }) {
  if (amendments.length === 0) return null
  return (
    <section id="amendments" aria-labelledby="amendments-title" className="mt-6">
      <h2 id="amendments-title" className="border-b border-ink pb-1 text-17 font-650">
        Amendments
      </h2>
      <ol>
        {amendments.map(({ number, sentence, reason, madeBy, madeOn }) => (
          <li
            key={number}
            className="grid gap-x-4 border-b border-hair py-2 text-15 sm:grid-cols-[32px_minmax(0,1fr)_minmax(0,1fr)_220px]"
          >
            <b className="font-650">{number}</b>
            <span>{sentence}</span>
            <span className="text-soft">Why: {reason}</span>
            <span className="text-soft sm:text-right">
              {madeBy}, {spokenDay(madeOn)}
            </span>
          </li>
        ))}
      </ol>
    </section>
  )
}
