'use client'

import { useRouter } from 'next/navigation'
import { Checkbox } from '@/components/ui/checkbox'
import type { ReleasedBatch } from '@/lib/study/queries/batches'
import { grouped } from '@/lib/number/rules'
import { AddReference } from './add-reference'
import type { Draft, Offer } from './start-state'

type Props = { offer: Offer; draft: Draft; set: (change: Partial<Draft>) => void }

/** The batches of a study, and what stands beside them as a reference: bought-in products always do. */
export function BatchChoice({ offer, draft, set }: Props) {
  const router = useRouter()
  const isTaken = (id: string) => draft.batchIds.includes(id) || draft.referenceIds.includes(id)
  const without = (id: string) => ({
    batchIds: draft.batchIds.filter((one) => one !== id),
    referenceIds: draft.referenceIds.filter((one) => one !== id),
  })

  function take(batch: ReleasedBatch, isOn: boolean) {
    const rest = without(batch.id)
    if (!isOn) return set(rest)
    if (batch.isReference) return set({ referenceIds: [...rest.referenceIds, batch.id] })
    set({ clientId: draft.clientId || batch.clientId || '', batchIds: [...rest.batchIds, batch.id] })
  }

  function takeAs(batch: ReleasedBatch, isReference: boolean) {
    const rest = without(batch.id)
    set(
      isReference
        ? { ...rest, referenceIds: [...rest.referenceIds, batch.id] }
        : { ...rest, batchIds: [...rest.batchIds, batch.id] },
    )
  }

  return (
    <div className="grid gap-2">
      <fieldset className="min-w-0">
        <legend className="font-600">Batches</legend>
        <div className="max-h-[260px] divide-y divide-hair overflow-y-auto border-b border-hair">
          {offer.batches.map((batch) => (
            <div key={batch.id} className="flex flex-wrap items-center justify-between gap-x-4">
              <Checkbox
                label={
                  <>
                    <b className="font-650">{batch.code}</b> {batch.formulaName}
                    {batch.productLot ? `, lot ${batch.productLot}` : ''}
                  </>
                }
                checked={isTaken(batch.id)}
                onSet={(isOn) => take(batch, isOn)}
              />
              <span className="ml-auto flex items-center gap-4 text-14 whitespace-nowrap text-soft">
                {batch.isReference ? (
                  'reference product'
                ) : isTaken(batch.id) ? (
                  <Checkbox
                    label={
                      <>
                        as a reference<span className="sr-only"> {batch.code}</span>
                      </>
                    }
                    checked={draft.referenceIds.includes(batch.id)}
                    onSet={(isReference) => takeAs(batch, isReference)}
                  />
                ) : null}
                <span>{grouped(Math.floor((batch.yieldG ?? 0) - batch.takenG), 0)} g left</span>
              </span>
            </div>
          ))}
        </div>
      </fieldset>
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-2">
        <AddReference
          onAdded={(id) => {
            set({ referenceIds: [...draft.referenceIds, id] })
            router.refresh()
          }}
        />
        <p className="min-w-0 flex-1 text-14 text-soft">
          A reference is pulled and read like the others and drawn beside them; no headline, pooling or shelf
          life counts it.
        </p>
      </div>
    </div>
  )
}
