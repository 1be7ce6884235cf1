import { read } from '@/lib/http/route'
import { readingHistory } from '@/lib/reading/queries/history'
import { readingAddress } from '@/lib/reading/schema/change'

export const GET = read({
  permission: 'reading.read',
  params: readingAddress,
  handler: ({ db, actor, params }) => readingHistory(db, actor, params.id),
})
