import { download } from '@/lib/http/route'
import { renderLabels } from '@/lib/label/document'
import { getLabels } from '@/lib/label/queries'
import { labelChoice } from '@/lib/label/schema'
import { studyAddress } from '@/lib/study/schema'

export const GET = download({
  permission: 'bench.read',
  params: studyAddress,
  query: labelChoice,
  handler: async ({ db, actor, params, query }) => ({
    body: await renderLabels(await getLabels(db, actor, params.code), query),
    type: 'application/pdf',
    fileName: `labels-${params.code}.pdf`,
  }),
})
