import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { People } from '@/components/person/people'
import { listClients } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/schema'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/schema'
import { listPeople } from '@/lib/person/queries'
import { peopleKey } from '@/lib/person/schema'

export const permission = 'person.manage'
export const metadata: Metadata = { title: 'People' }

export default async function PeoplePage() {
  const { actor, db } = await page(permission)
  const people = await listPeople(db, actor)
  const clients = await listClients(db, actor)
  const lab = await getLab(db)
  return (
    <SWRConfig value={{ fallback: { [peopleKey]: people, [clientsKey]: clients, [labKey]: lab } }}>
      <People ownId={actor.personId} timeZones={Intl.supportedValuesOf('timeZone')} />
    </SWRConfig>
  )
}
