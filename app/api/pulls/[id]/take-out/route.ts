import { write } from '@/lib/http/route'
import { takeOut } from '@/lib/pull/commands/take-out'
import { takingOut, pullJarAddress } from '@/lib/pull/schema'

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: takingOut,
  handler: ({ db, actor, params, input }) => takeOut(db, actor, params.id, input),
})
