import * as z from '@/lib/http/zod'

const day = z.iso
  .date('Write the day as 2026-12-24.')
  .refine((text) => text >= '2000-01-01' && text <= '2100-12-31', 'Choose a day between 2000 and 2100.')

export const mostHolidays = 400

export const newHolidays = z.object({
  holidays: z
    .array(z.object({ id: z.uuid(), day, name: z.string().trim().min(1, 'Name the holiday.').max(80) }))
    .min(1, 'Type at least one day.')
    .max(mostHolidays, `Send at most ${mostHolidays} days at once.`)
    .refine((list) => new Set(list.map((one) => one.day)).size === list.length, 'A day stands twice.'),
})
export type NewHolidays = z.input<typeof newHolidays>

export const holidayAddress = z.object({ id: z.uuid() })
