import { findByName } from '@/lib/finder/queries'
import { finderQuery } from '@/lib/finder/schema'
import { read } from '@/lib/http/route'

/** Everybody may look; what is found is what the person may see. */
export const GET = read({
  permission: 'profile.own',
  query: finderQuery,
  handler: ({ db, actor, query }) => findByName(db, actor, query.q),
})
