import { TextArea } from '@/components/ui/text-area'

/** Typed or dictated: no key of it leads elsewhere. */
export function NotePanel({ note, onNote }: { note: string; onNote: (note: string) => void }) {
  return (
    <TextArea
      label="Note"
      density="bench"
      value={note}
      onText={onNote}
      rows={4}
      autoCapitalize="sentences"
      spellCheck
      hint="What you saw that no field asks for. It stays with the jar and the pull."
    />
  )
}
