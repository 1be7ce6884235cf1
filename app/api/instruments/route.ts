import { read, write } from '@/lib/http/route'
import { createInstrument } from '@/lib/instrument/commands/keep'
import { listInstrumentPage } from '@/lib/instrument/queries/list'
import { instrumentList } from '@/lib/instrument/rules/list'
import { newInstrument } from '@/lib/instrument/schema'

export const GET = read({
  permission: 'instrument.read',
  query: instrumentList.query,
  handler: ({ db, actor, query }) => listInstrumentPage(db, actor, query),
})

export const POST = write({
  permission: 'instrument.write',
  input: newInstrument,
  handler: ({ db, actor, input }) => createInstrument(db, actor, input),
})
