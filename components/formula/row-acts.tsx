'use client'

import type { PointerEvent } from 'react'

type Props = {
  /** What the acts belong to: "Squalane", "step 3". */
  of: string
  onUp?: () => void
  onDown?: () => void
  onRemove: () => void
  onGrip: (event: PointerEvent<HTMLElement>) => void
}

/** A grip to drag by, up, down, out: quiet until the row is touched, always there for the keyboard. */
export function RowActs({ of, onUp, onDown, onRemove, onGrip }: Props) {
  return (
    <div className="flex justify-end opacity-55 focus-within:opacity-100 group-focus-within:opacity-100 group-hover:opacity-100">
      {/* Pressed with a pointer only; up and down are what the keyboard and a screen reader use. */}
      <span
        aria-hidden
        data-grip
        title={`Drag ${of}`}
        onPointerDown={onGrip}
        className="grid h-8 w-[18px] cursor-grab touch-none place-items-center rounded hover:bg-recess active:cursor-grabbing"
      >
        <svg viewBox="0 0 14 14" width="14" height="14">
          <path d="M2 4H12M2 7H12M2 10H12" stroke="currentColor" strokeWidth="1.5" />
        </svg>
      </span>
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
      className={`grid h-8 w-[22px] place-items-center rounded ${onPress ? 'hover:bg-recess' : 'opacity-40'}`}
    >
      <svg viewBox="0 0 14 14" width="14" height="14" aria-hidden>
        <path d={path} fill="none" stroke="currentColor" strokeWidth="1.75" />
      </svg>
    </button>
  )
}
