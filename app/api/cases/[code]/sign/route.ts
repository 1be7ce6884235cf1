import { countAttempt, forgiveAttempt } from '@/lib/auth/throttle'
import { clientAddress } from '@/lib/http/address'
import { write } from '@/lib/http/route'
import { signCase } from '@/lib/shelf-case/commands/sign'
import { caseCode, caseSignature } from '@/lib/shelf-case/schema'

export const POST = write({
  permission: 'case.sign',
  params: caseCode,
  input: caseSignature,
  handler: async ({ db, actor, params, input, request }) => {
    // A stolen session must not guess the password here faster than at the door.
    const attempt = { account: actor.email, address: clientAddress(request) }
    await countAttempt(attempt)
    const signed = await signCase(db, actor, params.code, input)
    await forgiveAttempt(attempt)
    return signed
  },
})
