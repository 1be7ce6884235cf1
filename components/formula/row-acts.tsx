'use client'

type Props = {
  /** What the acts belong to: "Squalane", "step 3". */
  of: string
  onUp?: () => void
  onDown?: () => void
  onRemove: () => void
}

/** Up, down, out: quiet until the row is touched, always there for the keyboard. */
export function RowActs({ of, onUp, onDown, onRemove }: Props) {
  return (
    <div className="flex justify-end opacity-55 focus-within:opacity-100 group-focus-within:opacity-100 group-hover:opacity-100">
      <Act label={`Move ${of} up`} onPress={onUp} path="M2 8L7 3L12 8" />
      <Act label={`Move ${of} down`} onPress={onDown} path="M2 5L7 10L12 5" />
      <Act label={`Remove ${of}`} onPress={onRemove} path="M3 3L11 11M11 3L3 11" />
    </div>
  )
}

function Act({ label, onPress, path }: { label: string; onPress?: () => void; path: string }) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      aria-disabled={onPress ? undefined : true}
      onClick={onPress}
      className={`grid h-8 w-6 place-items-center rounded ${onPress ? 'hover:bg-recess' : 'opacity-40'}`}
    >
      <svg viewBox="0 0 14 14" width="14" height="14" aria-hidden>
        <path d={path} fill="none" stroke="currentColor" strokeWidth="1.75" />
      </svg>
    </button>
  )
}
