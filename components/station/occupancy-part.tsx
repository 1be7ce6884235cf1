'use client'

import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { freeOn, occupancy, type Leaving } from '@/lib/station/rules/occupancy'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { OccupancyPlot } from './occupancy-plot'

type Props = { capacity: number; leavings: Leaving[]; today: string }

/** How full the station is from today on, if nothing else starts: jars leave when they are opened or their study ends. */
export function OccupancyPart({ capacity, leavings, today }: Props) {
  const steps = occupancy(today, leavings)
  const late = leavings.filter((one) => one.leavesOn < today).reduce((sum, one) => sum + one.jars, 0)
  return (
    <Section
      title="Places ahead"
      sentence={`A jar leaves when it is opened, a watch jar and a spare when the study ends.${
        late > 0
          ? ` ${capital(counted(late, 'jar'))} should have left already and ${late === 1 ? 'is' : 'are'} counted on.`
          : ''
      }`}
    >
      <OccupancyPlot capacity={capacity} steps={steps} />
      {steps.length > 1 ? (
        <details className="mt-2">
          <summary className="min-h-11 cursor-pointer py-2.5 text-15 underline underline-offset-4">
            The same as a table
          </summary>
          <Ledger
            caption="Places ahead"
            rows={steps}
            rowKey={(step) => step.on}
            columns={[
              { key: 'on', title: 'from', cell: (step) => spokenDay(step.on) },
              { key: 'taken', title: 'taken', align: 'right', cell: (step) => step.taken },
              { key: 'free', title: 'free', align: 'right', cell: (step) => capacity - step.taken },
              {
                key: 'who',
                title: 'who has left',
                cell: (step) =>
                  leavings
                    .filter((one) => freeOn(one.leavesOn) === step.on)
                    .map((one) => `${one.studyCode}, ${one.label}: ${one.jars}`)
                    .join('; '),
              },
            ]}
          />
        </details>
      ) : null}
    </Section>
  )
}
