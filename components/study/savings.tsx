'use client'

import { Button } from '@/components/ui/button'
import { FigureDetails } from '@/components/ui/figure-details'
import { Section } from '@/components/ui/section'
import type { Saving, Widening } from '@/lib/study/rules/savings'
import { withoutSaving, withSaving } from '@/lib/study/rules/savings'
import { boundWidth } from '@/lib/science/bound-width'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import { boundWideningMethod } from '@/lib/science/methods/statistics'
import { grouped } from '@/lib/number/rules'
import type { StudyAdjustments } from '@/lib/study/schema'

type Props = {
  savings: Saving[]
  adjustments: StudyAdjustments
  onChange: (adjustments: StudyAdjustments) => void
}

/** Where this study could take less of its batches, and what each way costs; pressed again it is put back. */
export function Savings({ savings, adjustments, onChange }: Props) {
  if (savings.length === 0) return null
  return (
    <Section
      title="Where grams can be saved"
      sentence="In this study alone; its protocol stays as it is. The largest first."
    >
      <ul className="divide-y divide-hair border-b border-hair">
        {savings.map((saving) => (
          <li
            key={saving.key}
            className="grid items-start gap-x-4 gap-y-2 py-2.5 sm:grid-cols-[minmax(0,1fr)_auto]"
          >
            <div className="min-w-0">
              <p className="text-15">
                <b className="font-650">{saving.act}</b>: {saving.isTaken ? 'saved' : 'saves'}{' '}
                {saving.jars > 0 ? `${saving.jars} ${saving.jars === 1 ? 'jar' : 'jars'}, ` : ''}
                {grouped(Math.round(saving.grams), 0)} g
              </p>
              <p className="text-14 text-soft">
                Costs: {saving.cost} {saving.widening ? <Wider widening={saving.widening} /> : null}
              </p>
            </div>
            <Button
              aria-pressed={saving.isTaken}
              aria-label={saving.isTaken ? `Put back: ${saving.act}` : `Use this: ${saving.act}`}
              onClick={() =>
                onChange(
                  saving.isTaken
                    ? withoutSaving(adjustments, saving.adjustments)
                    : withSaving(adjustments, saving.adjustments),
                )
              }
            >
              {saving.isTaken ? 'Put back' : 'Use this'}
            </Button>
          </li>
        ))}
      </ul>
    </Section>
  )
}

function Wider({ widening }: { widening: Widening }) {
  return (
    <>
      At week {widening.at} the 95 % bound of a trend lies{' '}
      <FigureDetails figure={`${widening.percent.toFixed(0)} %`} facts={() => wideningFacts(widening)} />{' '}
      further off.
    </>
  )
}

function wideningFacts({ times, kept, at, percent }: Widening): FigureFacts {
  return factsOf(boundWideningMethod, {
    result: exactly(percent, '% further off'),
    values: {
      times: times.join(', '),
      kept: kept.join(', '),
      at,
      width: boundWidth(times, at),
      keptWidth: boundWidth(kept, at),
    },
  })
}
