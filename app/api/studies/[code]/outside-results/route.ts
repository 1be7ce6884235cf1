import { read, upload } from '@/lib/http/route'
import { addOutsideResult } from '@/lib/outside/commands'
import { listOutsideResults } from '@/lib/outside/queries'
import { documentTypes, maxDocumentBytes, outsideFields } from '@/lib/outside/schema'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'reading.read',
  params: studyAddress,
  handler: ({ db, actor, params }) => listOutsideResults(db, actor, params.code),
})

export const POST = upload({
  permission: 'reading.log',
  params: studyAddress,
  maxBytes: maxDocumentBytes,
  types: documentTypes,
  fields: outsideFields,
  handler: ({ db, actor, params, file, fields }) => addOutsideResult(db, actor, params.code, file, fields),
})
