import type { TouchedPull } from '@/lib/station/queries/downtimes'
import { pullInDowntime, type Period } from '@/lib/station/rules/downtime'
import type { Leaving } from '@/lib/station/rules/occupancy'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'

/** The jars that still stand there when it begins, and the pulls whose day falls into it. */
export function Touched({
  period,
  pulls,
  leavings,
}: {
  period: Period
  pulls: TouchedPull[]
  leavings: Leaving[]
}) {
  const standing = leavings
    .filter((one) => one.leavesOn >= period.fromOn)
    .reduce((sum, one) => sum + one.jars, 0)
  const inside = pulls.flatMap((pull) => {
    const found = pullInDowntime(period, pull)
    return found ? [{ pull, ...found }] : []
  })
  return (
    <div className="text-15">
      <p>
        {capital(counted(standing, 'jar'))} will stand here then;{' '}
        {inside.length === 0
          ? 'no pull falls in.'
          : `${counted(inside.length, 'pull')} ${inside.length === 1 ? 'falls' : 'fall'} in:`}
      </p>
      {inside.length > 0 ? (
        <ul className="mt-1">
          {inside.map(({ pull, isMovable, sentence }) => (
            <li key={`${pull.studyCode} ${pull.label} ${pull.dueOn}`}>
              <b className="font-600">
                {pull.studyCode}, {pull.label}
              </b>{' '}
              on {spokenDay(pull.dueOn)}, {counted(pull.jars, 'jar')}:{' '}
              <span className={isMovable ? '' : 'font-600 text-alarm'}>{sentence}</span>
            </li>
          ))}
        </ul>
      ) : null}
    </div>
  )
}
