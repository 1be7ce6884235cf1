'use client'

import { useState } from 'react'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { readDecimal } from '@/lib/formula/rules/numbers'
import { Beaker } from './beaker'
import { WeighList } from './weigh-list'
import { WeighPanel } from './weigh-panel'
import { WeighedRow } from './weighed-row'

type Props = { batch: BatchPage; isBench: boolean; mayWrite: boolean; onSaved: () => Promise<unknown> }

/** The weighing sheet: the row of jars, the vessel, the list, and the line in hand. */
export function WeighPart({ batch, isBench, mayWrite, onSaved }: Props) {
  const lines = batch.weighings
  const isOpen = mayWrite && batch.state === 'making'
  const [picked, setPicked] = useState<string | null>(null)
  const [typed, setTyped] = useState<{ id: string; text: string } | null>(null)
  const [balance, setBalance] = useState(lines.findLast((line) => line.balance)?.balance ?? '')
  const current = isOpen
    ? (lines.find((line) => line.id === picked) ?? lines.find((line) => line.actualG === null))
    : undefined
  const next = lines.find((line) => line.actualG === null && line.id !== current?.id)
  const weight = current ? (typed?.id === current.id ? typed.text : (current.actualTyped ?? '')) : ''
  const isWater = (line: { isInternal: boolean }) =>
    line.isInternal === (batch.emulsionType !== 'oil-in-water')
  return (
    <div>
      <div className="-mx-4 flex flex-wrap items-end justify-between gap-x-8 gap-y-3 bg-recess px-4 py-3 sm:-mx-10 sm:px-10">
        <WeighedRow
          lines={lines}
          current={current?.id ?? null}
          poured={current ? (readDecimal(weight) ?? 0) / current.targetG : 0}
          isWater={isWater}
        />
      </div>
      <div className="grid gap-x-10 gap-y-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="grid gap-6 py-5 sm:grid-cols-[minmax(0,10fr)_minmax(0,12fr)]">
          {current ? (
            <div className="hidden sm:block">
              <Beaker targetG={current.targetG} actualG={readDecimal(weight)} isWater={isWater(current)} />
            </div>
          ) : null}
          <div className={current ? '' : 'sm:col-span-2'}>
            <WeighList
              lines={lines}
              current={current?.id ?? null}
              isOpen={isOpen}
              isBench={isBench}
              onPick={setPicked}
            />
          </div>
        </div>
        {current ? (
          <div className="-mx-4 sm:-mx-10 lg:mx-0 lg:py-5">
            <WeighPanel
              key={`${current.id} ${current.version}`}
              code={batch.code}
              line={current}
              next={next}
              balance={balance}
              isBench={isBench}
              weight={weight}
              onWeight={(text) => setTyped({ id: current.id, text })}
              onBalance={setBalance}
              onKept={() => {
                setPicked(null)
                setTyped(null)
                void onSaved()
              }}
            />
          </div>
        ) : null}
      </div>
    </div>
  )
}
