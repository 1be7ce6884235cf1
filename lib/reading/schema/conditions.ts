import * as z from '@/lib/http/zod'
import { paths, phMethods } from '../rules/conditions'

const temperature = 'A sample lies between −30 and 120 °C.'

/** What a protocol fixes and a reading says of how it was come by, besides spindle and speed. */
export const conditionFields = {
  /** Of a viscosity: the viscometer's spring, as the lab names its classes. */
  spring: z.string().trim().max(60).optional(),
  /** When it was read after the start, how the spindle moved, how long the jar had stood. */
  seconds: z.number().positive('Seconds are above 0.').max(86_400).optional(),
  path: z.enum(paths).optional(),
  restMinutes: z.number().min(0, 'Rest is at least 0 minutes.').max(100_000).optional(),
  sampleTemperatureC: z.number().min(-30, temperature).max(120, temperature).optional(),
  phMethod: z.enum(phMethods).optional(),
  /** Of an extract: parts of water to one of emulsion, and how long it stands. */
  extractParts: z.number().positive('An extract has more than 0 parts of water.').max(1000).optional(),
  extractMinutes: z.number().min(0, 'An extract stands at least 0 minutes.').max(10_000).optional(),
}
