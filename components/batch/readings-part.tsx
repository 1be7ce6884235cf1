'use client'

import { useState } from 'react'
import { FigureDetails } from '@/components/ui/figure-details'
import { Section } from '@/components/ui/section'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { currentReadings, initialOf, measured } from '@/lib/batch/rules/readings'
import { restOf } from '@/lib/batch/rules/rest'
import type { ReadingMoment } from '@/lib/batch/schema'
import { BatchPhotos } from './batch-photos'
import { dayAndHour } from './balance-choice'
import { DropsFigures, sauterFacts } from './drops-figures'
import { ReadingForm } from './reading-form'
import { figureOf, howRead, rcfFacts, torqueFacts } from './reading-words'
import type { BatchWork } from './work'

type Reading = BatchPage['readings'][number]

/** Checks while it is made, or the initial of the rested batch: what was read, and the next to read. */
export function ReadingsPart({ work, moment }: { work: BatchWork; moment: ReadingMoment }) {
  const { batch, mayWrite } = work
  const [corrected, setCorrected] = useState<Reading | null>(null)
  const readings = batch.readings.filter((reading) => reading.moment === moment)
  const current = new Set(currentReadings(readings).map((reading) => reading.id))
  const isOpen =
    mayWrite &&
    (moment === 'initial'
      ? batch.state === 'resting' || batch.state === 'released'
      : batch.state === 'making' || batch.state === 'resting')
  if (!isOpen && !readings.length) return null
  const viscosity = initialOf(readings, moment, 'viscosity')
  return (
    <Section
      title={moment === 'initial' ? 'Initial readings' : 'Checks in process'}
      sentence={
        moment === 'initial'
          ? `${restOf(batch.restedHours ?? 0).sentence} A study’s start offers them as its initial.`
          : 'What is looked at while it is made: temperature, pH, look.'
      }
    >
      <ul className="max-w-[980px]">
        {readings.map((reading) => (
          <Row
            key={reading.id}
            reading={reading}
            isCurrent={current.has(reading.id)}
            isOpen={isOpen}
            onCorrect={() => setCorrected(corrected?.id === reading.id ? null : reading)}
          />
        ))}
      </ul>
      {viscosity !== null && moment === 'initial' ? (
        <p className="py-2 text-17">
          <b>{figureOf('viscosity', viscosity)}</b> is the mean of the replicates that count.
        </p>
      ) : null}
      {moment === 'initial' ? <BatchPhotos work={work} isOpen={isOpen} /> : null}
      {isOpen ? (
        <ReadingForm
          key={`${corrected?.id ?? 'new'} ${readings.length}`}
          {...{ work, moment, corrected }}
          onKept={() => setCorrected(null)}
        />
      ) : null}
    </Section>
  )
}

type RowProps = { reading: Reading; isCurrent: boolean; isOpen: boolean; onCorrect: () => void }

function Row({ reading, isCurrent, isOpen, onCorrect }: RowProps) {
  const { attribute, value, detail } = reading
  const figure = value === null ? reading.typed : figureOf(attribute, value)
  return (
    <li className="flex min-h-16 items-center justify-between gap-4 border-b border-hair py-1.5 lg:min-h-11">
      <div className="text-17 leading-tight">
        <span className="text-soft">
          {measured[attribute].label}
          {reading.replicate > 1 ? ` ${reading.replicate}` : ''}:{' '}
        </span>
        <b className={isCurrent ? '' : 'line-through'}>
          {attribute === 'viscosity' && detail.torquePercent !== undefined && value !== null ? (
            <FigureDetails figure={figure} facts={() => torqueFacts(reading)} />
          ) : detail.drops ? (
            <FigureDetails figure={`D[3,2] ${figure}`} facts={() => sauterFacts(detail.drops!)} />
          ) : (
            figure
          )}
        </b>
        {detail.rcf ? (
          <>
            {' at '}
            <FigureDetails figure={`${detail.rcf.toFixed(0)} times gravity`} facts={() => rcfFacts(detail)} />
          </>
        ) : null}
        {detail.drops ? <DropsFigures drops={detail.drops} /> : null}
        <span className="block text-15 text-soft">
          {[
            howRead(reading),
            `${reading.by}, ${dayAndHour(reading.readAt)}`,
            reading.isFromPaper ? 'from paper' : '',
            reading.note,
            reading.reason,
          ]
            .filter(Boolean)
            .join(', ')}
        </span>
        {reading.instrumentDoubt ? (
          <span className="block text-15 text-alarm">{reading.instrumentDoubt}</span>
        ) : null}
      </div>
      {isOpen && isCurrent ? (
        <button
          type="button"
          onClick={onCorrect}
          className="min-h-16 shrink-0 px-3 text-17 underline underline-offset-4 lg:min-h-11"
        >
          Correct
          <span className="sr-only">
            {' '}
            {measured[attribute].label} {reading.replicate}
          </span>
        </button>
      ) : null}
    </li>
  )
}
