import { shortestPassword } from '@/lib/person/rules'
import { email, initials, personName } from '@/lib/person/schema'
import { z } from '@/lib/http/zod'

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

export const labToChange = z.object({ version: z.number().int(), name: labName, timeZone })

export type LabToSetUp = z.infer<typeof labToSetUp>
export type LabToChange = z.infer<typeof labToChange>

export const labKey = '/api/lab'

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions().timeZone.length > 0
  } catch {
    return false
  }
}
