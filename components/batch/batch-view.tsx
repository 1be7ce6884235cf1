'use client'

import Link from 'next/link'
import useSWR from 'swr'
import { Heading } from '@/components/ui/heading'
import { batchFinding } from '@/lib/batch/rules'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { batchKey } from '@/lib/batch/schema'
import { grouped } from '@/lib/formula/rules/numbers'
import { fetcher } from '@/lib/http/fetcher'
import { RestPart } from './rest-part'
import { StepPart } from './step-part'
import { useBench } from './use-bench'
import { WeighPart } from './weigh-part'

export type BatchPart = 'weighing' | 'process' | 'rest'

type Props = { code: string; part: BatchPart | null; mayWrite: boolean }

export function BatchView({ code, part, mayWrite }: Props) {
  const { data: batch, mutate } = useSWR<BatchPage>(batchKey(code), fetcher)
  const isBench = useBench()
  if (!batch) return null
  const shown = part ?? partOf(batch)
  const finding = batchFinding(batch)
  return (
    <div data-density={isBench ? 'bench' : undefined}>
      <Heading
        crumb={
          <>
            <Link href="/batches">Batches</Link> · <b className="font-mono text-ink">{batch.code}</b>,{' '}
            <Link href={`/formulas/${batch.formulaCode}?version=${batch.versionNumber}`}>
              {batch.formulaName}, version {batch.versionNumber}
            </Link>
            , {grouped(batch.sizeG, 0)} g, by {batch.createdBy}
          </>
        }
        headline={
          <>
            <b>{finding.strong}</b>
            {finding.rest}
          </>
        }
        sentence={finding.sentence}
        tabs={tabsOf(batch, shown)}
        tabsLabel="Parts of this batch"
      />
      <div className="mt-5">
        {shown === 'weighing' ? (
          <WeighPart batch={batch} isBench={isBench} mayWrite={mayWrite} onSaved={() => mutate()} />
        ) : null}
        {shown === 'process' ? <StepPart batch={batch} mayWrite={mayWrite} onSaved={() => mutate()} /> : null}
        {shown === 'rest' ? (
          <RestPart batch={batch} mayWrite={mayWrite} onSaved={() => void mutate()} />
        ) : null}
      </div>
    </div>
  )
}

/** Where the work is now. */
function partOf(batch: BatchPage): BatchPart {
  if (batch.state !== 'making') return 'rest'
  if (batch.weighings.some((line) => line.actualG === null)) return 'weighing'
  return batch.steps.some((step) => !step.doneAt) ? 'process' : 'rest'
}

function tabsOf(batch: BatchPage, shown: BatchPart) {
  const tab = (key: BatchPart, label: string) => ({
    href: `/batches/${batch.code}?part=${key}`,
    label,
    isHere: key === shown,
  })
  return [tab('weighing', 'Weighing'), tab('process', 'Process'), tab('rest', 'Rest and decision')]
}
