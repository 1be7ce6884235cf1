import { sessionCookie } from '@/lib/auth/session'
import { countRequest } from '@/lib/auth/throttle'
import { clientAddress } from '@/lib/http/address'
import { write } from '@/lib/http/route'
import { setUpLab } from '@/lib/lab/commands'
import { labToSetUp } from '@/lib/lab/schema'

export const POST = write({
  permission: 'public',
  input: labToSetUp,
  handler: async ({ db, input, request, reply }) => {
    await countRequest('setup', clientAddress(request), 20)
    reply.headers.append('set-cookie', sessionCookie(await setUpLab(db, input)))
    return { isSignedIn: true }
  },
})
