import type { RefObject } from 'react'
import { Field } from '@/components/ui/field'
import type { Judged, WeighDraft } from './weigh-draft'

type Props = {
  draft: WeighDraft
  now: Judged
  fields: Record<string, string>
  isBench: boolean
  noteField: RefObject<HTMLInputElement | null>
  onDraft: (change: Partial<WeighDraft>) => void
  onTareFocus: () => void
  onLotScanned: () => void
}

/** What belongs to a weight: lot, tare, and the words that it asks for. */
export function WeighFields(props: Props) {
  const { draft, now, fields, isBench, noteField, onDraft } = props
  const isOutside = now.verdict !== null && !now.verdict.isWithin
  return (
    <div className="mt-4 grid grid-cols-2 gap-3">
      <Field
        label="Lot"
        value={now.lot}
        error={fields['lot']}
        hint="Type it, or scan its label."
        onText={(lot) => onDraft({ lot })}
        // A scanner types the lot and presses Enter: that goes on to the weight and keeps nothing.
        onKeyDown={(event) => {
          if (event.key !== 'Enter') return
          event.preventDefault()
          props.onLotScanned()
        }}
      />
      <Field
        label="Tare"
        unit="g"
        inputMode={isBench ? 'none' : 'decimal'}
        className="text-right"
        value={draft.tare}
        error={fields['tareTyped'] ?? (now.problem?.field === 'tareTyped' ? now.problem.sentence : undefined)}
        hint="Empty if the balance took it off."
        onFocus={props.onTareFocus}
        onText={(tare) => onDraft({ tare })}
      />
      {fields['balanceId'] ? <p className="col-span-2 text-17 text-alarm">{fields['balanceId']}</p> : null}
      {isOutside || draft.note ? (
        <Field
          ref={noteField}
          label="Why it is kept so"
          value={draft.note}
          error={fields['note']}
          onText={(note) => onDraft({ note })}
          wrap="col-span-2"
        />
      ) : null}
      {draft.supersedes ? (
        <Field
          label="Why the weight is corrected"
          value={draft.reason}
          error={fields['reason']}
          hint="What was weighed first stays on record."
          onText={(reason) => onDraft({ reason })}
          wrap="col-span-2"
        />
      ) : null}
    </div>
  )
}
