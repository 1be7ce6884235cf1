import { read, write } from '@/lib/http/route'
import { invitePerson } from '@/lib/person/commands'
import { listPeople } from '@/lib/person/queries'
import { personList } from '@/lib/person/rules'
import { personToInvite } from '@/lib/person/schema'

export const GET = read({
  permission: 'person.manage',
  query: personList.query,
  handler: ({ db, actor, query }) => listPeople(db, actor, query),
})

export const POST = write({
  permission: 'person.manage',
  input: personToInvite,
  handler: ({ db, actor, input }) => invitePerson(db, actor, input),
})
