import { reviewDay } from '@/lib/day/commands/review-day'
import { dayAddress, dayReview } from '@/lib/day/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'day.review',
  params: dayAddress,
  input: dayReview,
  reason: (input) => input.remark || undefined,
  handler: ({ db, actor, params, input }) => reviewDay(db, actor, params.day, input),
})
