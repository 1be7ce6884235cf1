import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { People } from '@/components/person/people'
import { listClients } from '@/lib/client/queries'
import { clientsKey } from '@/lib/client/keys'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listPeople } from '@/lib/person/queries'
import { personList } from '@/lib/person/rules'

export const permission = 'person.manage'
export const metadata: Metadata = { title: 'People' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function PeoplePage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = personList.query.parse(await searchParams)
  const people = await listPeople(db, actor, query)
  const clients = await listClients(db, actor)
  const { timeZone } = await getLab(db)
  return (
    <SWRConfig value={{ fallback: { [clientsKey]: clients } }}>
      <People page={people} query={query} timeZone={timeZone} ownId={actor.personId} />
    </SWRConfig>
  )
}
