import { instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'
import { tolerance } from '@/lib/protocol/schema'
import { attributeKey } from '@/lib/reading/schema/own'
import { entryDetail } from '@/lib/reading/schema/entry'

/** What may be left out of the protocol's plan so that a batch can fill the study. */
export const studyAdjustments = z
  .object({
    fillG: z.number().positive().max(5000).optional(),
    leaveOutWeeks: z.array(z.number().positive()).max(60).optional(),
    leaveOutRetains: z.boolean().optional(),
    /** Stations of the protocol that do not start, by their position in its plan. */
    leaveOutStations: z.array(z.number().int().min(0)).max(12).optional(),
    /** Spares at a station of the protocol, by its position, where they are not as many as it asks for. */
    spares: z
      .array(z.object({ position: z.number().int().min(0), spares: z.number().int().min(0).max(10) }))
      .max(12)
      .optional(),
    /** Stations by their position at which every second of the middle pulls opens no jar, or one jar alone. */
    everySecondTime: z.array(z.number().int().min(0)).max(12).optional(),
    oneJarAPull: z.array(z.number().int().min(0)).max(12).optional(),
  })
  .default({})
export type StudyAdjustments = z.output<typeof studyAdjustments>

export const initialReading = z.object({
  batchId: z.uuid(),
  attribute: attributeKey,
  /** One text per replicate, as typed: "5,60" stays "5,60". Viscosity in mPa·s, or torque % where `isTorque`. */
  typed: z.array(z.string().trim().min(1, 'Type the reading.').max(12_000)).min(1).max(5),
  isTorque: z.boolean().default(false),
  detail: entryDetail.omit({ torquePercent: true }).default({}),
  instrumentId: z.uuid().nullable().default(null),
  /** Now if left out; never later than now. */
  measuredAt: instant.optional(),
})
export type InitialReading = z.output<typeof initialReading>

export const startedStudy = z.object({
  id: z.uuid(),
  /** Given by the lab if left out: S-001 and so on. */
  code: z
    .string()
    .trim()
    .regex(/^[A-Za-z0-9][A-Za-z0-9-]{0,19}$/, 'A code has letters, digits and hyphens, 20 at most.')
    .optional(),
  title: z.string().trim().min(1, 'Give the study a title.').max(160),
  protocolVersionId: z.uuid(),
  batchIds: z.array(z.uuid()).min(1, 'Choose at least one batch.').max(12),
  /** Batches that stand beside them for comparison: read like the others, counted nowhere. */
  referenceIds: z.array(z.uuid()).max(4, 'At most four references stand beside a study.').default([]),
  /** The lab's station for each of the protocol's stations, by position; what is left out is chosen by its fit. */
  stationChoices: z.array(z.object({ position: z.number().int().min(0), stationId: z.uuid() })).default([]),
  adjustments: studyAdjustments,
  /** Why some of the protocol's stations do not start. */
  whyInPart: z.string().trim().max(500).default(''),
  startedAt: instant.optional(),
  initialReadings: z.array(initialReading).max(200),
  clientId: z.uuid().nullable().default(null),
  isShared: z.boolean().default(false),
})
export type StartStudy = z.input<typeof startedStudy>
export type StartedStudy = z.output<typeof startedStudy>

export const changedStudy = z.object({
  version: z.number().int().positive(),
  title: z.string().trim().min(1, 'Give the study a title.').max(160),
  clientId: z.uuid().nullable(),
  isShared: z.boolean(),
})
export type ChangedStudy = z.input<typeof changedStudy>

export const endedStudy = z.object({
  version: z.number().int().positive(),
  reason: z.string().trim().min(1, 'Say why the study ends.').max(500),
})

const amending = {
  id: z.uuid(),
  version: z.number().int().positive(),
  reason: z.string().trim().min(1, 'Say why the study is changed.').max(500),
}

/** What of a running study may still change, each with its reason: what was read stays as it was. */
export const amendment = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('time point'),
    ...amending,
    studyStationId: z.uuid(),
    week: z.number().positive('A time point lies after the start.').max(520),
    /** A measurement takes a spare jar of each batch; without one the watch jars alone are looked at. */
    isMeasured: z.boolean().default(true),
  }),
  z.object({
    kind: z.literal('retain'),
    ...amending,
    jarCode: z.string().trim().min(1, 'Type the jar’s code.').max(60),
  }),
  z.object({ kind: z.literal('station end'), ...amending, studyStationId: z.uuid() }),
  z.object({ kind: z.literal('tolerance'), ...amending, attribute: attributeKey, tolerance }),
])
export type Amendment = z.input<typeof amendment>
export type AmendmentOf<K extends Amendment['kind']> = Extract<z.output<typeof amendment>, { kind: K }>

export const following = z.object({ isFollowing: z.boolean() })

export const studyAddress = z.object({ code: z.string().max(40) })

export const studyStandings = ['out', 'leaning', 'steady', 'untold'] as const

/** A batch of an earlier study, drawn beside this one's curves: "S-003 SI82-1". */
export const curvesQuery = z.object({ beside: z.string().trim().max(80).catch('').default('') })

/** One attribute of one batch at one station. */
export const seriesAddress = z.object({
  batchId: z.uuid(),
  studyStationId: z.uuid(),
  attribute: attributeKey,
})
export type SeriesAddress = z.infer<typeof seriesAddress>
