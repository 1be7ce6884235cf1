import * as z from '@/lib/http/zod'
import { genericGrids } from './rules/grid'
import { gridFaults } from './rules/layout'

const mm = z.number('Type millimetres.').max(300)
const size = mm.positive('Type millimetres.')
const gap = mm.min(0, 'A gap is 0 or more.')

export const labelGrid = z
  .object({
    paper: z.enum(['A4', 'Letter']),
    columns: z.number('Type how many stand beside each other.').int().min(1).max(20),
    rows: z.number('Type how many stand below each other.').int().min(1).max(50),
    widthMm: size,
    heightMm: size,
    leftMm: gap,
    topMm: gap,
    gapXMm: gap,
    gapYMm: gap,
  })
  .superRefine((grid, context) => {
    for (const { path, sentence } of gridFaults(grid))
      context.addIssue({ code: 'custom', path: [path], message: sentence })
  })

/** The sheet that the lab has described itself. */
export const ownGridKey = 'own'

export const labelChoice = z.object({
  sheet: z.enum([ownGridKey, ...genericGrids.map((one) => one.key)]).default(genericGrids[0]!.key),
  /** The first free label of a sheet that is begun, counted along the rows. */
  first: z.coerce.number('Type a number.').int().min(1, 'Labels are counted from 1.').max(1000).default(1),
  /** Every jar that still stands, those of one of the study's stations or its retains, those moved, or the jars named. */
  of: z.union([z.enum(['all', 'retains', 'moved', 'jars']), z.uuid()]).default('all'),
  /** Codes with a comma between them, where the jars are named. */
  jars: z.string().trim().max(6000).default(''),
})
export type LabelChoice = z.output<typeof labelChoice>
