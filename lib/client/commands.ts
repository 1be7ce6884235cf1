import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { expectOne } from '@/lib/trail/queries'
import type { ClientToAdd, ClientToRename } from './schema'

export async function addClient(trx: Trx, _actor: Actor, input: ClientToAdd) {
  await refuseTaken(trx, input.id, input.name)
  return trx.insertInto('client').values(input).returning(['id', 'name', 'version']).executeTakeFirstOrThrow()
}

export async function renameClient(trx: Trx, _actor: Actor, id: string, input: ClientToRename) {
  await refuseTaken(trx, id, input.name)
  const renamed = await trx
    .updateTable('client')
    .set({ name: input.name, version: input.version + 1 })
    .where('id', '=', id)
    .where('version', '=', input.version)
    .returning(['id', 'name', 'version'])
    .executeTakeFirst()
  return expectOne(trx, renamed, { table: 'client', id, thing: 'this client' })
}

async function refuseTaken(trx: Trx, id: string, name: string): Promise<void> {
  const taken = await trx
    .selectFrom('client')
    .select('name')
    .where((eb) => eb(eb.fn('lower', ['name']), '=', name.toLowerCase()))
    .where('id', '!=', id)
    .executeTakeFirst()
  if (taken) throw refuse.conflict(`There is already a client ${taken.name}. Choose another name.`)
}
