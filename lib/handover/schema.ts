import * as z from '@/lib/http/zod'
import { deviceTimes } from '@/lib/reading/schema/entry'

/** What one shift tells the next; shown on the Bench until somebody has read it. */
export const handoverNote = deviceTimes.extend({
  id: z.uuid(),
  text: z.string().trim().min(1, 'Write what the next shift must know.').max(2000),
})
export type HandoverNote = z.output<typeof handoverNote>

export const handoverAddress = z.object({ id: z.uuid() })
/** `id` of the entry that says so. */
export const readHandover = z.object({ id: z.uuid() })
