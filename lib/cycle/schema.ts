import * as z from '@/lib/http/zod'

const instant = z.iso.datetime({ offset: true })

export const cycleStep = z
  .object({
    id: z.uuid(),
    studyStationId: z.uuid(),
    cycle: z.number().int().min(1, 'Cycles count from 1.').max(100),
    half: z.enum(['cold', 'warm'], 'Choose the cold or the warm half.'),
    begunAt: instant,
    endedAt: instant,
    reachedC: z.number().min(-100).max(100).nullable().default(null),
    isFrozenThrough: z.boolean().nullable().default(null),
    note: z.string().trim().max(2000).default(''),
  })
  .refine((step) => Date.parse(step.endedAt) > Date.parse(step.begunAt), {
    path: ['endedAt'],
    message: 'The half ends after it begins. Correct one of the two times.',
  })
export type CycleStep = z.output<typeof cycleStep>

export const cycleFilter = z.object({ studyStation: z.uuid() })

export const cycleKeys = {
  list: (studyStationId: string) => `/api/cycles?studyStation=${studyStationId}`,
  log: '/api/cycles',
}
