'use client'

import { useMemo } from 'react'
import { WorkloadDrawing } from '@/components/charts/workload-drawing'
import { Section } from '@/components/ui/section'
import { stationName } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import type { LabWorkload } from '@/lib/study/queries/workload'
import type { TakenBatches } from '@/lib/study/rules/jars'
import { offTheirDay, pullsOf, type DayGroup } from '@/lib/study/rules/pulls'
import { capital, counted, listed } from '@/lib/study/rules/words'
import { namedDay } from '@/lib/study/rules/working-days'
import { changeText, dueOfPlan, fullestChanged, workloadOf } from '@/lib/study/rules/workload'

type Props = { plan: ProtocolPlan; taken: TakenBatches; lab: LabWorkload }

/** On which days the study will be pulled, which pulls a closed day moves, and what that makes of the lab's weeks. */
export function StartCalendar({ plan, taken, lab }: Props) {
  const { today, calendar } = lab
  const off = useMemo(
    () =>
      offTheirDay(
        plan.stations.map((station, at) => ({
          name: stationName(station, at),
          pulls: pullsOf(station, today, plan.endWeeks, calendar),
        })),
      ),
    [plan, today, calendar],
  )
  const total = plan.stations.reduce((sum, station) => sum + station.timePoints.length, 0)
  const moved = off.filter((one) => !one.isStuck)
  const stuck = off.filter((one) => one.isStuck)
  return (
    <Section title="When" sentence={sentenceOf(total, pullsIn(moved), pullsIn(stuck))}>
      {stuck.length > 0 ? <Days groups={stuck} title="No working day in the window" /> : null}
      {moved.length > 0 ? <Days groups={moved} title="Moved to the nearest working day" /> : null}
      <Weeks plan={plan} taken={taken} lab={lab} />
    </Section>
  )
}

function Weeks({ plan, taken, lab }: Props) {
  const { today, calendar, due } = lab
  const { before, after } = useMemo(() => {
    const own = dueOfPlan(plan, taken, today, calendar)
    return {
      before: workloadOf(due, calendar, today),
      after: workloadOf([...due, ...own], calendar, today),
    }
  }, [plan, taken, today, calendar, due])
  const fullest = fullestChanged(before, after)
  return (
    <div className="mt-4">
      <p className="text-17">
        {fullest ? (
          <>
            Fullest for the lab: <b className="font-650">{changeText(fullest)}</b>.
          </>
        ) : (
          `The next ${after.weeks.length} weeks stay as they are.`
        )}
      </p>
      <WorkloadDrawing workload={after} before={before} calendar={calendar} />
      <p className="mt-1 text-14 text-soft">
        Jars to measure a week: soft is there already, ink is this study. The shelf has a gap on every day on
        which nobody is here.
      </p>
    </div>
  )
}

function Days({ groups, title }: { groups: DayGroup[]; title: string }) {
  return (
    <div className="mb-3">
      <h3 className="text-15 font-650">{title}</h3>
      <ul
        className="max-h-[230px] divide-y divide-hair overflow-y-auto border-b border-hair text-15"
        tabIndex={0}
        aria-label={title}
      >
        {groups.map((one) => (
          <li key={`${one.label} ${one.nominalOn} ${one.dueOn}`} className="py-1.5">
            {capital(one.label)} at {listed(one.stations)}:{' '}
            {one.isStuck ? (
              <>
                keeps <b className="font-650">{namedDay(one.dueOn)}</b> ({one.because})
              </>
            ) : (
              <>
                <b className="font-650">{namedDay(one.dueOn)}</b> instead of {namedDay(one.nominalOn, false)}{' '}
                ({one.because})
              </>
            )}
          </li>
        ))}
      </ul>
    </div>
  )
}

const pullsIn = (groups: DayGroup[]) => groups.reduce((sum, one) => sum + one.stations.length, 0)

function sentenceOf(total: number, moved: number, stuck: number): string {
  const all = capital(counted(total, 'pull'))
  if (moved + stuck === 0) return `${all}, each on a working day of the lab.`
  const parts = [
    moved > 0 ? `${counted(moved, 'moves', 'move')} to a working day inside the window` : '',
    stuck > 0
      ? `${counted(stuck, 'keeps its day', 'keep their day')} although nobody is here: the window holds no working day`
      : '',
  ].filter(Boolean)
  return `${all}, if the study starts today: ${parts.join('; ')}. Time points stay what they are.`
}
