import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { WorkloadView } from '@/components/lab/workload-view'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listPullsOnClosedDays } from '@/lib/pull/queries/on-closed-days'
import { pullKeys } from '@/lib/pull/keys'
import { getWorkload } from '@/lib/study/queries/workload'
import { workloadKey } from '@/lib/study/keys'

export const permission = 'bench.read'
export const metadata: Metadata = { title: 'Weeks ahead' }

export default async function WorkloadPage() {
  const { actor, db } = await page(permission)
  const fallback = {
    [workloadKey]: await getWorkload(db, actor),
    [pullKeys.moves]: await listPullsOnClosedDays(db),
  }
  return (
    <SWRConfig value={{ fallback }}>
      <WorkloadView mayManage={may(actor, 'lab.manage')} />
    </SWRConfig>
  )
}
