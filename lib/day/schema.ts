import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

export const dayAddress = z.object({ day: calendarDay() })

/** What was seen, by id: an entry that came meanwhile is not reviewed unseen. */
export const dayReview = z.object({
  id: z.uuid(),
  entryIds: z.array(z.uuid()).min(1, 'On this day nothing was entered.').max(20_000),
  remark: z.string().trim().max(1000).default(''),
})
export type DayReview = z.output<typeof dayReview>
