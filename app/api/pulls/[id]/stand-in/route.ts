import { read, write } from '@/lib/http/route'
import { takePlace } from '@/lib/pull/commands/take-place'
import { whatFollows } from '@/lib/pull/queries/what-follows'
import { pullJarAddress, standIn } from '@/lib/pull/schema'

export const GET = read({
  permission: 'bench.read',
  params: pullJarAddress,
  handler: ({ db, params }) => whatFollows(db, params.id),
})

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: standIn,
  handler: ({ db, actor, params, input }) => takePlace(db, actor, params.id, input),
})
