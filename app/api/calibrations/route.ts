import { logCalibration } from '@/lib/calibration/commands'
import { newCalibration } from '@/lib/calibration/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'instrument.calibrate',
  input: newCalibration,
  handler: ({ db, actor, input, now }) => logCalibration(db, actor, input, now),
})
