'use client'

import { lazy, Suspense, useEffect, useRef, useState } from 'react'
import { useLoadAhead, whenReached } from '@/components/ui/load-ahead'
import type { Place } from './places'

const search = () => import('./finder-search')
const FinderSearch = lazy(async () => ({ default: (await whenReached(search)).FinderSearch }))

/** Any formula, batch, study, jar, ingredient or page by part of its name or code: Ctrl-K, type, Enter. */
export function Finder({ places }: { places: Place[] }) {
  const [isOpen, setOpen] = useState(false)
  const button = useRef<HTMLButtonElement>(null)
  useLoadAhead(search)
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey || event.shiftKey) return
      if (event.key.toLowerCase() !== 'k') return
      event.preventDefault()
      setOpen(true)
    }
    window.addEventListener('keydown', listen)
    return () => window.removeEventListener('keydown', listen)
  }, [])
  return (
    <>
      <button
        ref={button}
        type="button"
        aria-haspopup="dialog"
        aria-expanded={isOpen}
        aria-keyshortcuts="Control+K Meta+K"
        onClick={() => setOpen(true)}
        className="flex h-11 items-end pb-[3px] text-15 -outline-offset-2 hover:underline hover:underline-offset-4"
      >
        Find
      </button>
      {isOpen ? (
        <Suspense fallback={null}>
          <FinderSearch
            places={places}
            onClose={() => setOpen(false)}
            onClosed={() => button.current?.focus()}
          />
        </Suspense>
      ) : null}
    </>
  )
}
