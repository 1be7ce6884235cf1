import type { ShownStudy } from '@/lib/study/queries/sheet'
import { spokenDay } from '@/lib/study/rules/calendar'
import { downtimeText } from '@/lib/station/rules/downtime'
import { capital, counted, listed } from '@/lib/study/rules/words'

/** What whoever reads the sheet must know before its figures: what it can never carry, and what was changed. */
export function StudyNotices({ study }: { study: ShownStudy }) {
  const { amendments, downtimes, moves } = study
  const last = amendments.findLast((one) => one.kind !== 'not started')
  const changed = amendments.filter((one) => one.kind !== 'not started')
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
            {capital(counted(changed.length, 'amendment'))}
          </a>{' '}
          since it began, the last on {spokenDay(last.madeOn)}.
        </p>
      ) : null}
      {amendments
        .filter((one) => one.kind === 'not started')
        .map((one) => (
          <p key={one.number} className="mt-2 text-15">
            <b>{one.sentence}</b> {one.reason}
          </p>
        ))}
      {downtimes.map((down) => (
        <p key={`${down.name} ${down.fromOn}`} className="mt-2 text-15">
          {capital(down.name)} is out of use {downtimeText(down)}:{' '}
          {down.pulls.length === 0
            ? 'no pull of this study falls in.'
            : `${listed(down.pulls)} ${down.pulls.length === 1 ? 'falls' : 'fall'} in.`}
        </p>
      ))}
      {moves.length > 0 ? (
        <p className="mt-2 text-15">
          <a href="#moves" className="underline underline-offset-4">
            Jars were moved
          </a>{' '}
          to {listed([...new Set(moves.map((move) => move.toName))])}, the last on{' '}
          {spokenDay(moves.at(-1)!.movedOn)}.
        </p>
      ) : null}
    </>
  )
}

/** Jars that stand elsewhere than where the study began, and why, at the sheet's foot. */
export function Moves({ study: { moves, stationNames } }: { study: ShownStudy }) {
  if (moves.length === 0) return null
  return (
    <section id="moves" aria-labelledby="moves-title" className="mt-6">
      <h2 id="moves-title" className="border-b border-ink pb-1 text-17 font-650">
        Moved jars
      </h2>
      <ol>
        {moves.map((move) => (
          <li
            key={`${move.movedOn} ${move.fromName} ${move.toName} ${move.reason}`}
            className="grid gap-x-4 border-b border-hair py-2 text-15 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_220px]"
          >
            <span>
              {capital(move.fromName)} to {move.toName}:{' '}
              {listed(
                move.jars.map(
                  ({ position, count }) => `${counted(count, 'jar')} of ${stationNames[position]}`,
                ),
              )}
            </span>
            <span className="text-soft">Why: {move.reason}</span>
            <span className="text-soft sm:text-right">
              {move.movedBy}, {spokenDay(move.movedOn)}
            </span>
          </li>
        ))}
      </ol>
    </section>
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
