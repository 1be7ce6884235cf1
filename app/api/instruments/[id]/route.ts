import { read, write } from '@/lib/http/route'
import { changeInstrument } from '@/lib/instrument/commands/keep'
import { getInstrument } from '@/lib/instrument/queries/list'
import { changedInstrument, instrumentAddress } from '@/lib/instrument/schema'

export const GET = read({
  permission: 'instrument.read',
  params: instrumentAddress,
  handler: ({ db, actor, params }) => getInstrument(db, actor, params.id),
})

export const PUT = write({
  permission: 'instrument.write',
  params: instrumentAddress,
  input: changedInstrument,
  handler: ({ db, actor, params, input }) => changeInstrument(db, actor, params.id, input),
})
