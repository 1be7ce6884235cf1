import { write } from '@/lib/http/route'
import { undoSave } from '@/lib/pull/commands/undo-save'
import { undoneReason } from '@/lib/pull/rules/undo'
import { pullJarAddress, undoneSave } from '@/lib/pull/schema'

export const POST = write({
  permission: 'reading.log',
  params: pullJarAddress,
  input: undoneSave,
  reason: () => undoneReason,
  handler: ({ db, actor, params, input }) => undoSave(db, actor, params.id, input),
})
