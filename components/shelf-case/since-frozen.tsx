import type { CaseDetail } from '@/lib/shelf-case/queries/read'

const readings = (count: number) => (count === 1 ? 'one reading' : `${count} readings`)

/** What was read or changed in the study after the content was frozen, for whoever signs it or relies on it. */
export function SinceFrozen({ detail: { since, state, studyCode } }: { detail: CaseDetail }) {
  if (!since || (since.changed === 0 && since.added === 0)) return null
  const parts = [
    ...(since.changed > 0 ? [`${readings(since.changed)} corrected or voided`] : []),
    ...(since.added > 0 ? [`${readings(since.added)} added`] : []),
  ]
  const what =
    state === 'put forward'
      ? 'The content below is as it was put forward and holds none of it: look at it, and send the case back where it matters.'
      : 'The content below is as it was put forward and holds none of it; a new case would.'
  return (
    <p
      className={`mt-4 border-l-4 pl-3 ${since.changed > 0 ? 'border-ink font-650' : 'border-soft text-soft'}`}
    >
      Since this case was put forward, study <a href={`/studies/${studyCode}/readings`}>{studyCode}</a> has{' '}
      {parts.join(' and ')}. {what}
    </p>
  )
}
