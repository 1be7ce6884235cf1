'use client'

import { Section } from '@/components/ui/section'
import type { DifferencePage } from '@/lib/formula/queries/get-difference'
import { Consequences } from './difference-consequences'
import { LineDifferences } from './difference-lines'
import { StepDifferences } from './difference-steps'

/** Two versions on one page: what follows for the emulsion, then the lines, then the process. */
export function DifferenceView({ page }: { page: DifferencePage }) {
  const { from, to, difference } = page
  const names = [from, to].map((side) =>
    from.code === to.code ? `version ${side.number}` : `${side.code}, version ${side.number}`,
  ) as [string, string]
  return (
    <div className="mt-8 grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_500px]">
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="Lines">
          <LineDifferences rows={difference.lines} names={names} />
        </Section>
        <Section title="Process">
          <StepDifferences rows={difference.steps} names={names} />
        </Section>
      </div>
      <Section title="What follows" className="order-first xl:order-none">
        <Consequences page={page} names={names} />
        {to.note ? (
          <p className="mt-4 text-15">
            <span className="text-soft">Why {names[1]}: </span>
            {to.note}
          </p>
        ) : null}
      </Section>
    </div>
  )
}
