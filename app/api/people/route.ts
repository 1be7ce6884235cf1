import { read, write } from '@/lib/http/route'
import { invitePerson } from '@/lib/person/commands'
import { listPeople } from '@/lib/person/queries'
import { personToInvite } from '@/lib/person/schema'

export const GET = read({ permission: 'person.manage', handler: ({ db, actor }) => listPeople(db, actor) })

export const POST = write({
  permission: 'person.manage',
  input: personToInvite,
  handler: ({ db, actor, input }) => invitePerson(db, actor, input),
})
