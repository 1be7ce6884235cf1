'use client'

import { lazy, Suspense, useState, type ComponentProps } from 'react'
import { useLoadAhead, whenReached } from '@/components/ui/load-ahead'
import type { Role } from '@/lib/auth/actor'
import { rolesInWords } from './role-words'

export type Who = {
  personId: string
  name: string
  initials: string
  email: string
  roles: Role[]
  /** Came in by one press and has no password. */
  demoPersonId: string | null
}

const opened = () => import('./person-menu-opened')
const Opened = lazy(async () => ({ default: (await whenReached(opened)).PersonMenuOpened }))

export function PersonMenu({ who }: { who: Who }) {
  const [isPressed, setPressed] = useState(false)
  useLoadAhead(opened)
  const closed = (
    <PersonButton who={who} aria-haspopup="menu" aria-expanded={false} onClick={() => setPressed(true)} />
  )
  if (!isPressed) return closed
  return (
    <Suspense fallback={closed}>
      <Opened who={who} />
    </Suspense>
  )
}

export function PersonButton({ who, ...props }: { who: Who } & ComponentProps<'button'>) {
  return (
    <button
      type="button"
      data-screen-only
      {...props}
      className="relative shrink-0 whitespace-nowrap after:absolute after:-inset-x-2 after:inset-y-[calc((1.4em-var(--hit))/2)] after:content-[''] hover:underline hover:underline-offset-4"
    >
      {who.initials}, {rolesInWords(who.roles)}
    </button>
  )
}
