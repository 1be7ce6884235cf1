import { blankSessionCookie, idOfCookie, sessionCookie } from '@/lib/auth/session'
import { clientAddress } from '@/lib/http/address'
import { read, write } from '@/lib/http/route'
import { signIn, signOut } from '@/lib/session/commands'
import { profileOf } from '@/lib/session/queries'
import { personToSignIn } from '@/lib/session/schema'

export const GET = read({ permission: 'profile.own', handler: ({ actor }) => profileOf(actor) })

export const POST = write({
  permission: 'public',
  input: personToSignIn,
  handler: async ({ db, input, request, reply }) => {
    const oldSessionId = idOfCookie(request.headers.get('cookie'))
    const secret = await signIn(db, input, { address: clientAddress(request), oldSessionId })
    reply.headers.append('set-cookie', sessionCookie(secret))
    return { isSignedIn: true }
  },
})

export const DELETE = write({
  permission: 'profile.own',
  handler: async ({ db, actor, reply }) => {
    await signOut(db, actor)
    reply.headers.append('set-cookie', blankSessionCookie())
    return { isSignedIn: false }
  },
})
