'use client'

import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { RadioGroup } from '@/components/ui/radio-group'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { celsius } from '@/lib/cycle/rules/shortfall'
import { readDecimal } from '@/lib/number/rules'
import { HoldReason } from './hold-reason'

/** What was reached, as it is typed. */
export type ReachedText = { reached: string; core: string; frozen: string; note: string }
/** A whole half as it is typed, its times in the lab's zone. */
export type HalfText = ReachedText & { begunAt: string; endedAt: string; held: string; heldReason: string }

export const emptyReached: ReachedText = { reached: '', core: '', frozen: '', note: '' }

type Props<Text> = {
  half: string
  place: Pick<CyclePlace, 'cycleLowC' | 'cycleHighC'>
  text: Text
  errors?: Record<string, string>
  onText: (change: Partial<Text>) => void
}

/** Temperature reached, and in the cold the dummy jar's core and whether the jars were frozen through. */
export function ReachedFields({
  half,
  place,
  text,
  errors = {},
  onText,
  autoFocus,
}: Props<ReachedText> & { autoFocus?: boolean }) {
  const isCold = half === 'cold'
  const asked = isCold ? place.cycleLowC : place.cycleHighC
  return (
    <>
      <div className="flex flex-wrap items-start gap-3">
        <NumberField
          label={asked === null ? 'Reached' : `Reached, of ${celsius(asked)}`}
          unit="°C"
          density="bench"
          value={text.reached}
          onText={(reached) => onText({ reached })}
          wrap="min-w-[180px] flex-1"
          {...(errors['reachedC'] ? { error: errors['reachedC'] } : {})}
          {...(autoFocus ? { autoFocus } : {})}
        />
        {isCold ? (
          <NumberField
            label="Core of the dummy jar"
            unit="°C"
            density="bench"
            value={text.core}
            onText={(core) => onText({ core })}
            wrap="min-w-[180px] flex-1"
            {...(errors['coreC'] ? { error: errors['coreC'] } : {})}
          />
        ) : null}
      </div>
      {isCold ? (
        <RadioGroup
          label="Frozen through"
          density="bench"
          value={text.frozen}
          onPick={(frozen) => onText({ frozen })}
          options={[
            { value: 'yes', label: 'yes' },
            { value: 'no', label: 'no' },
          ]}
        />
      ) : null}
    </>
  )
}

/** When a half began and ended, what it reached, and for how long it was held. */
export function HalfFields({
  when,
  zone,
  ...rest
}: Props<HalfText> & { zone: string; when: { begun: string; ended: string } }) {
  const { text, errors = {}, onText } = rest
  const isHeld = (readDecimal(text.held) ?? 0) > 0
  return (
    <>
      <div className="flex flex-wrap items-start gap-3">
        {(['begunAt', 'endedAt'] as const).map((key) => (
          <Field
            key={key}
            type="datetime-local"
            label={`${key === 'begunAt' ? when.begun : when.ended}, in ${zone}`}
            density="bench"
            value={text[key]}
            onText={(at) => onText({ [key]: at })}
            wrap="min-w-[250px] flex-1"
            {...(errors[key] ? { error: errors[key] } : {})}
          />
        ))}
      </div>
      <ReachedFields {...rest} />
      <NumberField
        label="Of these hours it was held for"
        unit="h"
        density="bench"
        value={text.held}
        onText={(held) => onText({ held })}
        {...(errors['heldHours'] ? { error: errors['heldHours'] } : {})}
      />
      {isHeld ? (
        <HoldReason
          label="Why it was held"
          reason={text.heldReason}
          onReason={(heldReason) => onText({ heldReason })}
          error={errors['heldReason']}
        />
      ) : null}
      <Field label="Note" density="bench" value={text.note} onText={(note) => onText({ note })} />
    </>
  )
}
