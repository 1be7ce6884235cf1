import { addHolidays } from '@/lib/holiday/commands'
import { listHolidays } from '@/lib/holiday/queries'
import { newHolidays } from '@/lib/holiday/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({ permission: 'bench.read', handler: ({ db }) => listHolidays(db) })

export const POST = write({
  permission: 'lab.manage',
  input: newHolidays,
  handler: ({ db, actor, input }) => addHolidays(db, actor, input),
})
