'use client'

import { useRef, useState, type FormEvent } from 'react'
import { useWidth } from '@/components/charts/use-width'
import { BandBar } from '@/components/marks/band-bar'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import { gramsText, percentOffText, toleranceGrams, toleranceWords } from '@/lib/batch/rules/weighing'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { percentText } from '@/lib/formula/rules/numbers'
import { newId } from '@/lib/db/id'
import type { Balance } from './balance-choice'
import { PortionList } from './portion-list'
import { useEntry } from './use-entry'
import type { Judged, WeighDraft } from './weigh-draft'
import { WeighFields } from './weigh-fields'
import type { BatchWork } from './work'

type Line = BatchPage['weighings'][number]

type Props = {
  work: BatchWork
  line: Line
  next: Line | undefined
  balance: Balance
  draft: WeighDraft
  now: Judged
  onDraft: (change: Partial<WeighDraft>) => void
  onKept: (isLast: boolean) => void
}

/** One line at the balance: the number in hand, how far it is, and what keeping it takes. */
export function WeighPanel({ work, line, next, balance, draft, now, onDraft, onKept }: Props) {
  const { batch, isBench } = work
  const { keep, isSending, fields, refusal } = useEntry(work)
  const [id] = useState(newId)
  const [pad, setPad] = useState<'weight' | 'tare'>('weight')
  const noteField = useRef<HTMLInputElement>(null)
  const weightField = useRef<HTMLInputElement>(null)
  const [bar, barWidth] = useWidth<HTMLDivElement>(420)
  const { verdict } = now
  // Still pouring: hollow. Only what is too much is out.
  const isShort = verdict !== null && !verdict.isWithin && verdict.differenceG < 0
  const problem = fields['actualTyped'] ?? now.problem?.sentence
  const tolerance = toleranceGrams(line.targetG, batch.tolerancePercent)
  const isCorrection = draft.supersedes !== ''

  async function keepIt(isLast: boolean) {
    if (isLast && verdict && !verdict.isWithin && !draft.note.trim()) noteField.current?.focus()
    const body = {
      ...{ id, weighingId: line.id, version: line.version, isLast },
      ...{ actualTyped: draft.weight, tareTyped: draft.tare, lot: now.lot },
      ...{ balance: balance.name, balanceId: balance.id || null },
      ...{ note: draft.note, reason: draft.reason, supersedes: draft.supersedes || null },
    }
    const name = `${line.inciName}, ${draft.weight} g`
    if (await keep({ id, kind: 'weighings', name, body })) onKept(isLast)
  }

  const why = draft.weight.trim() ? undefined : 'Type the weight first.'
  return (
    <form
      onSubmit={(event: FormEvent) => {
        event.preventDefault()
        void keepIt(true)
      }}
      noValidate
      className="grid gap-x-7 gap-y-5 bg-typed px-4 py-5 sm:px-7 md:grid-cols-[minmax(0,1fr)_300px] lg:grid-cols-1"
    >
      <div className="min-w-0">
        <h2 className="text-24 font-700 leading-tight">{line.inciName.replaceAll('/', '/\u200b')}</h2>
        <p className="text-17 text-soft">
          {[line.function, `phase ${line.phase}`, `${percentText(line.percentThousandths)} %`]
            .filter(Boolean)
            .join(', ')}
        </p>
        {line.caution ? <p className="text-17 font-650">{line.caution}</p> : null}
        <label className="mt-1 flex items-baseline gap-3 border-b-2 border-rule focus-within:border-ink">
          <span className="sr-only">Weight of {line.inciName} in g</span>
          <input
            ref={weightField}
            value={draft.weight}
            onChange={(event) => onDraft({ weight: event.target.value })}
            onFocus={() => setPad('weight')}
            inputMode={isBench ? 'none' : 'decimal'}
            autoComplete="off"
            autoFocus={!isBench}
            aria-invalid={problem ? true : undefined}
            aria-describedby="weight-says"
            className="w-full min-w-0 bg-transparent text-76 font-600 leading-[1.15] tracking-[-0.02em] outline-none md:text-[clamp(4.75rem,14vw,7.25rem)] lg:text-76"
          />
          <span className="text-44">g</span>
        </label>
        <div id="weight-says" className="flex flex-wrap items-baseline justify-between gap-x-4 pt-2">
          <p className={`text-26 font-700 ${problem ? 'text-alarm' : ''}`}>
            {problem ?? verdict?.words ?? `${gramsText(line.targetG - now.beforeG)} g to weigh`}
          </p>
          <p className="text-17">
            {now.beforeG > 0 && now.totalG !== null ? `${gramsText(now.totalG)} g in all, ` : ''}
            {verdict ? `${percentOffText(verdict.differencePercent)} of ${gramsText(line.targetG)} g` : ''}
          </p>
        </div>
        <div ref={bar} className="mt-2 py-1">
          <BandBar
            width={barWidth}
            height={14}
            lower={line.targetG - tolerance}
            upper={line.targetG + tolerance}
            initial={line.targetG}
            last={isShort ? now.totalG : null}
            now={verdict && !isShort ? now.totalG : null}
            edgeFrom={2}
            title={`Allowed from ${gramsText(line.targetG - tolerance)} to ${gramsText(line.targetG + tolerance)} g`}
          />
          <p className="mt-1 text-17 text-soft">
            {gramsText(line.targetG - tolerance)} to {gramsText(line.targetG + tolerance)} g,{' '}
            {toleranceWords(batch)} and never under 0.01 g
          </p>
        </div>
        <WeighFields
          {...{ draft, now, fields, isBench, noteField, onDraft }}
          onTareFocus={() => setPad('tare')}
          onLotScanned={() => weightField.current?.focus()}
        />
        <PortionList
          line={line}
          supersedes={draft.supersedes}
          onCorrect={(portion) =>
            onDraft(
              draft.supersedes === portion.id
                ? { supersedes: '', weight: '', tare: '', lot: null, reason: '' }
                : {
                    ...{ supersedes: portion.id, weight: portion.grossTyped, tare: portion.tareTyped },
                    ...{ lot: portion.lot, note: portion.note },
                  },
            )
          }
        />
        <div className="mt-3">
          <ErrorNote error={refusal} />
        </div>
      </div>
      <div className="flex flex-col gap-3">
        {isBench ? <NumberPad onKey={(key) => onDraft({ [pad]: afterKey(draft[pad], key) })} /> : null}
        <Button type="submit" kind={verdict?.isWithin ? 'primary' : 'secondary'} busy={isSending} why={why}>
          {isCorrection
            ? 'Keep the correction'
            : verdict && !verdict.isWithin
              ? 'Keep, say why'
              : next
                ? 'Keep, next line'
                : 'Keep'}
        </Button>
        {isCorrection || line.actualG !== null ? null : (
          <Button busy={isSending} why={why} onClick={() => void keepIt(false)}>
            Keep, more of it follows
          </Button>
        )}
        {next ? (
          <p className="mt-auto flex items-baseline justify-between gap-3 border-b-[3px] border-ink pb-1">
            <span>
              <span className="block text-17 text-soft">Next on this sheet</span>
              <b className="text-20">{next.inciName.replaceAll('/', '/\u200b')}</b>
            </span>
            <span className="whitespace-nowrap text-20">{gramsText(next.targetG)} g</span>
          </p>
        ) : null}
      </div>
    </form>
  )
}
