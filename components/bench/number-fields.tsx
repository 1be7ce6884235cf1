'use client'

import { useEffect, useRef } from 'react'
import { FieldBand } from '@/components/bench/field-band'
import { LastValues } from '@/components/bench/last-values'
import type { FieldTab, JarEntry } from '@/components/bench/use-jar-entry'
import { UsedWith } from '@/components/bench/used-with'
import { torqueFacts } from '@/components/bench/value-facts'
import { slotLabel, slotUnit, type Verdict } from '@/components/bench/verdict'
import { FigureDetails } from '@/components/ui/figure-details'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { readTyped } from '@/lib/reading/schema/typed'
import { shownValue } from '@/lib/study/rules/words'

type Props = { jar: BenchJarPage; entry: JarEntry; group: FieldTab[]; here: FieldTab }

/** What is typed of one attribute, its replicates side by side, as large as it can be, and what it means. */
export function NumberFields({ jar, entry, group, here }: Props) {
  const { slot, verdict } = here
  const { field } = slot
  const isOut = verdict.state === 'value' && verdict.isOut
  return (
    <div className="min-w-0">
      <UsedWith jar={jar} entry={entry} slot={slot} />
      <div className="flex flex-wrap gap-x-5 gap-y-2">
        {group.map((tab) => (
          <TypedNumber
            key={tab.key}
            tab={tab}
            isHere={tab.key === here.key}
            size={group.length === 1 ? 'large' : group.length === 2 ? 'middle' : 'small'}
            onText={(text) => entry.type(tab.key, text)}
            onFocus={() => entry.goTo(tab.key)}
            onEnter={entry.step}
          />
        ))}
      </div>
      <p className={`min-h-8 text-24 font-650 ${isOut ? 'text-alarm' : ''}`}>
        {verdict.state === 'value' && slot.kind !== 'number' ? (
          <Computed slot={slot} text={here.text} value={verdict.value} isChanged={entry.isChanged(slot)} />
        ) : null}
      </p>
      <VerdictLines verdict={verdict} />
      <LastValues field={field} />
      <FieldBand field={field} now={verdict.state === 'value' ? verdict.value : null} width={440} />
    </div>
  )
}

const sizes = {
  large: 'text-64 sm:text-116 w-[5.2ch]',
  middle: 'text-48 sm:text-76 w-[4.6ch]',
  small: 'text-36 sm:text-48 w-[3.6ch]',
}

type TypedProps = {
  tab: FieldTab
  isHere: boolean
  size: keyof typeof sizes
  onText: (text: string) => void
  onFocus: () => void
  onEnter: () => void
}

/** One input; the one that has the hand takes the pad's keys. */
export function TypedNumber({ tab, isHere, size, onText, onFocus, onEnter }: TypedProps) {
  const input = useRef<HTMLInputElement>(null)
  const { slot, verdict } = tab
  const isWrong =
    verdict.state === 'impossible' &&
    (slot.kind !== 'layer' || verdict.part === null || verdict.part === slot.part)
  useEffect(() => {
    if (isHere) input.current?.focus({ preventScroll: true })
  }, [isHere])
  const id = isHere ? 'typed' : `typed-${tab.key}`
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="text-22 font-650">
        {slotLabel(slot)}
      </label>
      <div className={`flex items-baseline gap-3 ${isWrong ? 'rounded border-[3px] border-alarm px-2' : ''}`}>
        <input
          id={id}
          ref={input}
          value={tab.text}
          inputMode="none"
          autoComplete="off"
          enterKeyHint="next"
          aria-invalid={isWrong || undefined}
          aria-describedby="verdict"
          onFocus={onFocus}
          onChange={(event) => onText(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return
            event.preventDefault()
            onEnter()
          }}
          className={`min-h-16 min-w-0 max-w-full border-0 border-b-[3px] bg-transparent p-0 font-650 leading-[1.1] outline-none focus:shadow-[0_3px_0_var(--ink)] ${isHere ? 'border-ink' : 'border-hair'} ${sizes[size]}`}
        />
        <span className="text-26 sm:text-36">{slotUnit(slot)}</span>
      </div>
    </div>
  )
}

export function VerdictLines({ verdict }: { verdict: Verdict }) {
  return (
    <div id="verdict" aria-live="polite" className="mt-1">
      {verdict.state === 'impossible' ? <p className="font-700 text-alarm">{verdict.sentence}</p> : null}
      {verdict.state === 'value' && verdict.sentence ? (
        <p className={verdict.isOut ? 'font-700 text-alarm' : 'font-650'}>{verdict.sentence}</p>
      ) : null}
      {verdict.state === 'value' && verdict.advice ? <p>{verdict.advice}</p> : null}
      {verdict.state === 'value'
        ? verdict.doubts.map((doubt) => (
            <p key={doubt} className="border-l-4 border-ink pl-3 font-650">
              {doubt}
            </p>
          ))
        : null}
    </div>
  )
}

type ComputedProps = { slot: FieldTab['slot']; text: string; value: number; isChanged: boolean }

/** What the number comes to; what it is computed from is asked beside the number being typed, never in its way. */
function Computed({ slot, text, value, isChanged }: ComputedProps) {
  const figure = `${shownValue(slot.field, value)} ${slot.field.unit}`
  const facts = slot.kind === 'torque' && !isChanged ? torqueFacts(slot.field, readTyped(text) ?? 0) : null
  return facts ? <FigureDetails figure={figure} facts={() => facts} density="bench" /> : figure
}
