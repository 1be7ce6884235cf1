import { read, write } from '@/lib/http/route'
import { weighFilledJar } from '@/lib/jar/commands/weigh-filled'
import { getJar } from '@/lib/jar/queries/jars'
import { filledJar, jarAddress } from '@/lib/jar/schema'

export const GET = read({
  permission: 'bench.read',
  params: jarAddress,
  handler: ({ db, actor, params }) => getJar(db, actor, params.code),
})

export const PUT = write({
  permission: 'reading.log',
  params: jarAddress,
  input: filledJar,
  handler: ({ db, actor, params, input }) => weighFilledJar(db, actor, params.code, input),
})
