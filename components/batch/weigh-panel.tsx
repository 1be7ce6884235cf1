'use client'

import { useRef, useState, type FormEvent } from 'react'
import { useWidth } from '@/components/charts/use-width'
import { BandBar } from '@/components/marks/band-bar'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { gramsText, percentOffText, toleranceGrams, tolerancePercent, weighed } from '@/lib/batch/rules'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { percentText, readDecimal } from '@/lib/formula/rules/numbers'
import { ClientError, send } from '@/lib/http/fetcher'
import { NumberPad } from './number-pad'

type Line = BatchPage['weighings'][number]

type Props = {
  code: string
  line: Line
  next: Line | undefined
  balance: string
  isBench: boolean
  weight: string
  onWeight: (typed: string) => void
  onBalance: (balance: string) => void
  onKept: () => void
}

/** One line at the balance: the number in hand, how far it is, and what keeping it takes. */
export function WeighPanel(props: Props) {
  const { code, line, next, balance, isBench, weight, onWeight, onBalance, onKept } = props
  const [lot, setLot] = useState(line.lot)
  const [note, setNote] = useState(line.note)
  const [reason, setReason] = useState('')
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)
  const noteField = useRef<HTMLInputElement>(null)
  const [bar, barWidth] = useWidth<HTMLDivElement>(420)
  const actualG = readDecimal(weight)
  const verdict = actualG === null || actualG <= 0 ? null : weighed(line.targetG, actualG)
  // Still pouring: hollow. Only what is too much is out.
  const isShort = verdict !== null && !verdict.isWithin && verdict.differenceG < 0
  const isUnreadable = weight.trim() !== '' && actualG === null
  const tolerance = toleranceGrams(line.targetG)
  const isCorrection = line.actualG !== null

  async function keep(event: FormEvent) {
    event.preventDefault()
    if (verdict && !verdict.isWithin && !note.trim()) noteField.current?.focus()
    setRefusal(null)
    setIsSending(true)
    try {
      const url = `/api/batches/${encodeURIComponent(code)}/weighings`
      const body = {
        weighingId: line.id,
        version: line.version,
        actualTyped: weight,
        lot,
        balance,
        note,
        reason,
      }
      await send(url, 'PUT', body)
      onKept()
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    } finally {
      setIsSending(false)
    }
  }

  const field = (name: string) => refusal?.fields[name]
  const isAtPlace = refusal && Object.keys(refusal.fields).length > 0 && refusal.status === 422
  return (
    <form
      onSubmit={(event) => void keep(event)}
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
            value={weight}
            onChange={(event) => onWeight(event.target.value)}
            inputMode={isBench ? 'none' : 'decimal'}
            autoComplete="off"
            autoFocus={!isBench}
            aria-invalid={isUnreadable || field('actualTyped') ? true : undefined}
            aria-describedby="weight-says"
            className="w-full min-w-0 bg-transparent text-76 font-600 leading-[1.15] tracking-[-0.02em] outline-none md:text-[clamp(4.75rem,14vw,7.25rem)] lg:text-76"
          />
          <span className="text-44">g</span>
        </label>
        <div id="weight-says" className="flex flex-wrap items-baseline justify-between gap-x-4 pt-2">
          <p className={`text-26 font-700 ${isUnreadable || field('actualTyped') ? 'text-alarm' : ''}`}>
            {field('actualTyped') ??
              (isUnreadable
                ? 'Type digits, with one comma or point'
                : verdict
                  ? verdict.words
                  : `${gramsText(line.targetG)} g to weigh`)}
          </p>
          <p className="text-17">
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
            last={isShort ? actualG : null}
            now={verdict && !isShort ? actualG : null}
            edgeFrom={2}
            title={`Allowed from ${gramsText(line.targetG - tolerance)} to ${gramsText(line.targetG + tolerance)} g`}
          />
          <p className="mt-1 text-17 text-soft">
            {gramsText(line.targetG - tolerance)} to {gramsText(line.targetG + tolerance)} g,{' '}
            {tolerancePercent} % and never under 0.01 g
          </p>
        </div>
        <div className="mt-4 grid grid-cols-2 gap-3">
          <Field label="Lot" value={lot} error={field('lot')} onText={setLot} />
          <Field label="Balance" value={balance} error={field('balance')} onText={onBalance} />
          {(verdict && !verdict.isWithin) || note ? (
            <Field
              ref={noteField}
              label="Why it is kept so"
              value={note}
              error={field('note')}
              onText={setNote}
              wrap="col-span-2"
            />
          ) : null}
          {isCorrection ? (
            <Field
              label="Why the weight is corrected"
              value={reason}
              error={field('reason')}
              hint={`${gramsText(line.actualG ?? 0)} g stays on record.`}
              onText={setReason}
              wrap="col-span-2"
            />
          ) : null}
        </div>
        <div className="mt-3">
          <ErrorNote error={isAtPlace ? null : refusal} />
        </div>
      </div>
      <div className="flex flex-col gap-4">
        {isBench ? <NumberPad value={weight} onText={onWeight} label={`Digits of ${line.inciName}`} /> : null}
        <Button
          type="submit"
          kind={verdict?.isWithin ? 'primary' : 'secondary'}
          busy={isSending}
          why={verdict ? undefined : 'Type the weight first.'}
        >
          {verdict && !verdict.isWithin ? 'Keep, say why' : next ? 'Keep, next line' : 'Keep'}
        </Button>
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
