import type { Metadata } from 'next'
import { labelOf } from '@/components/jar/label-of'
import { StudyLabels } from '@/components/study/study-labels'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getLabels } from '@/lib/label/queries'
import { labelChoice } from '@/lib/label/schema'
import { degrees } from '@/lib/study/rules/finding'
import { withVariant } from '@/lib/study/rules/words'
import { found } from '../../found'

export const permission = 'bench.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, labels` }
}

/** The address may ask for certain jars, so that whoever moved some comes here with their codes. */
export default async function LabelsPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const asked = labelChoice.safeParse(await searchParams)
  const { jars, ownPack, ownGrid } = await found(getLabels(db, actor, code))
  return (
    <StudyLabels
      code={code}
      ownGrid={ownGrid}
      start={asked.success ? asked.data : labelChoice.parse({})}
      jars={jars.map((jar) => ({
        code: jar.code,
        state: jar.state,
        studyStationId: jar.studyStationId,
        isMoved: jar.isMoved,
        station: stationOf(jar),
        label: labelOf(jar, ownPack),
      }))}
    />
  )
}

function stationOf(jar: Awaited<ReturnType<typeof getLabels>>['jars'][number]): string {
  if (jar.studyStationId === null) return 'Retains'
  const name = jar.temperatureC === null ? (jar.stationName ?? '') : degrees(jar.temperatureC)
  return withVariant(name, jar.variant ?? '')
}
