import { write } from '@/lib/http/route'
import { logJar } from '@/lib/pull/commands/log-jar'
import { pullJarAddress } from '@/lib/pull/schema'
import { readingsOfJar } from '@/lib/reading/schema/entry'

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: readingsOfJar,
  reason: (input) => input.resolution?.reason,
  handler: ({ db, actor, params, input }) => logJar(db, actor, { ...input, pullJarId: params.id }),
})
