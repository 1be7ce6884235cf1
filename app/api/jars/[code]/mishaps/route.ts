import { write } from '@/lib/http/route'
import { noteMishap } from '@/lib/jar/commands/note-mishap'
import { jarAddress, jarMishap } from '@/lib/jar/schema'

export const POST = write({
  permission: 'reading.log',
  params: jarAddress,
  input: jarMishap,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => noteMishap(db, actor, params.code, input),
})
