'use client'

import { useId, useState } from 'react'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { counted } from '@/lib/study/rules/words'
import { halvesOf } from './half-list'

/** Whether the history of a place is open; it opens where it stands, as another page would need the network. */
export function useHalves(place: CyclePlace) {
  const [isOpen, setOpen] = useState(false)
  const id = useId()
  const count = halvesOf(place).length
  return { isOpen: isOpen && count > 0, id, count, toggle: () => setOpen(!isOpen) }
}

type Props = ReturnType<typeof useHalves> & { code: string }

export function HalvesToggle({ isOpen, id, count, toggle, code }: Props) {
  if (count === 0) return null
  return (
    <button
      type="button"
      aria-expanded={isOpen}
      aria-controls={isOpen ? id : undefined}
      onClick={toggle}
      className="min-h-16 text-17 underline underline-offset-4"
    >
      {isOpen ? 'Fold up' : count === 1 ? 'The one half so far' : `All ${counted(count, 'half', 'halves')}`}
      <span className="sr-only"> of {code}</span>
    </button>
  )
}
