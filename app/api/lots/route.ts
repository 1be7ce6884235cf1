import { read, write } from '@/lib/http/route'
import { keepLot } from '@/lib/lot/commands'
import { listLots } from '@/lib/lot/queries'
import { newLot } from '@/lib/lot/schema'

export const GET = read({
  permission: 'instrument.read',
  handler: ({ db, actor }) => listLots(db, actor),
})

export const POST = write({
  permission: 'instrument.calibrate',
  input: newLot,
  handler: ({ db, actor, input }) => keepLot(db, actor, input),
})
