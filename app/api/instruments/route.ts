import { read, write } from '@/lib/http/route'
import { createInstrument } from '@/lib/instrument/commands'
import { listInstruments } from '@/lib/instrument/queries'
import { newInstrument } from '@/lib/instrument/schema'

export const GET = read({
  permission: 'instrument.read',
  handler: ({ db, actor }) => listInstruments(db, actor),
})

export const POST = write({
  permission: 'instrument.write',
  input: newInstrument,
  handler: ({ db, actor, input }) => createInstrument(db, actor, input),
})
