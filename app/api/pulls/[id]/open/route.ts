import { write } from '@/lib/http/route'
import { openJar } from '@/lib/pull/commands/open-jar'
import { openingOfJar, pullJarAddress } from '@/lib/pull/schema'

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: openingOfJar,
  handler: ({ db, actor, params, input }) => openJar(db, actor, params.id, input),
})
