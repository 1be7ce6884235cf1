'use client'

import Link from 'next/link'
import { useCallback, useState } from 'react'
import useSWR from 'swr'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { batchFinding } from '@/lib/batch/rules/finding'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { batchKey } from '@/lib/batch/keys'
import { grouped } from '@/lib/number/rules'
import { fetcher } from '@/lib/http/fetcher'
import { claimOf, PaperSwitch } from './paper-switch'
import { ReferenceView } from './reference-view'
import { RestPart } from './rest-part'
import { StepPart } from './step-part'
import { useBatchOutbox } from './use-batch-outbox'
import { useBench } from './use-bench'
import { WeighPart } from './weigh-part'
import { withKept } from './with-kept'
import type { BatchWork } from './work'

export type BatchPart = 'weighing' | 'process' | 'rest'

type Props = {
  code: string
  part: BatchPart | null
  personId: string
  mayWrite: boolean
  /** Whether a study can be started on it by this person. */
  mayStart: boolean
}

export function BatchView({ code, part, personId, mayWrite, mayStart }: Props) {
  const { data, mutate } = useSWR<BatchPage>(batchKey(code), fetcher)
  const isBench = useBench()
  const onSaved = useCallback(() => mutate(), [mutate])
  const outbox = useBatchOutbox(code, onSaved)
  const [paper, setPaper] = useState({ isOn: false, at: '' })
  if (!data) return null
  const batch = withKept(data, outbox.kept)
  const shown = part ?? partOf(batch)
  const finding = batchFinding(batch)
  const work: BatchWork = { batch, personId, mayWrite, isBench, outbox, onSaved, claim: () => claimOf(paper) }
  if (batch.isReference) return <ReferenceView work={work} />
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
        acts={
          <div data-screen-only className="flex flex-wrap items-end gap-x-6 gap-y-2">
            {mayWrite && batch.state !== 'rejected' ? <PaperSwitch paper={paper} onPaper={setPaper} /> : null}
            <LinkButton href={`/batches/${encodeURIComponent(code)}/paper`}>Paper sheet</LinkButton>
            {mayStart && batch.state === 'released' ? (
              <LinkButton kind="primary" href={studyOn(batch)}>
                Start a study on it
              </LinkButton>
            ) : null}
          </div>
        }
      />
      <div className="mt-4">
        {shown === 'weighing' ? <WeighPart work={work} /> : null}
        {shown === 'process' ? <StepPart work={work} /> : null}
        {shown === 'rest' ? <RestPart work={work} /> : null}
      </div>
    </div>
  )
}

/** The start of a study with this batch, under the protocol that it was sized for. */
function studyOn({ code, protocolCode }: BatchPage): string {
  const query = new URLSearchParams({ batch: code })
  if (protocolCode) query.set('protocol', protocolCode)
  return `/studies/new?${query}`
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
