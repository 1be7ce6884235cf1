import { removeHoliday } from '@/lib/holiday/commands'
import { holidayAddress } from '@/lib/holiday/schema'
import { write } from '@/lib/http/route'

export const DELETE = write({
  permission: 'lab.manage',
  params: holidayAddress,
  handler: ({ db, actor, params }) => removeHoliday(db, actor, params.id),
})
