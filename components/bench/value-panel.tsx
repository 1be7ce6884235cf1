'use client'

import { shownValue } from '@/lib/study/rules/words'
import { useEffect, useRef, type ReactNode } from 'react'
import { instrumentKind } from '@/components/bench/day-instrument'
import type { Slot } from '@/components/bench/draft'
import { bandText, slotLabel, slotUnit, type Verdict } from '@/components/bench/verdict'
import { torqueFacts } from '@/components/bench/value-facts'
import { BandBar } from '@/components/marks/band-bar'
import { FigureDetails } from '@/components/ui/figure-details'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { FigureFacts } from '@/lib/science/methods/method'
import { readTyped } from '@/lib/reading/schema/typed'
import { dayText } from '@/lib/report/rules'

type Props = {
  jar: BenchJarPage
  slot: Slot
  text: string
  verdict: Verdict
  instrument: string | null
  onInstrument: (id: string) => void
  onText: (text: string) => void
  onEnter: () => void
  keepButton: ReactNode
}

/** The number being typed, as large as it can be, with what it means and what it was last time beside it. */
export function ValuePanel({
  jar,
  slot,
  text,
  verdict,
  instrument,
  onInstrument,
  onText,
  onEnter,
  keepButton,
}: Props) {
  const input = useRef<HTMLInputElement>(null)
  const { field } = slot
  const last = field.last[0]
  const isWrong =
    verdict.state === 'impossible' &&
    (slot.kind !== 'layer' || verdict.part === null || verdict.part === slot.part)
  useEffect(() => input.current?.focus({ preventScroll: true }), [slot.key])
  const kind = instrumentKind(slot)
  const instruments = jar.instruments.filter((i) => i.kind === kind)
  return (
    <div className="grid gap-x-7 gap-y-4 sm:grid-cols-[minmax(0,1fr)_300px]">
      <div className="min-w-0">
        <label htmlFor="typed" className="text-22 font-650">
          {slot.kind === 'torque' ? 'Torque' : slotLabel(slot)}
          {slot.kind === 'torque' && field.replicates > 1 ? ` ${slot.replicate}` : ''}
        </label>
        <p className="text-17 text-soft">{conditions(slot)}</p>
        <div
          className={`mt-1 flex items-baseline gap-3 ${isWrong ? 'rounded border-[3px] border-alarm px-2' : ''}`}
        >
          <input
            id="typed"
            ref={input}
            value={text}
            inputMode="none"
            autoComplete="off"
            enterKeyHint="next"
            aria-invalid={isWrong || undefined}
            aria-describedby="verdict"
            onChange={(event) => onText(event.target.value)}
            onKeyDown={(event) => {
              if (event.key !== 'Enter') return
              event.preventDefault()
              onEnter()
            }}
            className="w-full min-w-0 max-w-[5.2ch] border-0 border-b-[3px] border-ink bg-transparent p-0 text-64 font-650 leading-[1.1] outline-none sm:text-116"
          />
          <span className="text-36 sm:text-48">{slotUnit(slot)}</span>
        </div>
        {slot.kind !== 'layer' ? (
          <>
            <div className="mt-2 flex flex-wrap items-baseline justify-between gap-x-4">
              <p
                className={`text-24 font-650 sm:text-30 ${verdict.state === 'value' && verdict.isOut ? 'text-alarm' : ''}`}
              >
                {verdict.state === 'value' && slot.kind !== 'number' ? (
                  <Computed
                    text={`${shownValue(field, verdict.value)} ${field.unit}`}
                    facts={slot.kind === 'torque' ? torqueFacts(field, readTyped(text) ?? 0) : null}
                  />
                ) : (
                  ' '
                )}
              </p>
              <p className="text-17">
                {last && last.value !== null ? (
                  <>
                    <HollowDot /> {shownValue(field, last.value)} on {dayText(last.day)}
                  </>
                ) : (
                  'first reading'
                )}
              </p>
            </div>
            <FieldBand field={field} now={verdict.state === 'value' ? verdict.value : null} width={440} />
          </>
        ) : null}
        <div id="verdict" aria-live="polite" className="mt-1 min-h-[52px]">
          {verdict.state === 'impossible' && isWrong ? (
            <p className="font-700 text-alarm">{verdict.sentence}</p>
          ) : null}
          {verdict.state === 'value' && verdict.sentence ? (
            <p className={verdict.isOut ? 'font-700 text-alarm' : 'font-650'}>{verdict.sentence}</p>
          ) : null}
          {verdict.state === 'value' && verdict.advice ? <p>{verdict.advice}</p> : null}
        </div>
        {instruments.length > 0 ? (
          <div className="mt-1 flex flex-wrap gap-3" role="group" aria-label="Instrument">
            {instruments.map((i) => (
              <button
                key={i.id}
                type="button"
                aria-pressed={instrument === i.id}
                onClick={() => onInstrument(i.id)}
                className={`min-h-16 rounded px-4 text-left leading-tight ${instrument === i.id ? 'border-[2.5px] border-ink bg-paper font-700' : 'border-2 border-rule bg-paper'}`}
              >
                {i.code}
                <span className={`block text-14 font-430 ${i.isOverdue ? 'text-alarm' : 'text-soft'}`}>
                  {i.isOverdue ? 'calibration overdue' : i.dueOn ? `good until ${dayText(i.dueOn)}` : ''}
                </span>
              </button>
            ))}
          </div>
        ) : null}
      </div>
      <NumberPad
        onKey={(key) => {
          onText(afterKey(text, key))
          input.current?.focus({ preventScroll: true })
        }}
      >
        {keepButton}
      </NumberPad>
    </div>
  )
}

/** What the number comes to; what it is computed from is asked beside the number being typed, never in its way. */
function Computed({ text, facts }: { text: string; facts: FigureFacts | null }) {
  return facts ? <FigureDetails figure={text} facts={() => facts} density="bench" /> : text
}

type BandProps = {
  field: Slot['field']
  now: number | null
  width: number
  /** Without its words, where they stand beside it. */
  isQuiet?: boolean
}

export function FieldBand({ field, now, width, isQuiet = false }: BandProps) {
  const { lower, upper } = field.band ?? { lower: null, upper: null }
  const marks = [lower, field.initial, upper].filter((v) => v !== null)
  return (
    <div className="mt-1 max-w-full overflow-hidden">
      <BandBar
        width={width}
        height={14}
        lower={lower}
        upper={upper}
        initial={field.initial}
        last={field.last[0]?.value ?? null}
        now={now}
        title={`${field.label}, ${bandText(field)}`}
        className="max-w-full"
      />
      <p
        className={`justify-between gap-3 text-17 text-soft ${isQuiet ? 'hidden' : 'flex'}`}
        style={{ maxWidth: width }}
      >
        <span>{bandText(field)}</span>
        {field.initial !== null && marks.length > 0 ? (
          <span>initial {shownValue(field, field.initial)}</span>
        ) : null}
      </p>
    </div>
  )
}

export function HollowDot() {
  return (
    <svg viewBox="0 0 16 16" width="16" height="16" aria-label="last" className="inline-block align-[-1px]">
      <circle cx="8" cy="8" r="5.5" fill="none" stroke="currentColor" strokeWidth="2.5" />
    </svg>
  )
}

function conditions(slot: Slot): string {
  if (slot.kind === 'layer') return 'from the ruler, 0 where there is none'
  if (slot.kind === 'gross') return 'jar, closed, with its fill'
  if (slot.field.viscosity)
    return `${slot.field.viscosity.spindle}, ${slot.field.viscosity.rpm} rpm. ${slot.field.method}`
  return slot.field.method
}
