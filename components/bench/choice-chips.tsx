import { arrowKeys } from '@/components/ui/arrow-keys'

type Props<Value extends string> = {
  label: string
  choices: readonly { value: Value; label: string }[]
  picked: string
  onPick: (value: Value) => void
  /** As many as stand side by side where there is room. */
  columns?: string
}

/** A few words of which one is pressed, at a gloved thumb's size. */
export function ChoiceChips<Value extends string>({
  label,
  choices,
  picked,
  onPick,
  columns = 'sm:grid-cols-3',
}: Props<Value>) {
  return (
    <div
      className={`grid grid-cols-1 gap-3 ${columns}`}
      role="radiogroup"
      aria-label={label}
      onKeyDown={arrowKeys}
    >
      {choices.map(({ value, label: text }) => (
        <button
          key={value}
          type="button"
          role="radio"
          aria-checked={picked === value}
          onClick={() => onPick(value)}
          className={`min-h-16 rounded px-4 text-left text-20 ${picked === value ? 'border-[3px] border-ink bg-paper font-700' : 'border-2 border-rule bg-ground'}`}
        >
          {text}
        </button>
      ))}
    </div>
  )
}
