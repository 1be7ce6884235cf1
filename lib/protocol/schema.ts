import * as z from '@/lib/http/zod'
import { conditionFields } from '@/lib/reading/schema/conditions'
import { attributeKey } from '@/lib/reading/schema/own'
import { isOwn } from '@/lib/reading/schema/own-key'
import { ownAttribute } from '@/lib/reading/schema/own'

/** The three tolerance kinds of lib/science: absolute limits, % of the initial, units from the initial. */
export const tolerance = z
  .discriminatedUnion('kind', [
    z.object({ kind: z.literal('range'), lower: z.number().optional(), upper: z.number().optional() }),
    z.object({
      kind: z.literal('percent'),
      below: z.number().positive().optional(),
      above: z.number().positive().optional(),
    }),
    z.object({
      kind: z.literal('shift'),
      below: z.number().positive().optional(),
      above: z.number().positive().optional(),
    }),
  ])
  .refine(
    (t) =>
      t.kind === 'range'
        ? t.lower !== undefined || t.upper !== undefined
        : t.below !== undefined || t.above !== undefined,
    'Give at least one limit.',
  )
export type Tolerance = z.infer<typeof tolerance>

export const dropletMeasures = ['d50v', 'd32', 'd43', 'd10'] as const

const plannedOfAny = z.object({
  attribute: attributeKey,
  /** What an attribute of the protocol's own is; its name is in the key. */
  own: ownAttribute.optional(),
  /** Read once, before the study starts, and at no pull. */
  isInitialOnly: z.literal(true).optional(),
  tolerance,
  replicates: z.number().int().min(1).max(5),
  /** What the fields do not say of how it is done: "unstirred", "ruler against the closed jar". */
  method: z.string().max(300),
  /** Of pH and viscosity: readings compare only where these are the same. */
  conditions: z
    .object({
      ...conditionFields,
      /** Only of a plan that names no spindle. */
      rpm: z.number().positive().optional(),
    })
    .optional(),
  /** For viscosity: factor = spindleConstant / rpm (mPa·s per % torque). */
  viscosity: z
    .object({
      spindle: z.string().max(60),
      spindleConstant: z.number().positive(),
      rpm: z.number().positive(),
    })
    .optional(),
  /** For separation: the least layer in mm that the ruler tells. Where nothing is said, a millimetre. */
  rulerMm: z.number().positive().max(5, 'A ruler that tells only 5 mm tells no separation.').optional(),
  /** For droplets: which of the diameters the band is about; the volume median where nothing is said. */
  dropletMeasure: z.enum(dropletMeasures).optional(),
  centrifuge: z
    .object({
      rpm: z.number().positive().max(100_000),
      radiusMm: z.number().positive().max(1000),
      minutes: z.number().positive().max(1440),
    })
    .optional(),
})

export const plannedAttribute = plannedOfAny.refine(
  ({ attribute, own }) => isOwn(attribute) === (own !== undefined),
  { path: ['own'], message: 'Say what this attribute of your own is: a number with its unit, or a scale.' },
)
export type PlannedAttribute = z.infer<typeof plannedAttribute>

/** One turn of a freeze-thaw station, as the protocol asks for it; how many there are is said by the time points. */
export const plannedCycle = z
  .object({
    coldC: z.number().min(-90).max(20),
    coldHours: z.number().positive().max(168),
    warmC: z.number().min(-20).max(60),
    warmHours: z.number().positive().max(168),
    isFrozenThrough: z.boolean(),
  })
  .refine((cycle) => cycle.coldC < cycle.warmC, 'The warm half must be warmer than the cold half.')
export type PlannedCycle = z.infer<typeof plannedCycle>

export const plannedStation = z.object({
  /** Which kind of place it needs; the study picks the lab's station that fits. */
  kind: z.enum(['temperature', 'freeze-thaw', 'transport']),
  temperatureC: z.number().nullable(),
  voice: z.enum(['decides', 'informs', 'supports']),
  /** Weeks after the start, without 0; for freeze-thaw the weeks at which the cycles end. A draft may have none. */
  timePoints: z
    .array(z.number().positive('A time point lies after the start.').max(520))
    .max(60)
    .refine((weeks) => new Set(weeks).size === weeks.length, 'A time point stands twice.')
    .transform((weeks) => weeks.toSorted((a, b) => a - b)),
  windowDays: z.number().int().min(0).max(30),
  watchJars: z.number().int().min(0).max(5),
  measuringJarsPerPull: z.number().int().min(0).max(5),
  spares: z.number().int().min(0).max(10),
  /** How its jars stand; upright where nothing is said, as in every plan older than the choice. */
  orientation: z.enum(['lying', 'inverted']).optional(),
  /** Jars in light, or beside them in foil: the control that has had the same temperature in the dark. */
  light: z.enum(['exposed', 'in foil']).optional(),
  /** Filled into the product's own pack instead of the plan's. */
  isOwnPack: z.literal(true).optional(),
  cycle: plannedCycle.optional(),
  /** What is not read at a time point at which jars are pulled all the same. */
  leftOut: z
    .array(z.object({ attribute: attributeKey, week: z.number().positive() }))
    .max(600)
    .optional(),
})
export type PlannedStation = z.infer<typeof plannedStation>

export const outsideTests = ['microbiology', 'preservative efficacy', 'another outside test'] as const

export const protocolPlan = z.object({
  endWeeks: z.number().positive().max(520),
  fillG: z.number().positive().max(5000),
  fillHeightMm: z.number().positive().max(500),
  lossPercent: z.number().min(0).max(50),
  /** How far a line of a batch made for it may be off its target; where it says nothing, as the lab has it. */
  weighingTolerancePercent: z
    .number('Give the weighing tolerance in % as a number.')
    .min(0.01, 'A weighing tolerance is at least 0.01 %.')
    .max(10, 'More than 10 % is no tolerance for weighing.')
    .optional(),
  restHours: z.number().min(0).max(72),
  retains: z.number().int().min(0).max(50),
  initialJars: z.number().int().min(0).max(20),
  pack: z.string().max(200),
  /** The product's own pack, where a station has it: "airless pump, 30 mL". */
  ownPack: z.string().trim().max(200).optional(),
  /** Jars that go to outside laboratories, for each batch. */
  setAside: z
    .array(z.object({ what: z.enum(outsideTests), jars: z.number().int().min(1).max(50) }))
    .max(outsideTests.length)
    .refine(
      (list) => new Set(list.map((one) => one.what)).size === list.length,
      'An outside test stands twice.',
    )
    .optional(),
  /** Attributes read at every second of the middle time points [std: ICH Q1D]. */
  matrixing: z.object({ attributes: z.array(attributeKey).min(1).max(20) }).optional(),
  /** How many of the batches are measured at a middle time point, by turns [std: ICH Q1D]; all where nothing is said. */
  batchMatrixing: z.enum(['half', 'two thirds']).optional(),
  /** Only the extremes of one factor are filled; what lies between is inferred [std: ICH Q1D]. */
  bracketing: z
    .object({
      factor: z.string().trim().min(1, 'Name what differs.').max(80),
      low: z.string().trim().min(1, 'Name the one end.').max(80),
      high: z.string().trim().min(1, 'Name the other end.').max(80),
      between: z.string().trim().min(1, 'Name what lies between.').max(200),
    })
    .optional(),
  stations: z.array(plannedStation).max(12),
  attributes: z
    .array(plannedAttribute)
    .max(20)
    .refine(
      (list) => new Set(list.map((a) => a.attribute)).size === list.length,
      'An attribute stands twice.',
    ),
})
export type ProtocolPlan = z.infer<typeof protocolPlan>

const name = z.string().trim().min(1, 'Give the protocol a name.').max(120)
const note = z.string().trim().max(2000).default('')

export const newProtocol = z.object({
  id: z.uuid(),
  versionId: z.uuid(),
  name,
  plan: protocolPlan,
  note,
})
export type NewProtocol = z.input<typeof newProtocol>

/** A new draft, begun from the newest version; a locked version never changes. */
export const newProtocolVersion = z.object({ id: z.uuid() })

export const writtenPlan = z.object({
  version: z.number().int().positive(),
  name,
  plan: protocolPlan,
  note,
})
export type WrittenPlan = z.input<typeof writtenPlan>

/** QA's approval of a version as it stands: the version seen is the version approved. */
export const approvedVersion = z.object({ version: z.number().int().positive() })

export const protocolAddress = z.object({ code: z.string().max(40) })
export const protocolVersionAddress = protocolAddress.extend({ number: z.coerce.number().int().positive() })
