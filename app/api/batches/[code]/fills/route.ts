import { fillJar } from '@/lib/batch/commands/fill-jar'
import { batchAddress, fillJarInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'batch.write',
  params: batchAddress,
  input: fillJarInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => fillJar(db, actor, params.code, input),
})
