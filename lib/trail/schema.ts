import { z } from '@/lib/http/zod'

export const trailPageSize = 100

export const trailQuery = z.object({
  table: z.string().max(60).optional(),
  rowId: z.string().max(80).optional(),
  actorId: z.uuid().optional(),
  studyId: z.uuid().optional(),
  /** The id below which the next page begins. */
  before: z.coerce.number().int().positive().optional(),
})

export type TrailQuery = z.infer<typeof trailQuery>

export function trailKey(query: TrailQuery = {}): string {
  const given = Object.entries(query).filter(([, value]) => value !== undefined)
  const search = new URLSearchParams(given.map(([key, value]) => [key, String(value)])).toString()
  return search ? `/api/trail?${search}` : '/api/trail'
}
