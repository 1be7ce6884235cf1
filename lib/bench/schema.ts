import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

export const benchDay = z.object({ today: calendarDay().optional() })
export const benchJarAddress = z.object({ code: z.string().trim().min(1).max(60) })
