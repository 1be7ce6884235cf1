import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

export const pullJarAddress = z.object({ id: z.uuid() })
const version = z.number().int().positive()

/** `takeOver`: someone else has the jar open, and I go on with it nevertheless. */
export const openingOfJar = z.object({ version, takeOver: z.boolean().default(false) })
export const takingOut = z.object({ version })
/** A jar that takes the place of one that was missed; `id` is its new line in the pull. */
export const standIn = z.object({ id: z.uuid(), jarId: z.uuid() })
export type OpeningOfJar = z.output<typeof openingOfJar>
export type TakingOut = z.output<typeof takingOut>
export type StandIn = z.output<typeof standIn>

/** Readings of one save, taken back by whoever saved them. */
export const undoneSave = z.object({ readings: z.array(z.uuid()).min(1, 'Say which readings.').max(60) })
export type UndoneSave = z.output<typeof undoneSave>

/** A spare jar that is called for by a reading. */
export type AssignedRepeat = {
  pullJarId: string
  jarCode: string
  name: string
  shelf: number | null
  place: number | null
  attribute: string
}

const day = calendarDay()

/** Pulls that leave a closed day, each with the day on which it stood when this was chosen. */
export const movedPulls = z.object({
  moves: z
    .array(z.object({ pullId: z.uuid(), from: day, to: day }))
    .min(1, 'Choose at least one pull.')
    .max(2000)
    .refine(
      (list) => new Set(list.map((one) => one.pullId)).size === list.length,
      'A pull stands twice in the list.',
    ),
  reason: z.string().trim().min(1, 'Say why the pulls are moved.').max(500),
})
export type MovedPulls = z.output<typeof movedPulls>
