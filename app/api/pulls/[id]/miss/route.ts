import { write } from '@/lib/http/route'
import { missJar } from '@/lib/pull/commands/miss-jar'
import { missedJar, pullJarAddress } from '@/lib/pull/schema'

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: missedJar,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => missJar(db, actor, params.id, input),
})
