'use client'

import { useState } from 'react'
import { BalanceChoice, type Balance } from './balance-choice'
import { Beaker } from './beaker'
import { useKept } from '@/components/device/use-kept'
import { emptyWeighDraft, judged } from './weigh-draft'
import { WeighList } from './weigh-list'
import { WeighPanel } from './weigh-panel'
import { WeighedRow } from './weighed-row'
import type { BatchWork } from './work'

/** The weighing sheet: the row of jars, the vessel, the list, and the line in hand. */
export function WeighPart({ work }: { work: BatchWork }) {
  const { batch, isBench } = work
  const lines = batch.weighings
  const isOpen = work.mayWrite && batch.state === 'making'
  const [picked, setPicked] = useState<string | null>(null)
  const [balance, setBalance] = useKept<Balance>('batch.balance', { id: '', name: '' })
  const current = isOpen
    ? (lines.find((line) => line.id === picked) ?? lines.find((line) => line.actualG === null))
    : undefined
  const next = lines.find((line) => line.actualG === null && line.id !== current?.id)
  const [draft, setDraft, forget] = useKept(`batch.${current?.id ?? 'none'}`, emptyWeighDraft)
  const now = current ? judged(current, draft, batch.tolerancePercent) : null
  const isWater = (line: { isInternal: boolean }) =>
    line.isInternal === (batch.emulsionType !== 'oil-in-water')
  return (
    <div>
      <div className="-mx-4 flex flex-wrap items-end justify-between gap-x-8 gap-y-3 bg-recess px-4 py-3 sm:-mx-10 sm:px-10">
        <WeighedRow
          lines={lines}
          current={current?.id ?? null}
          poured={current ? (now?.totalG ?? now?.beforeG ?? 0) / current.targetG : 0}
          isWater={isWater}
        />
        {isOpen ? <BalanceChoice batch={batch} balance={balance} onBalance={setBalance} /> : null}
      </div>
      <div className="grid gap-x-10 gap-y-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="grid content-start gap-6 py-5 sm:grid-cols-[minmax(0,10fr)_minmax(0,12fr)]">
          {current && now ? (
            <div className="hidden sm:block">
              <Beaker
                targetG={current.targetG}
                actualG={now.totalG ?? (now.beforeG || null)}
                tolerancePercent={batch.tolerancePercent}
                isWater={isWater(current)}
              />
            </div>
          ) : null}
          <div className={current ? '' : 'sm:col-span-2'}>
            <WeighList
              lines={lines}
              tolerancePercent={batch.tolerancePercent}
              current={current?.id ?? null}
              isOpen={isOpen}
              isBench={isBench}
              onPick={setPicked}
            />
          </div>
        </div>
        {current && now ? (
          <div className="-mx-4 sm:-mx-10 lg:mx-0 lg:py-5">
            <WeighPanel
              key={`${current.id} ${current.version}`}
              work={work}
              line={current}
              next={next}
              balance={balance}
              draft={draft}
              now={now}
              onDraft={setDraft}
              onKept={(isLast) => {
                if (isLast) setPicked(null)
                forget()
              }}
            />
          </div>
        ) : null}
      </div>
    </div>
  )
}
