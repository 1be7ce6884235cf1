import { email } from '@/lib/person/schema'
import * as z from '@/lib/http/zod'

const typed = (what: string) => z.string().min(1, what).max(1000)
const link = z.string().trim().min(1, 'Open the link in the mail again.').max(200)

export const personToSignIn = z.union([
  z.object({ email, password: typed('Type the password.') }).strict(),
  z.object({ demoPersonId: z.uuid() }).strict(),
])
export const passwordToChange = z.object({
  current: typed('Type the password you have now.'),
  next: typed('Choose a new password.'),
})
export const invitationToAccept = z.object({ token: link, password: typed('Choose a password.') })
export const resetToAsk = z.object({ email })
export const resetToFinish = invitationToAccept

export type PersonToSignIn = z.infer<typeof personToSignIn>
export type PasswordToChange = z.infer<typeof passwordToChange>
export type InvitationToAccept = z.infer<typeof invitationToAccept>
