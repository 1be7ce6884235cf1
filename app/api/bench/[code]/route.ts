import { getBenchJar } from '@/lib/bench/queries/jar'
import { benchJarAddress } from '@/lib/bench/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'bench.read',
  params: benchJarAddress,
  handler: ({ db, actor, params }) => getBenchJar(db, actor, params.code),
})
