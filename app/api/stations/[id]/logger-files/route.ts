import { upload } from '@/lib/http/route'
import { takeLoggerFile } from '@/lib/station/commands/take-logger-file'
import { loggerFields, maxLoggerBytes, stationAddress } from '@/lib/station/schema'

export const POST = upload({
  permission: 'station.log',
  params: stationAddress,
  maxBytes: maxLoggerBytes,
  types: ['text/plain'],
  fields: loggerFields,
  handler: ({ db, actor, params, file, fields, now }) =>
    takeLoggerFile(db, actor, params.id, file, fields, now),
})
