import { sessionCookie } from '@/lib/auth/session'
import { clientAddress } from '@/lib/http/address'
import { write } from '@/lib/http/route'
import { askReset, finishReset } from '@/lib/session/commands'
import { resetToAsk, resetToFinish } from '@/lib/session/schema'

export const POST = write({
  permission: 'public',
  input: resetToAsk,
  handler: async ({ db, input, request }) => {
    await askReset(db, input.email, clientAddress(request))
    return { isAsked: true }
  },
})

export const PUT = write({
  permission: 'public',
  input: resetToFinish,
  handler: async ({ db, input, request, reply }) => {
    const secret = await finishReset(db, input, clientAddress(request))
    reply.headers.append('set-cookie', sessionCookie(secret))
    return { isSignedIn: true }
  },
})
