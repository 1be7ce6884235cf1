import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { studyRights } from '@/components/study/rights'
import { StudyCurves } from '@/components/study/study-curves'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getCurves } from '@/lib/study/queries/curves'
import { studyKeys } from '@/lib/study/keys'
import { curvesQuery } from '@/lib/study/schema'
import { found } from '../../found'

export const permission = 'study.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, curves` }
}

export default async function CurvesPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const { batch, station, ...query } = await searchParams
  const { beside } = curvesQuery.parse(query)
  const curves = await found(getCurves(db, actor, code, beside))
  return (
    <SWRConfig value={{ fallback: { [studyKeys.curves(code, beside)]: curves } }}>
      <StudyCurves
        code={code}
        rights={studyRights(actor)}
        beside={beside}
        batch={typeof batch === 'string' ? batch : null}
        station={typeof station === 'string' ? station : null}
      />
    </SWRConfig>
  )
}
