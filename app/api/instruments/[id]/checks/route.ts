import { write } from '@/lib/http/route'
import { checkInstrument } from '@/lib/instrument/commands/check'
import { dailyChecked, instrumentAddress } from '@/lib/instrument/schema'

export const POST = write({
  permission: 'instrument.calibrate',
  params: instrumentAddress,
  input: dailyChecked,
  handler: ({ db, actor, params, input, now }) => checkInstrument(db, actor, params.id, input, now),
})
