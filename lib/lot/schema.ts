import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

const lotFields = {
  kind: z.enum(['buffer', 'check fluid'], 'Choose buffer or check fluid.'),
  name: z.string().trim().min(1, 'Give its name, such as buffer 4.01.').max(80),
  lot: z.string().trim().min(1, 'Give the lot as it stands on the bottle.').max(60),
  /** pH or mPa·s by temperature, as its certificate has them. */
  certificate: z
    .array(
      z.object({
        temperatureC: z.number('Type the temperature.').min(0).max(100),
        value: z.number('Type the value of the certificate.').positive(),
      }),
    )
    .min(1, 'One value of the certificate at least.')
    .max(40)
    .refine((lines) => new Set(lines.map((line) => line.temperatureC)).size === lines.length, {
      message: 'A temperature stands twice.',
    }),
  expiresOn: calendarDay('Give the day on which it expires.'),
  openedOn: calendarDay().nullable().default(null),
  /** Once opened; null where only the expiry counts. */
  keepsDays: z.number().int().positive('It keeps for some days.').max(3650).nullable().default(null),
}

export const newLot = z.object({ id: z.uuid(), ...lotFields })
export type NewLot = z.input<typeof newLot>

export const changedLot = z.object({
  version: z.number().int().positive(),
  openedOn: lotFields.openedOn,
  isUsedUp: z.boolean(),
})
export const lotAddress = z.object({ id: z.uuid() })
