import { calendarDay, instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

const mPas = (what: string) => z.number(`Type ${what} in mPa·s.`).positive('A viscosity is above nothing.')
const grams = (what: string) => z.number(`Type ${what} in g.`).positive('A weight is above nothing.')

/** A buffer by its standard table, by the certificate of its lot, or by the value typed from there. */
const bufferPoint = z
  .object({
    bufferPh: z
      .number('Type the pH of the buffer.')
      .min(0, 'pH runs from 0 to 14.')
      .max(14, 'pH runs from 0 to 14.')
      .optional(),
    buffer: z.enum(['phthalate', 'phosphate', 'borax']).optional(),
    lotId: z.uuid().optional(),
    mV: z
      .number('Type what the meter shows, in mV.')
      .min(-700, 'A meter shows −700 to 700 mV.')
      .max(700, 'A meter shows −700 to 700 mV.'),
  })
  .refine((point) => [point.bufferPh, point.buffer, point.lotId].some((given) => given !== undefined), {
    path: ['bufferPh'],
    message: 'Choose the buffer, or type its pH.',
  })

/** Two or three buffers, as the meter showed them. */
const meterCheck = z.object({
  kind: z.literal('meter'),
  temperatureC: z
    .number('Type the temperature of the buffers.')
    .min(0, 'Buffers have values from 0 to 60 °C.')
    .max(60, 'Buffers have values from 0 to 60 °C.'),
  points: z.array(bufferPoint).min(2, 'Two buffers at least.').max(5),
})

/** A fluid of known viscosity, read with one spindle. Its value is typed, or its lot's at the temperature. */
const viscometerCheck = z
  .object({
    kind: z.literal('viscometer'),
    spindle: z.string().trim().min(1, 'Say which spindle.').max(60),
    rpm: z.number('Type the speed in rpm.').positive('A speed is above nothing.'),
    fluidMPas: mPas("the fluid's value").optional(),
    lotId: z.uuid().optional(),
    temperatureC: z.number('Type the temperature of the fluid.').min(0).max(100).optional(),
    readMPas: mPas('what was read'),
    allowedPercent: z.number().positive().max(20).default(2),
  })
  .refine((check) => check.lotId === undefined || check.temperatureC !== undefined, {
    path: ['temperatureC'],
    message: 'Type the temperature of the fluid: its value depends on it.',
  })
  .refine((check) => check.lotId !== undefined || check.fluidMPas !== undefined, {
    path: ['fluidMPas'],
    message: "Type the fluid's value in mPa·s, or choose its lot.",
  })

/** A weight of known mass. */
const balanceCheck = z.object({
  kind: z.literal('balance'),
  weightG: grams("the weight's mass"),
  readG: grams('what the balance shows'),
  allowedG: z.number().positive().default(0.01),
})

export const newCalibration = z.object({
  id: z.uuid(),
  instrumentId: z.uuid(),
  /** When it was done; now if left out, never later than now. */
  calibratedAt: instant.optional(),
  dueOn: calendarDay('Say until when it holds.'),
  check: z.discriminatedUnion('kind', [meterCheck, viscometerCheck, balanceCheck]),
  note: z.string().trim().max(1000).default(''),
  /** The person knows which readings a doubtful result reaches back to. */
  isConfirmed: z.boolean().default(false),
})
export type NewCalibration = z.input<typeof newCalibration>
export type CalibrationCheck = z.output<typeof newCalibration>['check']
