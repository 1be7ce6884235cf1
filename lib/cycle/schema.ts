import { instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

const half = z.enum(['cold', 'warm'], 'Choose the cold or the warm half.')
const reached = z
  .number('Give the temperature as a number.')
  .min(-100, 'No freezer is colder than −100 °C.')
  .max(100, 'No thaw is warmer than 100 °C.')
  .nullable()
  .default(null)

const halfFields = {
  id: z.uuid(),
  studyStationId: z.uuid(),
  cycle: z.number().int().min(1, 'Cycles count from 1.').max(100),
  half,
}
const endFields = {
  reachedC: reached,
  /** Of the dummy jar, where the lab keeps one. */
  coreC: reached,
  isFrozenThrough: z.boolean().nullable().default(null),
  note: z.string().trim().max(2000).default(''),
}

/** A whole half typed later, from paper. */
export const cycleStep = z
  .object({ ...halfFields, begunAt: instant, endedAt: instant, ...endFields })
  .refine((step) => Date.parse(step.endedAt) > Date.parse(step.begunAt), {
    path: ['endedAt'],
    message: 'The half ends after it begins. Correct one of the two times.',
  })
export type CycleStep = z.output<typeof cycleStep>

export const cycleAddress = z.object({ id: z.uuid() })

/** What takes the place of a half that was typed wrong; with `isVoid` nothing does. */
export const halfInstead = z
  .object({
    id: z.uuid(),
    isVoid: z.boolean().default(false),
    begunAt: instant,
    endedAt: instant,
    ...endFields,
    reason: z.string().trim().min(1, 'A half is changed only with a reason. Say why.').max(500),
  })
  .refine((step) => Date.parse(step.endedAt) > Date.parse(step.begunAt), {
    path: ['endedAt'],
    message: 'The half ends after it begins. Correct one of the two times.',
  })
export type HalfInstead = z.output<typeof halfInstead>

const pressFields = {
  ...halfFields,
  /** When it happened by the device, or the earlier time that the person gives; the server's time where left out. */
  claimedAt: instant.optional(),
  deviceNow: instant.optional(),
}

/** One press at the board. */
export const cyclePress = z.discriminatedUnion('press', [
  z.object({ press: z.literal('begin'), ...pressFields }),
  z.object({
    press: z.literal('hold'),
    ...pressFields,
    reason: z.string().trim().min(1, 'Say why the half is held.').max(300),
  }),
  z.object({
    press: z.literal('go on'),
    ...pressFields,
    reason: z.string().trim().max(300).default(''),
  }),
  z.object({
    press: z.literal('end'),
    ...pressFields,
    ...endFields,
    /** The person knows that it falls short, and ends it. */
    isConfirmed: z.boolean().default(false),
  }),
])
export type CyclePressInput = z.input<typeof cyclePress>
export type CyclePressed = z.output<typeof cyclePress>

export const cycleFilter = z.object({ studyStation: z.uuid() })
