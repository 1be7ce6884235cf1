import { emulsionTypes } from '@/lib/formula/schema'
import { instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'
import { deviceTimes } from '@/lib/reading/schema/entry'

export const batchStates = ['making', 'resting', 'released', 'rejected'] as const
export type BatchState = (typeof batchStates)[number]

export const typeTestMethods = ['dilution', 'conductivity', 'dye'] as const
export type TypeTestMethod = (typeof typeTestMethods)[number]
export const typesFound = [...emulsionTypes, 'not clear'] as const
export type TypeFound = (typeof typesFound)[number]

const text = (max: number) => z.string().trim().max(max, `At most ${max} signs fit here.`).default('')
const version = z.number().int().min(1)
const grams = (what: string) =>
  z
    .number(`Give ${what} in g as a number.`)
    .positive(`${what} is above 0 g.`)
    .max(1_000_000, `${what} is at most 1 000 kg here.`)

export const createBatchInput = z.object({
  id: z.uuid(),
  formulaVersionId: z.uuid(),
  sizeG: grams('The batch size').min(10, 'A batch is at least 10 g; less cannot be weighed to a percent.'),
  /** The protocols it is sized for; the narrowest of their tolerances counts. */
  protocolVersionIds: z.array(z.uuid()).max(12, 'A batch is sized for at most 12 protocols.').default([]),
  /** Null: that of the protocols, else the lab's own. */
  tolerancePercent: z
    .number('Give the tolerance in % as a number.')
    .min(0.01, 'A tolerance is at least 0.01 %.')
    .max(10, 'More than 10 % is no tolerance for weighing.')
    .nullable()
    .default(null),
  note: text(2000),
})
export type CreateBatchInput = z.infer<typeof createBatchInput>

/** When it was really done, by the device's clock or from the paper sheet; without it, now. */
const claim = {
  claimedAt: z.iso
    .datetime({ offset: true, error: 'Give the time as a date and an hour.' })
    .nullable()
    .default(null),
  deviceNow: instant.nullable().default(null),
  isFromPaper: z.boolean().default(false),
}
export type Claimed = { claimedAt: string | null; deviceNow: string | null; isFromPaper: boolean }

/** One portion of a line as the balance showed it. Sent again under its id it is kept once. */
export const weighInput = z.object({
  id: z.uuid(),
  weighingId: z.uuid(),
  /** 1 and one more for each row that was on the screen: who did not see the last one is told. */
  version,
  /** As typed: decimal comma or point. The server reads the number and keeps both. */
  actualTyped: z.string().trim().min(1, 'Type the weight in g.').max(20, 'A weight has at most 20 signs.'),
  tareTyped: z.string().trim().max(20, 'A tare has at most 20 signs.').default(''),
  /** False: another portion of this line follows. */
  isLast: z.boolean().default(true),
  lot: text(60),
  balance: text(60),
  balanceId: z.uuid().nullable().default(null),
  /** Asked for where the line is kept outside its tolerance. */
  note: text(500),
  /** The portion that this one corrects; asks for a reason. */
  supersedes: z.uuid().nullable().default(null),
  reason: text(500),
  ...claim,
})
export type WeighInput = z.infer<typeof weighInput>

export const stepActs = ['start', 'end', 'done'] as const

const rpm = z
  .number('Give the speed in rpm as a number.')
  .int('A speed is a whole number of rpm.')
  .min(0, 'A speed is not below 0 rpm.')
  .max(50_000, 'No mixer runs above 50 000 rpm.')

export const doStepInput = z.object({
  id: z.uuid(),
  stepId: z.uuid(),
  version,
  kind: z.enum(stepActs, 'A step begins, ends or is done.').default('done'),
  actualSpeedRpm: rpm.nullable().default(null),
  actualMinutes: z
    .number('Give the minutes as a number.')
    .min(0, 'A step does not last less than 0 minutes.')
    .max(10_000, 'A step lasts at most 10 000 minutes.')
    .nullable()
    .default(null),
  actualTemperatureC: z
    .number('Give the temperature in °C as a number.')
    .min(-50, 'A step is not colder than −50 °C.')
    .max(200, 'A step is not hotter than 200 °C.')
    .nullable()
    .default(null),
  /** Asked for where it was done otherwise than prescribed. */
  note: text(500),
  reason: text(500),
  ...claim,
})
export type DoStepInput = z.infer<typeof doStepInput>

export const fillJarInput = z
  .object({
    id: z.uuid(),
    number: z.number('Give the number of the jar.').int('Jars are counted whole.').min(1).max(9_999),
    tareG: z
      .number('Give the empty jar in g as a number.')
      .min(0, 'A jar does not weigh less than 0 g.')
      .max(100_000, 'A jar of more than 100 kg cannot be right here.'),
    grossG: grams('The full jar'),
    torqueNm: z
      .number('Give the closure torque in Nm as a number.')
      .min(0, 'A torque is not below 0 Nm.')
      .max(50, 'No closure takes more than 50 Nm.')
      .nullable()
      .default(null),
    note: text(500),
    supersedes: z.uuid().nullable().default(null),
    reason: text(500),
    ...claim,
  })
  .refine((jar) => jar.grossG > jar.tareG, {
    path: ['grossG'],
    message: 'The full jar weighs more than the empty one. Weigh it again.',
  })
export type FillJarInput = z.infer<typeof fillJarInput>

export const readingMoments = ['in process', 'initial'] as const
export type ReadingMoment = (typeof readingMoments)[number]
export const batchAttributes = [
  'look',
  'ph',
  'viscosity',
  'density',
  'centrifuge',
  'droplets',
  'temperature',
] as const
export type BatchAttribute = (typeof batchAttributes)[number]

const figure = z.number('Type digits, with one comma or point.').min(0, 'That is not below 0.').max(1e6)
export const batchReadingDetail = z.strictObject({
  path: z.enum(['direct', 'extract', 'water phase']).optional(),
  /** Of an extract: parts of water to one of emulsion. */
  ratio: z.string().trim().max(40).optional(),
  sampleTemperatureC: z.number('Type digits, with one comma or point.').min(-30).max(120).optional(),
  spindle: z.string().trim().max(60).optional(),
  torquePercent: figure.optional(),
  spindleConstant: figure.optional(),
  rpm: figure.optional(),
  radiusMm: figure.optional(),
  minutes: figure.optional(),
})
export type BatchReadingDetail = z.infer<typeof batchReadingDetail>

export const batchReadingInput = z
  .object({
    id: z.uuid(),
    moment: z.enum(readingMoments, 'Say whether it was read in process or as the initial.'),
    attribute: z.enum(batchAttributes, 'Choose what was read.'),
    replicate: z.number().int().min(1).max(99).default(1),
    /** A count of drops is as long as the drops are many. */
    typed: z.string().trim().min(1, 'Type what was read.').max(12_000, 'At most 12 000 signs fit here.'),
    detail: batchReadingDetail.default({}),
    instrumentId: z.uuid().nullable().default(null),
    note: text(500),
    supersedes: z.uuid().nullable().default(null),
    /** Asked for with a correction, and before the rest is over. */
    reason: text(500),
    ...claim,
  })
  .refine(({ attribute, typed }) => attribute === 'droplets' || typed.length <= 200, {
    path: ['typed'],
    message: 'At most 200 signs fit here.',
  })
export type BatchReadingInput = z.infer<typeof batchReadingInput>

export const finishMakingInput = z.object({
  version,
  yieldG: grams('The yield'),
  fillG: grams('The fill of a jar').nullable().default(null),
  closure: text(200),
  note: text(2000),
})
export type FinishMakingInput = z.infer<typeof finishMakingInput>

export const testTypeInput = z
  .object({
    version,
    method: z.enum(typeTestMethods, 'Choose how it was tested: dilution, conductivity or dye.'),
    found: z.enum(typesFound, 'Choose what the test showed.'),
    conductivityUsCm: z
      .number('Give the conductivity in microsiemens per cm as a number.')
      .min(0, 'A conductivity is not below 0.')
      .max(1_000_000, 'That conductivity is too high to be right.')
      .nullable()
      .default(null),
    reason: text(500),
  })
  .refine((test) => test.method !== 'conductivity' || test.conductivityUsCm !== null, {
    path: ['conductivityUsCm'],
    message: 'Give the conductivity that was read.',
  })
export type TestTypeInput = z.infer<typeof testTypeInput>

export const decideInput = z.object({
  version,
  decision: z.enum(['released', 'rejected'], 'Say whether the batch is released or rejected.'),
  reason: text(1000),
})
export type DecideInput = z.infer<typeof decideInput>

export const batchAddress = z.object({ code: z.string().max(60) })
export const batchPhotoAddress = batchAddress.extend({ id: z.uuid() })

/** Fields of the form that carries the picture. */
export const batchPhotoFields = deviceTimes.extend({ id: z.uuid(), note: text(500) })
export type BatchPhotoFields = z.infer<typeof batchPhotoFields>
