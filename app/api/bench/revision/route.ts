import { getRevision } from '@/lib/bench/queries/revision'
import { read } from '@/lib/http/route'

export const GET = read({ permission: 'bench.read', handler: ({ db, actor }) => getRevision(db, actor) })
