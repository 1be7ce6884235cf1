import { ChoiceChips } from '@/components/bench/choice-chips'
import { Field } from '@/components/ui/field'

type Props = {
  choices: readonly string[]
  reason: string
  onReason: (reason: string) => void
  error?: string | undefined
}

/** Why an entry is changed: what it mostly is, with one press, or in own words. */
export function QuickReason({ choices, reason, onReason, error }: Props) {
  return (
    <>
      <ChoiceChips
        label="Why"
        columns="grid-cols-2 sm:grid-cols-2"
        choices={choices.map((one) => ({ value: one, label: one }))}
        picked={reason}
        onPick={onReason}
      />
      <Field label="Reason" density="bench" value={reason} onText={onReason} {...(error ? { error } : {})} />
    </>
  )
}
