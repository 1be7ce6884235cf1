'use client'

import { RadioGroup } from '@/components/ui/radio-group'
import { Section } from '@/components/ui/section'
import { placeAdjustments, type FitOption } from '@/lib/study/rules/plan'
import type { StudyAdjustments } from '@/lib/study/schema'
import { grouped } from '@/lib/number/rules'
import { JarNeed } from './jar-need'
import type { Draft, Need } from './start-state'

/** The jars of one batch, and where it is short what would make it fit. */
export function NeedPart({
  need,
  draft,
  set,
}: {
  need: Need
  draft: Draft
  set: (change: Partial<Draft>) => void
}) {
  const picked = need.options.find((option) => isSameFill(option.adjustments, draft.adjustments))
  return (
    <Section title={`Jars of ${need.batch.code}`}>
      <JarNeed need={need} />
      {need.options.length > 0 ? (
        <div className="mt-4">
          <RadioGroup
            label="What would make it fit"
            layout="ledger"
            value={picked?.kind ?? 'plan'}
            onPick={(kind) =>
              set({
                adjustments:
                  need.options.find((option) => option.kind === kind)?.adjustments ??
                  placeAdjustments(draft.adjustments),
              })
            }
            options={[
              { value: 'plan', label: 'As the protocol says' },
              ...need.options.map((option) => ({
                value: option.kind,
                label: option.label,
                hint: fitText(option),
              })),
            ]}
          />
        </div>
      ) : null}
    </Section>
  )
}

/** Which stations start is chosen elsewhere; here it is about grams alone. */
function isSameFill(one: StudyAdjustments, other: StudyAdjustments): boolean {
  const fill = ({ fillG, leaveOutWeeks, leaveOutRetains }: StudyAdjustments) =>
    JSON.stringify([fillG, leaveOutWeeks, leaveOutRetains])
  return fill(one) === fill(other)
}

function fitText({ jars, grams, leftG }: FitOption) {
  const needed = `${jars} jars, ${grouped(Math.ceil(grams), 0)} g`
  if (leftG >= 0) return `${needed}: fits, ${grouped(Math.floor(leftG), 0)} g over`
  return <span className="text-alarm">{`${needed}: ${grouped(Math.ceil(-leftG), 0)} g still missing`}</span>
}
