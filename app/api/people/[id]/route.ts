import { read, write } from '@/lib/http/route'
import { changePerson } from '@/lib/person/commands'
import { getPerson } from '@/lib/person/queries'
import { personId, personToChange } from '@/lib/person/schema'

export const GET = read({
  permission: 'person.manage',
  params: personId,
  handler: ({ db, actor, params }) => getPerson(db, actor, params.id),
})

export const PATCH = write({
  permission: 'person.manage',
  params: personId,
  input: personToChange,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => changePerson(db, actor, params.id, input),
})
