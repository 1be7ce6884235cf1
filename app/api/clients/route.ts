import { addClient } from '@/lib/client/commands'
import { listClients } from '@/lib/client/queries'
import { clientToAdd } from '@/lib/client/schema'
import { read, write } from '@/lib/http/route'

// Read by whoever may see whom a formula or a study is for; not by clients, who would see each other.
export const GET = read({ permission: 'formula.read', handler: ({ db, actor }) => listClients(db, actor) })

export const POST = write({
  permission: 'lab.manage',
  input: clientToAdd,
  handler: ({ db, actor, input }) => addClient(db, actor, input),
})
