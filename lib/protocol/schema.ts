import { z } from '@/lib/http/zod'
import { attributeKey } from '@/lib/reading/schema/attributes'

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

export const plannedAttribute = z.object({
  attribute: attributeKey,
  tolerance,
  replicates: z.number().int().min(1).max(5),
  /** Said as it is done: "direct", "extract 1 to 10, 30 minutes", "T-bar C, 10 rpm, 30 s, descending". */
  method: z.string().max(300),
  /** For viscosity: factor = spindleConstant / rpm (mPa·s per % torque). */
  viscosity: z
    .object({
      spindle: z.string().max(60),
      spindleConstant: z.number().positive(),
      rpm: z.number().positive(),
    })
    .optional(),
})
export type PlannedAttribute = z.infer<typeof plannedAttribute>

export const plannedStation = z.object({
  /** Which kind of place it needs; the study picks the lab's station that fits. */
  kind: z.enum(['temperature', 'freeze-thaw']),
  temperatureC: z.number().nullable(),
  voice: z.enum(['decides', 'informs', 'supports']),
  /** Weeks after the start, without 0; for freeze-thaw the weeks at which the cycles end. */
  timePoints: z.array(z.number().positive().max(520)).min(1).max(60),
  windowDays: z.number().int().min(0).max(30),
  watchJars: z.number().int().min(0).max(5),
  measuringJarsPerPull: z.number().int().min(0).max(5),
  spares: z.number().int().min(0).max(10),
})
export type PlannedStation = z.infer<typeof plannedStation>

export const protocolPlan = z.object({
  endWeeks: z.number().positive().max(520),
  fillG: z.number().positive().max(5000),
  fillHeightMm: z.number().positive().max(500),
  lossPercent: z.number().min(0).max(50),
  restHours: z.number().min(0).max(72),
  retains: z.number().int().min(0).max(50),
  initialJars: z.number().int().min(0).max(20),
  pack: z.string().max(200),
  stations: z.array(plannedStation).min(1).max(12),
  attributes: z.array(plannedAttribute).min(1).max(20),
})
export type ProtocolPlan = z.infer<typeof protocolPlan>
