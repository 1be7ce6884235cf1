'use client'

import { useState } from 'react'
import { rolesInWords } from '@/components/shell/role-words'
import { Busy } from '@/components/ui/busy'
import { ErrorNote } from '@/components/ui/error-note'
import type { Role } from '@/lib/auth/actor'
import { send } from '@/lib/http/fetcher'
import type { DemoPerson } from '@/lib/person/queries'

const work: Record<Role, string> = {
  technician: 'measures today’s jars at the Bench',
  formulator: 'plans studies, answers flags',
  qa: 'checks the record, signs cases',
  manager: 'keeps people, stations, instruments',
  client: 'reads its own signed reports',
}

/** One press, no password: there only while the demo is on. */
export function DemoPeople({ people, to }: { people: DemoPerson[]; to: string }) {
  const [coming, setComing] = useState<string | null>(null)
  const [error, setError] = useState<unknown>(null)

  async function comeIn(person: DemoPerson) {
    setComing(person.id)
    setError(null)
    try {
      await send('/api/session', 'POST', { demoPersonId: person.id })
      window.location.assign(to)
    } catch (thrown) {
      setError(thrown)
      setComing(null)
    }
  }

  return (
    <>
      <ul className="grid gap-2 sm:gap-x-8 sm:gap-y-[14px] lg:grid-cols-2">
        {people.map((person) => (
          <li key={person.id}>
            <button
              type="button"
              aria-busy={coming === person.id || undefined}
              onClick={() => (coming ? undefined : comeIn(person))}
              className="flex min-h-14 w-full items-center gap-4 rounded border-[1.5px] border-b-4 border-rule border-b-ink bg-paper px-3 text-left active:bg-typed sm:min-h-[78px] sm:px-4 sm:hover:bg-typed"
            >
              <span className="w-[34px] font-mono text-26 font-700 sm:w-[42px] sm:text-30">
                {person.initials}
              </span>
              <span className="flex min-w-0 flex-1 flex-wrap items-baseline justify-between gap-x-2 sm:justify-start">
                <span className="text-18 font-650 sm:text-17">{person.name}</span>
                <span className="text-17 text-soft">
                  {rolesInWords(person.roles as Role[])}
                  {person.clientName ? <span className="hidden sm:inline">, {person.clientName}</span> : null}
                </span>
                <span className="hidden w-full text-15 sm:block">
                  {work[(person.roles[0] ?? 'technician') as Role]}
                </span>
              </span>
              {coming === person.id ? (
                <Busy />
              ) : (
                <svg viewBox="0 0 12 22" width="12" height="22" aria-hidden className="shrink-0">
                  <path d="M1.5 1L10.5 11L1.5 21" fill="none" stroke="currentColor" strokeWidth="3" />
                </svg>
              )}
            </button>
          </li>
        ))}
      </ul>
      <ErrorNote error={error} />
    </>
  )
}
