import { listFlags } from '@/lib/flag/queries/list'
import { flagFilter } from '@/lib/flag/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'reading.read',
  query: flagFilter,
  handler: ({ db, actor, query }) => listFlags(db, actor, query),
})
