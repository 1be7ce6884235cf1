import { listDays } from '@/lib/day/queries/days'
import { read } from '@/lib/http/route'

export const GET = read({ permission: 'reading.read', handler: ({ db, actor }) => listDays(db, actor) })
