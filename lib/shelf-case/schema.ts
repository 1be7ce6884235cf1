import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

export const caseKinds = ['real time', 'provisional'] as const
export const caseStates = ['drafting', 'put forward', 'sent back', 'signed', 'superseded'] as const
export type CaseState = (typeof caseStates)[number]

export const caseCode = z.object({ code: z.string().min(1).max(20) })

const months = z
  .number('Give whole months.')
  .int('Give whole months.')
  .min(1, 'Give at least one month.')
  .max(120)
const text = (max: number) => z.string().trim().max(max, `At most ${max} signs fit here.`)

export const caseProposal = z.object({
  kind: z.enum(caseKinds),
  proposedMonths: months,
  storageStatement: text(300).min(
    1,
    'Say how the product is to be stored, for instance "closed, 5 to 25 °C".',
  ),
  whyFewer: text(600).default(''),
  provisionalRule: text(1000).default(''),
  reviewOn: calendarDay('Give the day as year-month-day.').nullable().default(null),
  periodAfterOpeningMonths: months.nullable().default(null),
  periodAfterOpeningEvidence: text(600).default(''),
})
export type CaseProposal = z.infer<typeof caseProposal>

export const newCase = caseProposal.extend({
  id: z.uuid(),
  studyId: z.uuid(),
  studyStationId: z.uuid().nullable().default(null),
})
export type NewCase = z.infer<typeof newCase>

export const editedCase = caseProposal.extend({ version: z.number().int() })
export type EditedCase = z.infer<typeof editedCase>

export const putForward = z.object({ version: z.number().int() })

export const caseSignature = z
  .object({
    id: z.uuid(),
    version: z.number().int(),
    /** The hash that the signer saw: another content is refused. */
    contentSha256: z
      .string()
      .regex(/^[0-9a-f]{64}$/, 'The hash of the content is missing. Open the case again.'),
    meaning: z.enum(['approve', 'send back'], 'Choose what your signature means.'),
    comment: text(1000).default(''),
    password: z.string().min(1, 'Type your password once more.').max(128),
  })
  .refine((s) => s.meaning === 'approve' || s.comment.length > 0, {
    path: ['comment'],
    message: 'Say what must change before it can be signed.',
  })
export type CaseSignature = z.infer<typeof caseSignature>
