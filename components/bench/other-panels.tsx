'use client'

import type { Slot } from '@/components/bench/draft'
import { slotLabel } from '@/components/bench/verdict'
import { TextArea } from '@/components/ui/text-area'
import { dayText } from '@/lib/report/rules'

/** Words against the initial: one tap each, the same as last time first at hand. */
export function WordPanel({
  slot,
  text,
  onText,
}: {
  slot: Slot
  text: string
  onText: (text: string) => void
}) {
  const last = slot.field.last[0]
  return (
    <div>
      <h2 className="text-22 font-650">{slotLabel(slot)}</h2>
      <p className="text-17 text-soft">
        {slot.field.method}
        {last?.word ? ` Last: ${last.word}, ${dayText(last.day)}.` : ''}
      </p>
      <div
        className="mt-3 grid grid-cols-1 gap-3 sm:grid-cols-2"
        role="radiogroup"
        aria-label={slotLabel(slot)}
      >
        {(slot.field.words ?? []).map((word) => (
          <button
            key={word}
            type="button"
            role="radio"
            aria-checked={text === word}
            onClick={() => onText(word)}
            className={`min-h-[72px] rounded px-5 text-left text-22 ${text === word ? 'border-[3px] border-ink bg-paper font-700' : 'border-2 border-rule bg-ground'}`}
          >
            {word}
          </button>
        ))}
      </div>
    </div>
  )
}

export function NotePanel({ note, onNote }: { note: string; onNote: (note: string) => void }) {
  return (
    <TextArea
      label="Note"
      density="bench"
      value={note}
      onText={onNote}
      rows={4}
      hint="What you saw that no field asks for. It stays with the jar and the pull."
    />
  )
}
