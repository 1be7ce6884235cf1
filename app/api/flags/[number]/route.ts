import { getFlag } from '@/lib/flag/queries/one'
import { flagAddress } from '@/lib/flag/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'reading.read',
  params: flagAddress,
  handler: ({ db, actor, params }) => getFlag(db, actor, params.number),
})
