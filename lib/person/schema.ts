import { roles } from '@/lib/auth/actor'
import * as z from '@/lib/http/zod'

// No line breaks or other control characters: names stand in mails, logs and reports.
const line = (what: string, max: number) =>
  z
    .string()
    .trim()
    .min(1, what)
    .max(max)
    .refine((text) => !/[\u0000-\u001f\u007f]/.test(text), 'Use one line of plain text.')

export const personName = line('Type the name.', 120)
export const initials = line('Type the initials.', 6)
export const email = z
  .string()
  .trim()
  .toLowerCase()
  .max(200)
  .pipe(z.email('Type an e-mail address, such as name@lab.example.'))

const held = z.array(z.enum(roles)).min(1, 'Choose at least one role.').max(roles.length)
const belongs = {
  roles: held.transform((list) => [...new Set(list)]),
  clientId: z.uuid().nullable().default(null),
}

type Held = { roles: readonly string[]; clientId: string | null }
const aloneAsClient = (person: Held) => !person.roles.includes('client') || person.roles.length === 1
const hasClient = (person: Held) => !person.roles.includes('client') || person.clientId !== null
const alone = {
  path: ['roles'],
  message: 'Somebody of a client holds that role alone. Take the others away.',
}
const named = { path: ['clientId'], message: 'Choose the client this person belongs to.' }

export const personId = z.object({ id: z.uuid() })

export const personToInvite = z
  .object({ id: z.uuid(), email, name: personName, initials, ...belongs })
  .refine(aloneAsClient, alone)
  .refine(hasClient, named)

export const personToChange = z
  .object({
    version: z.number().int(),
    name: personName,
    initials,
    isActive: z.boolean(),
    reason: z.string().trim().min(1, 'Say why, for the trail.').max(500),
    ...belongs,
  })
  .refine(aloneAsClient, alone)
  .refine(hasClient, named)

export type PersonToInvite = z.infer<typeof personToInvite>
export type PersonToChange = z.infer<typeof personToChange>
