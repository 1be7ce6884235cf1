import type { Metadata } from 'next'
import { qrOf } from '@/components/jar/qr'
import { StudyLabels } from '@/components/study/study-labels'
import { page } from '@/lib/http/page'
import { getStudyJars } from '@/lib/study/queries/jars'
import { found } from '../../found'

export const permission = 'bench.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${decodeURIComponent((await params).code)}, labels` }
}

export default async function LabelsPage({ params }: Props) {
  const { actor, db } = await page(permission)
  const code = decodeURIComponent((await params).code)
  const { jars } = await found(getStudyJars(db, actor, code))
  // What was opened at the start is gone and needs no label.
  const labels = jars
    .filter((jar) => jar.state !== 'spent' && jar.state !== 'lost')
    .map((jar) => ({ jar, qr: qrOf(jar.code) }))
  return <StudyLabels code={code} labels={labels} />
}
