import { instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

const above = (what: string) => z.number(`Type ${what}.`).positive('This is above nothing.')

/** What is tried each morning before work: one figure that is known, and how far off it may be. */
export const dailyCheck = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('meter'),
    /** A standard buffer, whose value at the temperature comes from the table; else `bufferPh`. */
    buffer: z.enum(['phthalate', 'phosphate', 'borax']).nullable().default(null),
    bufferPh: z.number('Type the pH of the buffer.').min(0).max(14).nullable().default(null),
    allowedPh: above('how far it may be off').max(1, 'More than 1 pH is no check.'),
  }),
  z.object({
    kind: z.literal('viscometer'),
    spindle: z.string().trim().min(1, 'Say which spindle.').max(60),
    rpm: above('the speed in rpm'),
    temperatureC: z.number('Type the temperature of the fluid.').min(0).max(100),
    fluidMPas: above("the fluid's value in mPa·s"),
    allowedPercent: above('how far it may be off, in %').max(20),
  }),
  z.object({
    kind: z.literal('balance'),
    weightG: above("the weight's mass in g"),
    allowedG: above('how far it may be off, in g'),
  }),
])
export type DailyCheck = z.output<typeof dailyCheck>

const hasBuffer = (fields: { dailyCheck: DailyCheck | null }) =>
  fields.dailyCheck?.kind !== 'meter' ||
  fields.dailyCheck.buffer !== null ||
  fields.dailyCheck.bufferPh !== null
const noBuffer = { path: ['dailyCheck', 'bufferPh'], message: 'Choose the buffer, or type its pH.' }

const instrumentFields = {
  code: z.string().trim().min(1, 'Give the instrument a code.').max(20),
  kind: z.enum(['meter', 'viscometer', 'balance']),
  name: z.string().trim().min(1, 'Give the instrument a name.').max(120),
  /** Viscometers: constant of spindle and spring class; factor in mPa·s per % torque = constant / rpm. */
  spindles: z
    .array(
      z.object({
        name: z.string().trim().min(1, 'Name the spindle.').max(60),
        constant: z.number('Type its constant.').positive('A constant is above nothing.'),
      }),
    )
    .max(40)
    .default([]),
  dailyCheck: dailyCheck.nullable().default(null),
}

const sameKind = (fields: { kind: string; dailyCheck: { kind: string } | null }) =>
  fields.dailyCheck === null || fields.dailyCheck.kind === fields.kind
const otherKind = { path: ['dailyCheck'], message: 'The daily check is that of another kind of instrument.' }

export const newInstrument = z
  .object({ id: z.uuid(), ...instrumentFields })
  .refine(sameKind, otherKind)
  .refine(hasBuffer, noBuffer)
export type NewInstrument = z.input<typeof newInstrument>

export const changedInstrument = z
  .object({ version: z.number().int().positive(), isActive: z.boolean(), ...instrumentFields })
  .refine(sameKind, otherKind)
  .refine(hasBuffer, noBuffer)
export type ChangedInstrument = z.input<typeof changedInstrument>

/** What the instrument showed of its daily check. */
export const dailyChecked = z.object({
  id: z.uuid(),
  claimedAt: instant.optional(),
  deviceNow: instant.optional(),
  read: z.number('Type what the instrument shows.'),
  /** Of buffer or fluid, where it is taken. */
  temperatureC: z.number('Type the temperature.').min(0).max(100).nullable().default(null),
  lotId: z.uuid().nullable().default(null),
  note: z.string().trim().max(500).default(''),
  isConfirmed: z.boolean().default(false),
})
export type DailyChecked = z.output<typeof dailyChecked>

/** Readings that were taken since the instrument was last known to be good. */
export type Reached = {
  readings: number
  studies: { code: string; readings: number }[]
  since: string | null
}

export const instrumentAddress = z.object({ id: z.uuid() })
