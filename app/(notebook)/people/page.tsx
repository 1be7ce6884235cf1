import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { People } from '@/components/person/people'
import { listClients } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/schema'
import { page } from '@/lib/http/page'
import { listPeople } from '@/lib/person/queries'
import { peopleKey } from '@/lib/person/schema'

export const permission = 'person.manage'
export const metadata: Metadata = { title: 'People' }

export default async function PeoplePage() {
  const { actor, db } = await page(permission)
  const people = await listPeople(db, actor)
  const clients = await listClients(db, actor)
  return (
    <SWRConfig value={{ fallback: { [peopleKey]: people, [clientsKey]: clients } }}>
      <People ownId={actor.personId} />
    </SWRConfig>
  )
}
