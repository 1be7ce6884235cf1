import { sessionCookie } from '@/lib/auth/session'
import { clientAddress } from '@/lib/http/address'
import { write } from '@/lib/http/route'
import { changePassword } from '@/lib/session/commands'
import { passwordToChange } from '@/lib/session/schema'

export const POST = write({
  permission: 'profile.own',
  input: passwordToChange,
  handler: async ({ db, actor, input, request, reply }) => {
    const secret = await changePassword(db, actor, input, clientAddress(request))
    reply.headers.append('set-cookie', sessionCookie(secret))
    return { isChanged: true }
  },
})
