import { download } from '@/lib/http/route'
import { getFrozenContent } from '@/lib/shelf-case/queries/read'
import { caseCode } from '@/lib/shelf-case/schema'

/** The frozen bytes as their SHA-256 was taken, for `npm run recheck`. */
export const GET = download({
  permission: 'report.read',
  params: caseCode,
  handler: async ({ db, actor, params }) => ({
    body: new TextEncoder().encode(await getFrozenContent(db, actor, params.code)),
    type: 'application/json',
    fileName: `case-${params.code}.json`,
  }),
})
