import { sessionCookie } from '@/lib/auth/session'
import { clientAddress } from '@/lib/http/address'
import { write } from '@/lib/http/route'
import { acceptInvitation } from '@/lib/session/commands'
import { invitationToAccept } from '@/lib/session/schema'

export const POST = write({
  permission: 'public',
  input: invitationToAccept,
  handler: async ({ db, input, request, reply }) => {
    const secret = await acceptInvitation(db, input, clientAddress(request))
    reply.headers.append('set-cookie', sessionCookie(secret))
    return { isSignedIn: true }
  },
})
