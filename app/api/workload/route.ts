import { read } from '@/lib/http/route'
import { getWorkload } from '@/lib/study/queries/workload'

export const GET = read({ permission: 'bench.read', handler: ({ db, actor }) => getWorkload(db, actor) })
