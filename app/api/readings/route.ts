import { read } from '@/lib/http/route'
import { listReadings } from '@/lib/reading/queries/list'
import { readingFilter } from '@/lib/reading/schema/change'

export const GET = read({
  permission: 'reading.read',
  query: readingFilter,
  handler: ({ db, actor, query }) => listReadings(db, actor, query.study, query.attribute),
})
