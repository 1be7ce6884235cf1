import { write } from '@/lib/http/route'
import { inviteAgain } from '@/lib/person/commands'
import { personId } from '@/lib/person/schema'

export const POST = write({
  permission: 'person.manage',
  params: personId,
  handler: ({ db, actor, params }) => inviteAgain(db, actor, params.id),
})
