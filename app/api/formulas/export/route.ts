import { formulaSource } from '@/lib/formula/queries/list-formulas'
import { formulaList } from '@/lib/formula/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'formula.read',
  query: formulaList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: formulaList, source: formulaSource(db, actor, query), query }),
})
