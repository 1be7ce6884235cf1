import { listFlags } from '@/lib/flag/queries/list'
import { flagList } from '@/lib/flag/rules/list'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'reading.read',
  query: flagList.query,
  handler: ({ db, actor, query }) => listFlags(db, actor, query),
})
