import { ingredientSource } from '@/lib/ingredient/queries'
import { ingredientList } from '@/lib/ingredient/rules'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'formula.read',
  query: ingredientList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: ingredientList, source: ingredientSource(db, actor, query), query }),
})
