import { todaysBench } from '@/lib/bench/queries/today'
import { benchDay } from '@/lib/bench/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'bench.read',
  query: benchDay,
  handler: ({ db, actor, query }) => todaysBench(db, actor, query),
})
