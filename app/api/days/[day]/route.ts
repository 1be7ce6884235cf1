import { getDay } from '@/lib/day/queries/day'
import { dayAddress } from '@/lib/day/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'reading.read',
  params: dayAddress,
  handler: ({ db, actor, params }) => getDay(db, actor, params.day),
})
