import { shortestPassword } from '@/lib/person/rules'
import { email, initials, personName } from '@/lib/person/schema'
import * as z from '@/lib/http/zod'
import { labelGrid } from '@/lib/label/schema'

const labName = z.string().trim().min(1, 'Name the lab.').max(120)
const timeZone = z.string().refine(isTimeZone, 'Choose a time zone, such as Europe/Berlin.')

export const labToSetUp = z.object({
  code: z.string().trim().min(1, 'Type the code that the server printed.').max(100),
  labName,
  timeZone,
  name: personName,
  initials,
  email,
  password: z.string().min(1, `Choose a password of ${shortestPassword} characters or more.`).max(1000),
  /** What the first manager does besides: nobody changes their own roles later, and a small lab has few people. */
  roles: z
    .array(z.enum(['technician', 'formulator', 'qa']))
    .max(3)
    .default([]),
})

/** What is left out stays as it is. Monday is 1, Sunday 7. */
export const labToChange = z.object({
  version: z.number().int(),
  name: labName.optional(),
  timeZone: timeZone.optional(),
  workingDays: z
    .array(z.number().int().min(1).max(7))
    .min(1, 'The lab works on one day of the week at least.')
    .max(7)
    .refine((days) => new Set(days).size === days.length, 'A day stands twice.')
    .transform((days) => days.toSorted((a, b) => a - b))
    .optional(),
  labelGrid: labelGrid.nullable().optional(),
})

export type LabToSetUp = z.infer<typeof labToSetUp>
export type LabToChange = z.infer<typeof labToChange>

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions().timeZone.length > 0
  } catch {
    return false
  }
}
