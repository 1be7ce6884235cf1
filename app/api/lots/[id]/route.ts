import { write } from '@/lib/http/route'
import { changeLot } from '@/lib/lot/commands'
import { changedLot, lotAddress } from '@/lib/lot/schema'

export const PUT = write({
  permission: 'instrument.calibrate',
  params: lotAddress,
  input: changedLot,
  handler: ({ db, actor, params, input }) => changeLot(db, actor, params.id, input),
})
