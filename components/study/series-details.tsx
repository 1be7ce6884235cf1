'use client'

import useSWR from 'swr'
import { ErrorNote } from '@/components/ui/error-note'
import { FigureDetails, FigureFactsWait } from '@/components/ui/figure-details'
import { FigureFactsPanel } from '@/components/ui/figure-facts'
import { fetcher } from '@/lib/http/fetcher'
import type { FigureFacts } from '@/lib/science/methods/method'
import { studyKeys } from '@/lib/study/keys'
import type { SeriesAddress } from '@/lib/study/schema'
import type { ReactNode } from 'react'

type Props = {
  code: string
  series: SeriesAddress
  /** The figure or the series as it is read: "45 °C leaning". */
  figure: string
  children?: ReactNode
  className?: string
}

/** A series that can be asked what it is computed from; looked up when it is. */
export function SeriesDetails({ code, series, figure, children, className }: Props) {
  return (
    <FigureDetails
      figure={figure}
      content={<SeriesFacts address={studyKeys.series(code, series)} />}
      className={className}
    >
      {children}
    </FigureDetails>
  )
}

function SeriesFacts({ address }: { address: string }) {
  const { data, error } = useSWR<FigureFacts, unknown>(address, fetcher)
  if (data) return <FigureFactsPanel facts={data} />
  if (error === undefined) return <FigureFactsWait />
  return (
    <div className="px-5 py-4 pr-12">
      <ErrorNote error={error} />
    </div>
  )
}
