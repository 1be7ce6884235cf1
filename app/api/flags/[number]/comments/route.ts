import { commentFlag } from '@/lib/flag/commands/comment'
import { flagAddress, flagComment } from '@/lib/flag/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'flag.comment',
  params: flagAddress,
  input: flagComment,
  handler: ({ db, actor, params, input }) => commentFlag(db, actor, params.number, input),
})
