import { read } from '@/lib/http/route'
import { listTrail } from '@/lib/trail/queries'
import { trailList } from '@/lib/trail/rules/list'

export const GET = read({
  permission: 'trail.read',
  query: trailList.query,
  handler: ({ db, actor, query }) => listTrail(db, actor, query),
})
