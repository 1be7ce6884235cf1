import { renameClient } from '@/lib/client/commands'
import { clientId, clientToRename } from '@/lib/client/schema'
import { write } from '@/lib/http/route'

export const PATCH = write({
  permission: 'lab.manage',
  params: clientId,
  input: clientToRename,
  handler: ({ db, actor, params, input }) => renameClient(db, actor, params.id, input),
})
