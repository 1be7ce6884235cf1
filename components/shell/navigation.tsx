'use client'

import Link, { useLinkStatus } from 'next/link'
import { useEffect, useRef } from 'react'
import { isAt, type Place } from './places'

/** Where one can go, standing on the shelf. Too many for the width: they move along their line. */
export function Navigation({
  places,
  path,
  className,
}: {
  places: Place[]
  path: string
  className?: string
}) {
  const list = useRef<HTMLElement>(null)

  useEffect(() => {
    const here = list.current?.querySelector<HTMLElement>('[aria-current]')
    const row = list.current
    if (here && row) row.scrollLeft = here.offsetLeft - (row.clientWidth - here.clientWidth) / 2
  }, [path])

  return (
    <nav
      ref={list}
      aria-label="Notebook"
      className={`relative flex ${places.length > 12 ? 'gap-x-2.5' : places.length > 11 ? 'gap-x-3.5' : 'gap-x-[22px]'} overflow-x-auto text-15 [scrollbar-width:none] ${className ?? ''}`}
    >
      {places.map((place) => {
        const isHere = isAt(path, place)
        return (
          <Link
            key={place.href}
            href={place.href}
            aria-current={isHere ? 'page' : undefined}
            className={`relative flex h-11 shrink-0 items-end pb-1.5 -outline-offset-2 ${
              isHere
                ? 'font-750 after:absolute after:-inset-x-0.5 after:bottom-0 after:h-1 after:bg-ink'
                : 'hover:underline hover:underline-offset-4'
            }`}
          >
            {place.label}
            <Coming />
          </Link>
        )
      })}
    </nav>
  )
}

/** The page is on its way: its place on the shelf is dotted until it stands there. */
function Coming() {
  const { pending } = useLinkStatus()
  if (!pending) return null
  return (
    <span
      role="status"
      aria-label="Fetching the page"
      className="absolute -inset-x-0.5 bottom-0 border-b-4 border-dotted border-ink"
    />
  )
}
