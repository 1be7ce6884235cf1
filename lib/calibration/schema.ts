import * as z from '@/lib/http/zod'

/** Two or three buffers, as the meter showed them. */
const meterCheck = z.object({
  kind: z.literal('meter'),
  temperatureC: z.number().min(0).max(60),
  points: z
    .array(z.object({ bufferPh: z.number().min(0).max(14), mV: z.number().min(-700).max(700) }))
    .min(2, 'Two buffers at least.')
    .max(5),
})

/** A fluid of known viscosity, read with one spindle. */
const viscometerCheck = z.object({
  kind: z.literal('viscometer'),
  spindle: z.string().trim().min(1).max(60),
  rpm: z.number().positive(),
  fluidMPas: z.number().positive(),
  readMPas: z.number().positive(),
  allowedPercent: z.number().positive().max(20).default(2),
})

/** A weight of known mass. */
const balanceCheck = z.object({
  kind: z.literal('balance'),
  weightG: z.number().positive(),
  readG: z.number().positive(),
  allowedG: z.number().positive().default(0.01),
})

export const newCalibration = z.object({
  id: z.uuid(),
  instrumentId: z.uuid(),
  /** When it was done; now if left out, never later than now. */
  calibratedAt: z.iso.datetime({ offset: true }).optional(),
  dueOn: z.iso.date(),
  check: z.discriminatedUnion('kind', [meterCheck, viscometerCheck, balanceCheck]),
  note: z.string().trim().max(1000).default(''),
})
export type NewCalibration = z.input<typeof newCalibration>
export type CalibrationCheck = z.output<typeof newCalibration>['check']

export const calibrationKeys = { list: '/api/calibrations' }
