import type { Slot } from '@/components/bench/draft'
import { bandText, slotLabel } from '@/components/bench/verdict'
import { dayText } from '@/lib/report/rules'
import { shownWithUnit } from '@/lib/study/rules/words'

/** What is read, how, where it may lie and what it was last time. */
export function PanelHead({ slot }: { slot: Slot }) {
  const { field } = slot
  const last = field.last[0]
  const was = last
    ? (last.word ?? (last.value === null ? last.typed : shownWithUnit(field, last.value)))
    : null
  return (
    <div>
      <h2 className="text-22 font-650">{slotLabel(slot)}</h2>
      <p className="text-17 text-soft">
        {[field.method, field.band ? bandText(field) : ''].filter(Boolean).join('; ')}
        {was && last ? `. Last ${was}, ${dayText(last.day)}` : ''}.
      </p>
    </div>
  )
}
