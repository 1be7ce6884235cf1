import { checkKeys } from '@/lib/formula/rules/checks/check'
import * as z from '@/lib/http/zod'

export const answerKinds = ['answered', 'set aside'] as const

/** A person's answer to a question that a formula's version leaves open. */
export const formulaAnswerInput = z.object({
  id: z.uuid(),
  versionId: z.uuid(),
  question: z.enum(checkKeys, 'That is no question to a formula. Load the page again.'),
  kind: z.enum(answerKinds, 'Choose whether this answers the question or sets it aside.'),
  note: z
    .string('Say why in a few words.')
    .trim()
    .min(1, 'Say why in a few words: the next one who reads it was not there.')
    .max(1000, 'A note has at most 1000 signs.'),
  /** What the question rested on when it was on screen; another is refused with 412. */
  askedAbout: z.string().max(200_000),
})
export type FormulaAnswerInput = z.output<typeof formulaAnswerInput>
