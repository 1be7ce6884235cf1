import * as z from '@/lib/http/zod'
import { density, inciName, priceCentsPerKg } from '@/lib/ingredient/schema'

export const emulsionTypes = ['water-in-oil', 'water-in-silicone', 'oil-in-water'] as const
export const emulsionType = z.enum(
  emulsionTypes,
  'Choose the emulsion type: water-in-oil, water-in-silicone or oil-in-water.',
)
export type EmulsionType = z.infer<typeof emulsionType>

export const formulaCode = z
  .string()
  .trim()
  .min(1, 'Give the formula a code, such as N86.')
  .max(20, 'A code has at most 20 letters and digits.')
  .regex(/^[A-Za-z0-9]+$/, 'A code has letters and digits only, such as N86.')
  .refine(
    (code) => !/^(new|compare)$/i.test(code),
    'New and compare are pages of the list. Choose another code, such as N86.',
  )

const text = (max: number) => z.string().trim().max(max, `At most ${max} signs fit here.`)
export const phaseName = text(20).regex(/^[A-Za-z0-9]*$/, 'A phase is a letter, such as A.')

/** Percentages are whole thousandths of a percent, so that a total of 100 % is exact. */
export const percentThousandths = z
  .number('Give the share as a number in % w/w, such as 2.40.')
  .int('A share has at most three decimals.')
  .min(0, 'A share is not below 0 %.')
  .max(100_000, 'A share is at most 100 %.')

export const formulaLine = z.object({
  id: z.uuid(),
  phase: phaseName.min(1, 'Give the phase, such as A.'),
  ingredientId: z.uuid().nullable().default(null),
  inciName,
  function: text(100).default(''),
  percentThousandths,
  density,
  isInternal: z.boolean(),
  /** "q.s. to 100": the one line that makes up what is missing. */
  isRemainder: z.boolean().default(false),
  priceCentsPerKg: priceCentsPerKg.default(null),
})
export type FormulaLine = z.infer<typeof formulaLine>

export const formulaStep = z.object({
  id: z.uuid(),
  /** One phase ("B") or two that are joined ("B into A"). */
  phase: text(40).default(''),
  instruction: text(1000).min(1, 'Say what is done in this step.'),
  speedRpm: z
    .number('Give the speed in rpm as a number.')
    .int('A speed is a whole number of rpm.')
    .min(0, 'A speed is not below 0 rpm.')
    .max(50_000, 'No mixer runs above 50 000 rpm.')
    .nullable()
    .default(null),
  minutes: z
    .number('Give the minutes as a number.')
    .min(0, 'A step does not last less than 0 minutes.')
    .max(10_000, 'A step lasts at most 10 000 minutes.')
    .nullable()
    .default(null),
  temperatureC: z
    .number('Give the temperature in °C as a number.')
    .min(-50, 'A step is not colder than −50 °C.')
    .max(200, 'A step is not hotter than 200 °C.')
    .nullable()
    .default(null),
  lookFor: text(500).default(''),
  caution: text(500).default(''),
})
export type FormulaStep = z.infer<typeof formulaStep>

export const mostLines = 200

const name = text(120).min(1, 'Give the formula a name, such as silicone-free cream.')
const lines = z
  .array(formulaLine)
  .max(mostLines, `A formula has at most ${mostLines} lines.`)
  .refine((all) => all.filter((line) => line.isRemainder).length <= 1, 'Only one line can be q.s. to 100.')
  .refine(isOnce, 'A line is in this formula twice. Load the page again.')
const steps = z
  .array(formulaStep)
  .max(60, 'A formula has at most 60 process steps.')
  .refine(isOnce, 'A step is in this formula twice. Load the page again.')
const note = text(2000).default('')
const phEnd = z
  .number('Type the pH as 5.50, or as a range such as 5.20 to 5.80.')
  .min(0, 'A pH is not below 0 here.')
  .max(14, 'A pH is at most 14 here.')
  .nullable()
  .default(null)
/** The pH it is meant to have; one value where both are the same. */
const targetPh = { targetPhLow: phEnd, targetPhHigh: phEnd }
const isPhRange = {
  path: ['targetPhLow'],
  error: 'The range of the target pH begins with its lower end. Give both ends, or neither.',
}
const hasPhRange = ({
  targetPhLow: low,
  targetPhHigh: high,
}: Record<keyof typeof targetPh, number | null>) =>
  low === null || high === null ? low === high : low <= high

export const createFormulaInput = z
  .object({
    id: z.uuid(),
    versionId: z.uuid(),
    code: formulaCode,
    name,
    emulsionType,
    clientId: z.uuid().nullable().default(null),
    note,
    ...targetPh,
    lines: lines.default([]),
    steps: steps.default([]),
  })
  .refine(hasPhRange, isPhRange)
export type CreateFormulaInput = z.infer<typeof createFormulaInput>

export const saveFormulaInput = z
  .object({
    versionId: z.uuid(),
    /** The version of the draft that was on screen; an older one is refused with 412. */
    version: z.number().int().min(1),
    name,
    emulsionType,
    note,
    ...targetPh,
    lines,
    steps,
  })
  .refine(hasPhRange, isPhRange)
export type SaveFormulaInput = z.infer<typeof saveFormulaInput>

export const newVersionInput = z.object({ id: z.uuid(), fromVersionId: z.uuid(), note })
export type NewVersionInput = z.infer<typeof newVersionInput>

/** A family is a grid of at most this many. */
export const mostVariants = 12
const variantShares = z.array(percentThousandths).min(1).max(2)
const variantMember = z.object({
  id: z.uuid(),
  versionId: z.uuid(),
  code: formulaCode,
  name,
  /** One share for each varied line, in their order. */
  shares: variantShares,
})

export const makeVariantsInput = z
  .object({
    fromVersionId: z.uuid(),
    lineIds: z
      .array(z.uuid())
      .min(1, 'Choose an ingredient to vary.')
      .max(2, 'A family varies one or two ingredients.')
      .refine(
        (ids) => new Set(ids).size === ids.length,
        'The two ingredients are the same line. Choose another.',
      ),
    members: z
      .array(variantMember)
      .min(1, 'Give the levels, such as 0.20; 0.30; 0.40.')
      .max(mostVariants, `A family has at most ${mostVariants} formulas. Take fewer levels.`)
      .refine(isOnce, 'A formula is in this family twice. Load the page again.'),
  })
  .superRefine(({ lineIds, members }, context) => {
    const codes = members.map((member) => member.code.toLowerCase())
    const levels = members.map((member) => member.shares.join(' '))
    members.forEach(({ code, shares }, index) => {
      const say = (field: string, message: string) =>
        context.addIssue({ code: 'custom', path: ['members', index, field], message })
      if (codes.indexOf(code.toLowerCase()) < index)
        say('code', `${code} stands twice. Each formula has its own.`)
      if (levels.indexOf(shares.join(' ')) < index) say('shares', `${code} has the levels of another one.`)
      if (shares.length !== lineIds.length) say('shares', `${code} has not one share for each ingredient.`)
    })
  })
export type MakeVariantsInput = z.infer<typeof makeVariantsInput>

export const formulaAddress = z.object({ code: z.string().max(40) })
export const formulaPageQuery = z.object({
  /** Number of the version; the latest where there is none. */
  version: z.coerce.number().int().positive().max(100_000).optional().catch(undefined),
})

/** Two versions: of one formula, or `with` another one's. */
export const differenceQuery = z.object({
  from: z.coerce.number().int().positive().max(100_000).optional().catch(undefined),
  to: z.coerce.number().int().positive().max(100_000).optional().catch(undefined),
  with: z.string().max(40).optional().catch(undefined),
})
export type DifferenceQuery = z.infer<typeof differenceQuery>

/** How many formulas are compared at once. */
export const mostCompared = 12

/** The formulas that are compared, as the list's own form sends them: code=N86a&code=N86b. */
export const compareQuery = z.object({
  code: z.preprocess(
    (value) => (Array.isArray(value) ? value : value === undefined ? [] : [value]),
    z.array(z.string().max(40)).catch([]),
  ),
})

function isOnce(rows: { id: string }[]): boolean {
  return new Set(rows.map((row) => row.id)).size === rows.length
}
