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

const timeFields = {
  begunAt: instant,
  endedAt: instant,
  heldHours: z
    .number('Give the hours as a number.')
    .min(0, 'A half is held for no less than 0 hours.')
    .max(10_000)
    .default(0),
  heldReason: z.string().trim().max(300).default(''),
}
/** The person knows what falls short and which readings it doubts or frees, and means it. */
const isConfirmed = z.boolean().default(false)

type Times = { begunAt: string; endedAt: string; heldHours: number; heldReason: string }

function checkTimes({ begunAt, endedAt, heldHours, heldReason }: Times, context: z.RefinementCtx): void {
  const say = (field: string, message: string) => context.addIssue({ code: 'custom', path: [field], message })
  const hours = (Date.parse(endedAt) - Date.parse(begunAt)) / 3_600_000
  if (!(hours > 0)) say('endedAt', 'The half ends after it begins. Correct one of the two times.')
  else if (heldHours > hours) say('heldHours', 'It cannot be held for longer than it lasted.')
  if (heldHours > 0 && heldReason === '') say('heldReason', 'Say why the half is held.')
}

/** A whole half typed later, from paper. */
export const cycleStep = z
  .object({ ...halfFields, ...timeFields, ...endFields, isConfirmed })
  .superRefine(checkTimes)
export type CycleStepInput = z.input<typeof cycleStep>
export type CycleStep = z.output<typeof cycleStep>

export const cycleAddress = z.object({ id: z.uuid() })

const changeFields = {
  id: z.uuid(),
  /** How many entries of this half were on record when it was opened. */
  version: z.number().int().min(1),
  reason: z.string().trim().min(1, 'A half is changed only with a reason. Say why.').max(500),
}

/** What takes the place of an ended half that was typed wrong; taken back, nothing does; or it had not ended and runs on. */
export const halfChange = z.discriminatedUnion('change', [
  z
    .object({ change: z.literal('correct'), ...changeFields, ...timeFields, ...endFields, isConfirmed })
    .superRefine(checkTimes),
  z.object({ change: z.literal('take back'), ...changeFields, isConfirmed }),
  z.object({ change: z.literal('run on'), ...changeFields, isConfirmed }),
])
export type HalfChangeInput = z.input<typeof halfChange>
export type HalfChange = z.output<typeof halfChange>

/** Of a half that runs: when it really began, or that it did not. */
export const beginChange = z.discriminatedUnion('change', [
  z.object({ change: z.literal('correct'), ...changeFields, begunAt: instant }),
  z.object({ change: z.literal('take back'), ...changeFields }),
])
export type BeginChangeInput = z.input<typeof beginChange>
export type BeginChange = z.output<typeof beginChange>

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
