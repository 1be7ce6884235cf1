'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import type { BoardPress, BoardStep, CyclePlace } from '@/lib/cycle/queries/board'
import { whyNotChanged, type Person } from '@/lib/cycle/rules/changing'
import { beginsOf, entriesOf } from '@/lib/cycle/rules/entries'
import { beginLines, hoursOf, stepLines, whenText } from '@/lib/cycle/rules/half-words'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { orderOf, type Half } from '@/lib/cycle/rules/state'
import { BeginDialog } from './begin-dialog'
import { CorrectDialog } from './correct-dialog'
import { PaperDialog } from './paper-dialog'
import { TakeBackDialog } from './take-back-dialog'
import type { usePress } from './use-press'

/** What a dialog about one half is given. */
export type HalfProps = {
  place: CyclePlace
  half: { cycle: number; half: Half }
  now: string
  zone: string
  presses: ReturnType<typeof usePress>
  onClose: () => void
}
type Props = Omit<HalfProps, 'onClose'> & { person: Person | null }

/** One half of the history: as it counts, what stood there before, and who changed it, when and why. */
export function HalfRow({ person, ...props }: Props) {
  const { place, half, now, zone } = props
  const [asked, setAsked] = useState<'correct' | 'take back' | 'paper' | null>(null)
  const isOf = (one: { cycle: number; half: string }) => orderOf(one) === orderOf(half)
  const step = place.steps.find(isOf) ?? null
  const begun = step ? null : (place.presses.find((one) => one.press === 'begin' && isOf(one)) ?? null)
  const entry = step ?? begun
  const mayChange = person !== null && entry !== null && !whyNotChanged(entry, person, { now, zone })
  const mayRunOn =
    step !== null &&
    step.beginPressId !== null &&
    ![...place.steps, ...place.presses].some((one) => orderOf(one) > orderOf(half))
  const name = `the ${half.half} half of cycle ${half.cycle}`
  const dialog = { ...props, onClose: () => setAsked(null) }
  return (
    <li className="flex flex-wrap items-start gap-x-5 gap-y-2 border-b border-dashed border-hair py-2.5 text-17">
      <h3 className="w-[84px] shrink-0 pt-0.5 text-18">
        <b>{half.cycle}</b> {half.half}
      </h3>
      <div className="min-w-[220px] flex-1">
        <Begins {...{ place, half, now, zone }} isAll={step === null} />
        <Entries {...{ place, half, now, zone }} />
        {entry === null ? <p className="text-soft">Nothing of it counts.</p> : null}
        {step ? <Shortfalls place={place} step={step} /> : null}
      </div>
      {mayChange ? (
        <div className="flex flex-wrap gap-3">
          <Button density="bench" aria-label={`Correct ${name}`} onClick={() => setAsked('correct')}>
            Correct
          </Button>
          <Button density="bench" aria-label={`Take back ${name}`} onClick={() => setAsked('take back')}>
            Take back
          </Button>
        </div>
      ) : null}
      {person && entry === null ? (
        <Button density="bench" aria-label={`From paper: ${name}`} onClick={() => setAsked('paper')}>
          From paper
        </Button>
      ) : null}
      {asked === 'correct' && step ? <CorrectDialog {...dialog} step={step} /> : null}
      {asked === 'correct' && begun ? <BeginDialog {...dialog} begun={begun} /> : null}
      {asked === 'take back' ? <TakeBackDialog {...dialog} {...{ step, begun, mayRunOn }} /> : null}
      {asked === 'paper' ? <PaperDialog {...dialog} /> : null}
    </li>
  )
}

type Shown = Pick<Props, 'place' | 'half' | 'now' | 'zone'>

function Entries({ place, half, now, zone }: Shown) {
  return entriesOf(place, half).map((entry) => (
    <Line
      key={entry.id}
      {...{ entry, now, zone }}
      lines={stepLines(entry, { now, zone })}
      isGone={!place.steps.includes(entry) && !entry.isVoid}
      how={entry.beginPressId === null ? 'from paper, typed' : 'typed'}
    />
  ))
}

/** Its begin alone, while it runs; and whatever of it was changed. */
function Begins({ place, half, now, zone, isAll }: Shown & { isAll: boolean }) {
  const begins = beginsOf(place, half)
  return begins.length < 2 && !isAll
    ? null
    : begins.map((begin) => (
        <Line
          key={begin.id}
          {...{ entry: begin, now, zone }}
          lines={beginLines(begin, { now, zone })}
          isGone={!place.presses.includes(begin) && !begin.isVoid}
          how="typed"
        />
      ))
}

type LineProps = {
  entry: BoardStep | BoardPress
  lines: string[]
  how: string
  /** Something else took its place. */
  isGone: boolean
  now: string
  zone: string
}

/** An entry with the server's time of it; struck through where it counts no longer. */
function Line({ entry, lines, how, isGone, now, zone }: LineProps) {
  const { by, recordedAt, correctionReason } = entry
  return (
    <p className={`pb-1 ${isGone ? 'text-soft' : ''}`}>
      {lines.map((line) => (
        <span key={line} className={`block ${isGone ? 'line-through' : 'text-18'}`}>
          {line}
        </span>
      ))}
      <span className="block text-soft">
        {how} {whenText(recordedAt, now, zone)} by {by}
        {correctionReason ? <span className="text-ink">, because {correctionReason}</span> : null}
      </span>
    </p>
  )
}

function Shortfalls({ place, step }: { place: CyclePlace; step: BoardStep }) {
  const short = shortfalls(place, { ...step, hours: hoursOf(step) }, place.asked ?? undefined)
  return short.length > 0 ? (
    <p className="font-650 text-alarm">{short.join(' ')} Readings after it are doubted.</p>
  ) : null
}
