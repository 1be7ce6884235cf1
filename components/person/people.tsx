'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { rolesInWords } from '@/components/shell/role-words'
import { countWord } from '@/components/ui/count-word'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Heading } from '@/components/ui/heading'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { toast } from '@/components/ui/toast'
import type { ClientRow } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/schema'
import { fetcher, send, type ClientError } from '@/lib/http/fetcher'
import type { Role } from '@/lib/auth/actor'
import type { PersonRow } from '@/lib/person/queries'
import { peopleKey, personKey } from '@/lib/person/schema'
import { Clients } from './clients'
import { ChangePerson, InvitePerson } from './person-dialogs'

export function People({ ownId }: { ownId: string }) {
  const { data: people = [], mutate } = useSWR<PersonRow[], ClientError>(peopleKey, fetcher)
  const { data: clients = [] } = useSWR<ClientRow[], ClientError>(clientsKey, fetcher)
  const [isInviting, setInviting] = useState(false)
  const [changingId, setChangingId] = useState<string | null>(null)
  const [error, setError] = useState<unknown>(null)

  const active = people.filter((person) => person.isActive)
  const waiting = active.filter((person) => !person.hasPassword && !person.isDemo)
  const changing = people.find((person) => person.id === changingId) ?? null

  async function inviteAgain(person: PersonRow) {
    setError(null)
    try {
      await send(`${personKey(person.id)}/invitation`, 'POST', {})
      toast(`A new link is on its way to ${person.name}`)
    } catch (thrown) {
      setError(thrown)
    }
  }

  return (
    <>
      <Heading
        crumb="Who may do what here"
        headline={
          <>
            <b>{active.length === 1 ? 'One person' : `${countWord(active.length, true)} people`}</b>{' '}
            {active.length === 1 ? 'keeps' : 'keep'} this notebook
            {waiting.length > 0 ? `; ${countWord(waiting.length)} invited, not yet answered` : ''}
          </>
        }
        sentence="A person may hold several roles; nobody changes their own. A closed account keeps its name on what it signed."
        acts={
          <Button kind="primary" onClick={() => setInviting(true)}>
            Invite someone
          </Button>
        }
      />
      <div className="mt-7 flex flex-col gap-3">
        <ErrorNote error={error} />
        <Ledger
          caption="People of the lab, their roles and whether they can sign in"
          columns={columnsFor(ownId, setChangingId, inviteAgain)}
          rows={people}
          rowKey={(person) => person.id}
          isQuiet={(person) => !person.isActive}
        />
      </div>
      <div className="mt-12 grid gap-x-16 gap-y-10 lg:grid-cols-2">
        <Section
          title="Clients"
          sentence="A client’s people see the studies shared with it, and its signed reports."
        >
          <Clients clients={clients} />
        </Section>
      </div>
      {isInviting ? (
        <InvitePerson
          clients={clients}
          onClose={() => setInviting(false)}
          onDone={(person) => {
            setInviting(false)
            toast(`The invitation is on its way to ${person.email}`)
            void mutate()
          }}
        />
      ) : null}
      {changing ? (
        <ChangePerson
          key={changing.id}
          person={changing}
          isOwn={changing.id === ownId}
          clients={clients}
          onClose={() => setChangingId(null)}
          onStale={() => void mutate()}
          onDone={(person) => {
            setChangingId(null)
            toast(`${person.name} is changed`)
            void mutate()
          }}
        />
      ) : null}
    </>
  )
}

function columnsFor(
  ownId: string,
  change: (id: string) => void,
  inviteAgain: (person: PersonRow) => Promise<void>,
): LedgerColumn<PersonRow>[] {
  return [
    {
      key: 'initials',
      title: <span className="sr-only">Initials</span>,
      width: '4rem',
      cell: (person) => <span className="font-mono font-700">{person.initials}</span>,
    },
    {
      key: 'name',
      title: 'Name',
      cell: (person) => (
        <>
          <span className="font-650">{person.name}</span>
          {person.id === ownId ? <span className="text-soft"> (you)</span> : null}
        </>
      ),
    },
    {
      key: 'roles',
      title: 'Roles',
      cell: (person) =>
        `${rolesInWords(person.roles as Role[])}${person.clientName ? `, ${person.clientName}` : ''}`,
    },
    { key: 'email', title: 'E-mail', from: 'desk', cell: (person) => person.email },
    { key: 'state', title: 'Signs in', from: 'tablet', cell: stateOf },
    {
      key: 'acts',
      title: <span className="sr-only">Acts</span>,
      align: 'right',
      cell: (person) => (
        <span className="inline-flex gap-4 whitespace-nowrap">
          {person.isActive && !person.hasPassword && !person.isDemo ? (
            <Button
              kind="link"
              onClick={() => inviteAgain(person)}
              aria-label={`Send the link to ${person.name} again`}
            >
              Send again
            </Button>
          ) : null}
          <Button kind="link" onClick={() => change(person.id)} aria-label={`Change ${person.name}`}>
            Change
          </Button>
        </span>
      ),
    },
  ]
}

function stateOf(person: PersonRow): string {
  if (!person.isActive) return 'closed'
  if (person.isDemo) return 'by one press'
  return person.hasPassword ? 'with a password' : 'invited, not yet answered'
}
