import { emulsionTypes } from '@/lib/formula/schema'
import { z } from '@/lib/http/zod'

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
  sizeG: grams('The batch size').min(
    10,
    'A batch is at least 10 g; less cannot be weighed to half a percent.',
  ),
  note: text(2000),
})
export type CreateBatchInput = z.infer<typeof createBatchInput>

export const weighInput = z.object({
  weighingId: z.uuid(),
  version,
  /** As typed: decimal comma or point. The server reads the number and keeps both. */
  actualTyped: z.string().trim().min(1, 'Type the weight in g.').max(20, 'A weight has at most 20 signs.'),
  lot: text(60),
  balance: text(60),
  /** Asked for where the weight is outside its tolerance. */
  note: text(500),
  /** Asked for where a weight is corrected. */
  reason: text(500),
})
export type WeighInput = z.infer<typeof weighInput>

export const doStepInput = z.object({
  stepId: z.uuid(),
  version,
  actualSpeedRpm: z
    .number('Give the speed in rpm as a number.')
    .int('A speed is a whole number of rpm.')
    .min(0, 'A speed is not below 0 rpm.')
    .max(50_000, 'No mixer runs above 50 000 rpm.')
    .nullable()
    .default(null),
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
  note: text(500),
  reason: text(500),
})
export type DoStepInput = z.infer<typeof doStepInput>

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

export const batchSorts = ['code', 'formula', 'size', 'yield', 'state', 'made'] as const
export const batchListQuery = z.object({
  q: z.string().max(200).catch(''),
  state: z.enum(['all', ...batchStates]).catch('all'),
  sort: z.enum(batchSorts).catch('made'),
  order: z.enum(['asc', 'desc']).catch('desc'),
})
export type BatchListQuery = z.infer<typeof batchListQuery>

export const batchAddress = z.object({ code: z.string().max(60) })

export const batchesKey = ({ q, state, sort, order }: BatchListQuery) =>
  `/api/batches?${new URLSearchParams({ q, state, sort, order })}`
export const batchKey = (code: string) => `/api/batches/${encodeURIComponent(code)}`
