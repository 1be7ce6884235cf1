import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'
import { outsideTests } from '@/lib/protocol/schema'

export const outcomes = ['pass', 'fail', 'not judged'] as const

export const documentTypes = ['application/pdf', 'image/jpeg', 'image/png'] as const
export const maxDocumentBytes = 25 * 1024 * 1024

const text = (max: number) => z.string().trim().max(max, `At most ${max} signs fit here.`)
const blank = (value: string) => (value.trim() === '' ? undefined : value)

/** Fields of the form that carries the document. What is left empty is about all batches or the whole study. */
export const outsideFields = z
  .object({
    id: z.uuid(),
    batch: z.string().max(60).default('').transform(blank),
    weeks: z
      .string()
      .default('')
      .transform(blank)
      .transform((value) => (value === undefined ? undefined : Number(value.replace(',', '.'))))
      .pipe(z.number('Give the week as a number.').min(0).max(520).optional()),
    what: z.enum(outsideTests, 'Choose what was tested.'),
    test: text(160).min(1, 'Name the test, such as challenge test with five strains.'),
    outcome: z.enum(outcomes, 'Say whether it passed.'),
    value: text(200).default(''),
    labName: text(160).min(1, 'Name the laboratory.'),
    reportNumber: text(80).min(1, 'Give the number of the report.'),
    reportedOn: calendarDay('Give the day of the report.'),
    note: text(500).default(''),
    supersedesId: z.string().default('').transform(blank).pipe(z.uuid().optional()),
    reason: text(500).default(''),
  })
  .refine(({ supersedesId, reason }) => !supersedesId || reason !== '', {
    path: ['reason'],
    message: 'Say why the other result is corrected. Both stay on record.',
  })
export type OutsideFields = z.output<typeof outsideFields>

export const outsideAddress = z.object({ id: z.uuid() })
