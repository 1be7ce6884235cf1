import { calendarDay, instant } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'
import { zeroCelsius } from '@/lib/science/kelvin'

const degrees = z.number().gt(-zeroCelsius, 'That is below absolute zero.').max(400).nullable()

/** What a manager says of a place where jars stand. */
const stationFields = {
  name: z.string().trim().min(1, 'Give the station a name.').max(80),
  kind: z.enum(['temperature', 'freeze-thaw', 'transport']),
  temperatureC: degrees,
  lowC: degrees,
  highC: degrees,
  humidityPercent: z.number().min(0).max(100).nullable().default(null),
  cycleLowC: degrees.default(null),
  cycleHighC: degrees.default(null),
  /** What its lamps give where the jars stand, and how long a day. */
  lightLux: z.number().positive('Lamps give more than nothing.').max(200_000).nullable().default(null),
  lightUvWm2: z.number().positive('Lamps give more than nothing.').max(1000).nullable().default(null),
  lightHours: z
    .number()
    .positive('Lamps are on for some hours.')
    .max(24, 'A day has 24 hours.')
    .nullable()
    .default(null),
  walkOrder: z.number().int().min(1).max(999),
  shelves: z.number().int().min(1).max(99),
  placesPerShelf: z.number().int().min(1).max(500),
  caution: z.string().trim().max(500).default(''),
}

type Limits = {
  kind: 'temperature' | 'freeze-thaw' | 'transport'
  temperatureC: number | null
  lowC: number | null
  highC: number | null
  cycleLowC: number | null
  cycleHighC: number | null
  lightLux: number | null
  lightUvWm2: number | null
  lightHours: number | null
}

function limitsMakeSense(station: Limits, context: z.RefinementCtx): void {
  const fault = (path: string, message: string) => context.addIssue({ code: 'custom', path: [path], message })
  if (station.kind === 'temperature' && station.temperatureC === null)
    fault('temperatureC', 'Give the temperature that this station keeps.')
  if (station.lowC !== null && station.highC !== null && station.lowC >= station.highC)
    fault('highC', 'The upper limit must lie above the lower one.')
  if (station.temperatureC !== null && station.lowC !== null && station.temperatureC < station.lowC)
    fault('lowC', 'The lower limit lies above the temperature itself.')
  if (station.temperatureC !== null && station.highC !== null && station.temperatureC > station.highC)
    fault('highC', 'The upper limit lies below the temperature itself.')
  if (station.kind === 'freeze-thaw' && (station.cycleLowC === null || station.cycleHighC === null))
    fault('cycleLowC', 'Give both temperatures of the cycle.')
  if (station.cycleLowC !== null && station.cycleHighC !== null && station.cycleLowC >= station.cycleHighC)
    fault('cycleHighC', 'The warm half must be warmer than the cold half.')
  const isLit = station.lightLux !== null || station.lightUvWm2 !== null
  if (isLit && station.lightHours === null) fault('lightHours', 'Say how many hours a day the lamps are on.')
  if (!isLit && station.lightHours !== null)
    fault('lightLux', 'Say what the lamps give, in lux or in W/m², or leave the hours out.')
}

export const newStation = z.object({ id: z.uuid(), ...stationFields }).superRefine(limitsMakeSense)
export type NewStation = z.input<typeof newStation>

export const changedStation = z
  .object({ version: z.number().int().positive(), isActive: z.boolean(), ...stationFields })
  .superRefine(limitsMakeSense)
export type ChangedStation = z.input<typeof changedStation>

export const loggedTemperatures = z.object({
  /** Where a device says when: its clock may be off. */
  deviceNow: instant.optional(),
  readings: z
    .array(
      z.object({
        id: z.uuid(),
        measuredAt: instant,
        temperatureC: z
          .number('Give the temperature as a number.')
          .gt(-zeroCelsius, 'That is below absolute zero.')
          .max(400, 'That is hotter than any station.'),
        source: z.enum(['typed', 'logger']).default('typed'),
      }),
    )
    .min(1)
    .max(5000),
})
export type LoggedTemperatures = z.input<typeof loggedTemperatures>

/** A logger that reads every five minutes fills this in two years. */
export const maxLoggerRows = 200_000
export const maxLoggerBytes = 20_000_000

/** Fields of a form, which come as text. What is not chosen is told by the file itself. */
export const loggerFields = z.object({
  id: z.uuid(),
  isTaken: z.enum(['true', 'false']).transform((text) => text === 'true'),
  order: z.enum(['day first', 'month first']).nullable().default(null),
  unit: z.enum(['C', 'F']).nullable().default(null),
  column: z.coerce.number().int().min(0).max(200).nullable().default(null),
})
export type LoggerFields = z.output<typeof loggerFields>

export type LoggerPreview = {
  isTaken: boolean
  readAs: {
    delimiter: string
    zone: string
    columns: string[]
    timeColumns: number[]
    column: number
    unit: 'C' | 'F'
    order: 'day first' | 'month first' | null
  }
  asks: 'order' | null
  freshRows: number
  /** There already, by their time. */
  knownRows: number
  /** There already with another temperature: what is on record stays. */
  otherRows: { line: number; at: number; temperatureC: number; knownC: number }[]
  badRows: number
  bad: { line: number; why: string; text: string }[]
  notes: string[]
  from: string | null
  to: string | null
  minC: number | null
  maxC: number | null
  sample: { line: number; at: string; temperatureC: number }[]
  /** Who took this very file for this station before. */
  before: { by: string; at: string } | null
}

const reasonFor = (what: string) => z.string().trim().min(1, `Say why ${what}.`).max(500)

export const movedJars = z.object({
  id: z.uuid(),
  toStationId: z.uuid(),
  jarIds: z
    .array(z.uuid())
    .min(1, 'Choose the jars that are moved.')
    .max(5000)
    .transform((ids) => [...new Set(ids)]),
  reason: reasonFor('the jars are moved'),
})
export type MovedJars = z.input<typeof movedJars>

export const plannedDowntime = z
  .object({
    id: z.uuid(),
    fromOn: calendarDay('Give the first day.'),
    toOn: calendarDay('Give the last day.'),
    reason: reasonFor('the station is out of use'),
  })
  .refine(({ fromOn, toOn }) => fromOn <= toOn, {
    path: ['toOn'],
    message: 'The last day lies before the first.',
  })
export type PlannedDowntime = z.input<typeof plannedDowntime>

export const cancelledDowntime = z.object({ id: z.uuid(), reason: reasonFor('it is cancelled') })

export const stationAddress = z.object({ id: z.uuid() })
export const downtimeAddress = stationAddress.extend({ downtimeId: z.uuid() })
export const stationRecordPeriod = z.object({
  from: instant.optional(),
  to: instant.optional(),
})
