import type { Metadata } from 'next'
import { StartStudyForm } from '@/components/study/start-study-form'
import { listClients } from '@/lib/client/queries'
import { page } from '@/lib/http/page'
import { listInstruments } from '@/lib/instrument/queries/list'
import { listProtocols } from '@/lib/protocol/queries'
import { listComingDowntimes } from '@/lib/station/queries/downtimes'
import { listLeavings } from '@/lib/station/queries/places'
import { listStations } from '@/lib/station/queries/stations'
import { listReleasedBatches } from '@/lib/study/queries/batches'
import { getWorkload } from '@/lib/study/queries/workload'

export const permission = 'study.write'
export const metadata: Metadata = { title: 'Start a study' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function NewStudyPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const { batch, protocol } = await searchParams
  const lab = await getWorkload(db, actor)
  const offer = {
    batches: await listReleasedBatches(db),
    protocols: await listProtocols(db, actor),
    stations: await listStations(db, actor),
    leavings: await listLeavings(db),
    downtimes: await listComingDowntimes(db, lab.today),
    clients: await listClients(db, actor),
    instruments: await listInstruments(db, actor),
    lab,
  }
  return (
    <StartStudyForm
      offer={offer}
      batchCode={typeof batch === 'string' ? batch : null}
      protocolCode={typeof protocol === 'string' ? protocol : null}
    />
  )
}
