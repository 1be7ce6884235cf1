import { read } from '@/lib/http/route'
import { listTrail } from '@/lib/trail/queries'
import { trailQuery } from '@/lib/trail/schema'

export const GET = read({
  permission: 'trail.read',
  query: trailQuery,
  handler: ({ db, actor, query }) => listTrail(db, actor, query),
})
