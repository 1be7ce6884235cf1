import * as z from '@/lib/http/zod'

const instrumentFields = {
  code: z.string().trim().min(1, 'Give the instrument a code.').max(20),
  kind: z.enum(['meter', 'viscometer', 'balance']),
  name: z.string().trim().min(1, 'Give the instrument a name.').max(120),
  /** Viscometers: constant of spindle and spring class; factor in mPa·s per % torque = constant / rpm. */
  spindles: z
    .array(z.object({ name: z.string().trim().min(1).max(60), constant: z.number().positive() }))
    .max(40)
    .default([]),
}

export const newInstrument = z.object({ id: z.uuid(), ...instrumentFields })
export type NewInstrument = z.input<typeof newInstrument>

export const changedInstrument = z.object({
  version: z.number().int().positive(),
  isActive: z.boolean(),
  ...instrumentFields,
})
export type ChangedInstrument = z.input<typeof changedInstrument>

export const instrumentAddress = z.object({ id: z.uuid() })

export const instrumentKeys = {
  list: '/api/instruments',
  one: (id: string) => `/api/instruments/${id}`,
}
