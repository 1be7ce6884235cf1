import { instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'
import { conditionFields } from './conditions'
import { attributeKey } from './own'
import { photoColour } from './photo-colour'
import { photoDrops } from './photo-drops'
import { photoLines } from './photo-lines'

const measured = z.number().min(-1e12).max(1e12)

/** What an emulsion-type test tells: which phase a drop of the sample meets the water or the dye with. */
export const outsidePhases = ['water outside', 'oil outside', 'not clear'] as const
export type OutsidePhase = (typeof outsidePhases)[number]

/** What belongs to the number: how it was come by. Heights in mm, mass in g, temperature in °C. */
export const entryDetail = z.strictObject({
  torquePercent: measured.optional(),
  spindle: z.string().trim().max(60).optional(),
  rpm: measured.optional(),
  topMm: measured.optional(),
  bottomMm: measured.optional(),
  totalMm: measured.optional(),
  /** Film, beads or drops without a layer, 0 to 4. */
  bleed: z.number().int().optional(),
  /** A layer that is seen and too thin for the ruler. */
  isTopHairline: z.literal(true).optional(),
  isBottomHairline: z.literal(true).optional(),
  /** A cream layer of an oil-in-water lotion, apart from oil and water. */
  creamMm: measured.optional(),
  /** Layers measured on a photo rather than with a ruler. */
  photoLines: photoLines.optional(),
  photoColour: photoColour.optional(),
  photoDrops: photoDrops.optional(),
  grossG: measured.optional(),
  word: z.string().max(60).optional(),
  ...conditionFields,
  sampleTemperatureC: measured.optional(),
  typeMethod: z.enum(['dilution', 'conductivity', 'dye']).optional(),
  /** Taken from a photo or judged by eye: shown as an estimate wherever it stands. */
  isEstimate: z.literal(true).optional(),
  radiusMm: measured.optional(),
  minutes: measured.optional(),
})
export type EntryDetail = z.infer<typeof entryDetail>

/**
 * One field as it was typed. `typed` is kept letter by letter; with a torque it is the torque's text, for layers
 * and masses any text that says what was read, else it is the value itself.
 */
export const entry = z
  .object({
    id: z.uuid(),
    attribute: attributeKey,
    replicate: z.number().int().min(1).max(9).default(1),
    /** A count of drops is as long as the drops are many. */
    typed: z.string().min(1, 'Type what was read.').max(12_000),
    detail: entryDetail.default({}),
    instrumentId: z.uuid().nullish(),
    /** The person was asked whether it is so, and it is. */
    isConfirmed: z.boolean().default(false),
  })
  .refine(({ attribute, typed }) => attribute === 'droplets' || typed.length <= 200, {
    path: ['typed'],
    message: 'At most 200 signs fit here.',
  })
export type Entry = z.output<typeof entry>

/** Two people read one jar: both stay on record, one counts, and the person says why. */
export const resolution = z.object({
  count: z.enum(['mine', 'theirs']),
  reason: z.string().trim().min(1, 'Say why this one counts.').max(500),
})

/** Times as the device says them; the server corrects them by the device's own error. */
export const deviceTimes = z.object({
  deviceNow: instant,
  claimedAt: instant,
})

export const readingsOfJar = deviceTimes.extend({
  version: z.number().int().positive(),
  note: z.string().trim().max(2000).default(''),
  /** None only where a jar that was read in part is closed. */
  readings: z.array(entry).max(60),
  /** These go on record; the jar stays open until the rest is read or left out. */
  isPartial: z.boolean().default(false),
  /** Written on paper first: `claimedAt` is the time that stands there. */
  isFromPaper: z.boolean().default(false),
  /** What the protocol asks for and is knowingly not read. */
  leaveOut: z.array(attributeKey).default([]),
  resolution: resolution.optional(),
})
export type ReadingsOfJar = z.input<typeof readingsOfJar>

export const jarToLog = readingsOfJar.extend({ pullJarId: z.uuid() })
export type JarToLog = z.output<typeof jarToLog>
