'use client'

import type { ReactNode } from 'react'
import { FigureDetails } from '@/components/ui/figure-details'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { gramsText } from '@/lib/batch/rules/weighing'
import { totalGrams } from '@/lib/science/making'
import { percentOf } from '@/lib/science/percent'
import { yieldFacts } from './batch-facts'
import { DecisionForm } from './decision-form'
import { FillPart } from './fill-part'
import { FinishForm } from './finish-form'
import { ReadingsPart } from './readings-part'
import { RestClock } from './rest-clock'
import { TypeTestForm } from './type-test-form'
import type { BatchWork } from './work'

/** After making: yield, fill, rest, emulsion type, initial readings, decision. */
export function RestPart({ work }: { work: BatchWork }) {
  const { batch, mayWrite } = work
  const onSaved = () => void work.onSaved()
  return (
    <div className="flex flex-col gap-9">
      <Facts batch={batch} />
      {mayWrite && batch.state === 'making' ? <FinishForm batch={batch} onSaved={onSaved} /> : null}
      {batch.state === 'resting' ? <RestClock restedHours={batch.restedHours ?? 0} /> : null}
      {mayWrite && batch.state === 'resting' ? (
        <TypeTestForm key={batch.version} batch={batch} onSaved={onSaved} />
      ) : null}
      <ReadingsPart work={work} moment="initial" />
      {mayWrite && (batch.state === 'resting' || batch.state === 'making') ? (
        <DecisionForm batch={batch} onSaved={onSaved} />
      ) : null}
      <FillPart work={work} />
    </div>
  )
}

function Facts({ batch }: { batch: BatchPage }) {
  const weighedG = totalGrams(batch.weighings.map((line) => line.actualG ?? 0))
  const facts: [string, ReactNode][] = []
  if (batch.yieldG !== null) {
    const { yieldG } = batch
    facts.push([
      'Yield',
      weighedG ? (
        <>
          {gramsText(yieldG)} g,{' '}
          <FigureDetails
            figure={`${percentOf(yieldG, weighedG).toFixed(1)} %`}
            facts={() => yieldFacts(yieldG, weighedG)}
          />{' '}
          of what went in, {percentOf(yieldG, batch.sizeG).toFixed(1)} % of the size
        </>
      ) : (
        `${gramsText(yieldG)} g`
      ),
    ])
  }
  if (batch.fillG !== null)
    facts.push(['Fill of a jar', `${gramsText(batch.fillG)} g${batch.closure ? `, ${batch.closure}` : ''}`])
  if (batch.restedHours !== null) facts.push(['Rested', `${Math.floor(batch.restedHours)} h`])
  if (batch.emulsionTypeFound) {
    const conductivity =
      batch.conductivityUsCm === null ? '' : ` (${batch.conductivityUsCm} microsiemens per cm)`
    const reason = batch.emulsionTypeReason ? `. ${batch.emulsionTypeReason}` : ''
    facts.push([
      'Emulsion type',
      `${batch.emulsionTypeFound} by ${batch.emulsionTypeMethod}${conductivity}, tested by ${batch.testedBy}${reason}`,
    ])
  }
  if (batch.decidedBy)
    facts.push([
      'Decision',
      `${batch.state} by ${batch.decidedBy}${batch.decisionReason ? `. ${batch.decisionReason}` : ''}`,
    ])
  if (batch.note) facts.push(['Note', batch.note])
  if (!facts.length) return null
  return (
    <dl className="max-w-[760px]">
      {facts.map(([name, value]) => (
        <div key={name} className="grid grid-cols-[140px_1fr] gap-4 border-b border-hair py-2">
          <dt className="text-soft">{name}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  )
}
