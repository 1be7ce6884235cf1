'use client'

import type { KeyboardEvent } from 'react'

export function Nudge({ label, says, onPress }: { label: string; says: string; onPress: () => void }) {
  return (
    <button
      type="button"
      aria-label={says}
      onClick={onPress}
      className="min-h-16 rounded border-2 border-rule bg-paper text-17 active:bg-recess"
    >
      {label}
    </button>
  )
}

const steps = [
  { label: 'left 10', says: 'left by ten pixels', dx: -10, dy: 0 },
  { label: 'left 1', says: 'left by one pixel', dx: -1, dy: 0 },
  { label: 'right 1', says: 'right by one pixel', dx: 1, dy: 0 },
  { label: 'right 10', says: 'right by ten pixels', dx: 10, dy: 0 },
  { label: 'up 10', says: 'up by ten pixels', dx: 0, dy: -10 },
  { label: 'up 1', says: 'up by one pixel', dx: 0, dy: -1 },
  { label: 'down 1', says: 'down by one pixel', dx: 0, dy: 1 },
  { label: 'down 10', says: 'down by ten pixels', dx: 0, dy: 10 },
]

/** Moves what is picked both ways, by ones and tens. */
export function MovePad({ name, onMove }: { name: string; onMove: (dx: number, dy: number) => void }) {
  return (
    <div className="grid grid-cols-4 gap-3" role="group" aria-label={`Move ${name}`}>
      {steps.map(({ label, says, dx, dy }) => (
        <Nudge key={label} label={label} says={`${name} ${says}`} onPress={() => onMove(dx, dy)} />
      ))}
    </div>
  )
}

/** The same by arrow keys, by tens with Shift; null for any other key. */
export function moveOfKey({ key, shiftKey }: KeyboardEvent): { dx: number; dy: number } | null {
  const by = shiftKey ? 10 : 1
  const moves: Record<string, { dx: number; dy: number }> = {
    ArrowLeft: { dx: -by, dy: 0 },
    ArrowRight: { dx: by, dy: 0 },
    ArrowUp: { dx: 0, dy: -by },
    ArrowDown: { dx: 0, dy: by },
  }
  return moves[key] ?? null
}
