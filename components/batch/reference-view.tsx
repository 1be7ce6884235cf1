import Link from 'next/link'
import { Heading } from '@/components/ui/heading'
import { grouped } from '@/lib/number/rules'
import { ReadingsPart } from './readings-part'
import type { BatchWork } from './work'

/** A lot of a bought-in product: nobody here weighed or made it, so there is only what was read of it. */
export function ReferenceView({ work }: { work: BatchWork }) {
  const { batch } = work
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/batches">Batches</Link> · <b className="font-mono text-ink">{batch.code}</b>, a
            reference product, {grouped(batch.sizeG, 0)} g noted by {batch.createdBy}
          </>
        }
        headline={
          <>
            <b>{batch.formulaName}</b>, lot {batch.productLot}
          </>
        }
        sentence="Bought in to stand beside studies. Its formula is not known here; no headline, pooling or shelf life counts it."
      />
      {batch.note ? <p className="mt-4 max-w-[720px]">{batch.note}</p> : null}
      <div className="mt-6">
        <ReadingsPart work={work} moment="initial" />
      </div>
    </>
  )
}
