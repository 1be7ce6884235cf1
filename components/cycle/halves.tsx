'use client'

import { useId, useState } from 'react'
import { counted } from '@/lib/study/rules/words'
import { HalfList, halvesOf, type HalfListProps } from './half-list'

/** The history of a place, opened where it stands: it needs no other page, which would need the network. */
export function Halves(props: HalfListProps) {
  const [isOpen, setOpen] = useState(false)
  const id = useId()
  const count = halvesOf(props.place).length
  if (count === 0) return null
  return (
    <div className="w-full">
      <button
        type="button"
        aria-expanded={isOpen}
        aria-controls={id}
        onClick={() => setOpen(!isOpen)}
        className="min-h-16 px-1 text-17 underline underline-offset-4"
      >
        {isOpen
          ? 'Fold up'
          : `${count === 1 ? 'The one half' : `All ${counted(count, 'half', 'halves')}`} so far`}
        <span className="sr-only"> of {props.place.studyCode}</span>
      </button>
      <div id={id}>{isOpen ? <HalfList {...props} /> : null}</div>
    </div>
  )
}
