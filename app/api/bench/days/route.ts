import { benchDays } from '@/lib/bench/queries/days'
import { read } from '@/lib/http/route'

export const GET = read({ permission: 'bench.read', handler: ({ db, actor }) => benchDays(db, actor) })
