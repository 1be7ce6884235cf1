'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import useSWR from 'swr'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { rolesInWords } from '@/components/shell/role-words'
import { countWord } from '@/components/ui/count-word'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { ErrorNote } from '@/components/ui/error-note'
import { Heading } from '@/components/ui/heading'
import type { LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import { toast } from '@/components/ui/toast'
import type { ClientRow } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/keys'
import { fetcher, send, type ClientError } from '@/lib/http/fetcher'
import type { Role } from '@/lib/auth/actor'
import type { ListQuery } from '@/lib/list/schema'
import type { PeoplePage, PersonRow } from '@/lib/person/queries'
import { personList } from '@/lib/person/rules'
import { personKey } from '@/lib/person/keys'
import { Clients } from './clients'
import { ChangePerson, InvitePerson } from './person-dialogs'

type Props = { page: PeoplePage; query: ListQuery; timeZone: string; ownId: string }

export function People({ page, query, timeZone, ownId }: Props) {
  const router = useRouter()
  const { data: clients = [] } = useSWR<ClientRow[], ClientError>(clientsKey, fetcher)
  const [isInviting, setInviting] = useState(false)
  const [changingId, setChangingId] = useState<string | null>(null)
  const [error, setError] = useState<unknown>(null)

  const { active, waiting } = page.counts
  const changing = page.rows.find((person) => person.id === changingId) ?? null

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
            <b>{active === 1 ? 'One person' : `${countWord(active, true)} people`}</b>{' '}
            {active === 1 ? 'keeps' : 'keep'} this notebook
            {waiting > 0 ? `; ${countWord(waiting)} invited, not yet answered` : ''}
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
        <ListTools
          list={personList}
          path="/people"
          query={query}
          choices={page.choices}
          searchLabel="Find a person"
          placeholder="Name, e-mail, initials"
          total={page.total}
        />
        <ListLedger
          list={personList}
          path="/people"
          query={query}
          page={page}
          caption="People of the lab, their roles and whether they can sign in"
          timeZone={timeZone}
          rowKey={(person) => person.id}
          isQuiet={(person) => !person.isActive}
          cells={cellsFor(ownId)}
          after={[acts(setChangingId, inviteAgain)]}
          empty={
            <Empty
              title={query.q ? `Nobody here has ${query.q}.` : 'Nobody here is of that kind.'}
              act={<LinkButton href="/people">Show everybody</LinkButton>}
            />
          }
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
            router.refresh()
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
          onStale={() => router.refresh()}
          onDone={(person) => {
            setChangingId(null)
            toast(`${person.name} is changed`)
            router.refresh()
          }}
        />
      ) : null}
    </>
  )
}

function cellsFor(ownId: string): Parameters<typeof ListLedger<PersonRow>>[0]['cells'] {
  return {
    initials: {
      width: '4.5rem',
      cell: (person) => <span className="font-mono font-700">{person.initials}</span>,
    },
    name: {
      cell: (person) => (
        <>
          <span className="font-650">{person.name}</span>
          {person.id === ownId ? <span className="text-soft"> (you)</span> : null}
        </>
      ),
    },
    roles: {
      cell: (person) =>
        `${rolesInWords(person.roles as Role[])}${person.clientName ? `, ${person.clientName}` : ''}`,
    },
    email: { from: 'desk' },
    state: { from: 'tablet' },
  }
}

function acts(
  change: (id: string) => void,
  inviteAgain: (person: PersonRow) => Promise<void>,
): LedgerColumn<PersonRow> {
  return {
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
  }
}
