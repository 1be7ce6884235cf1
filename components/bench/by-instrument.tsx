'use client'

import { useState } from 'react'
import type { BenchPerson } from '@/components/device/last-person'
import { partsKept, settledHere } from '@/components/bench/kept-jars'
import { PartOfJar } from '@/components/bench/part-of-jar'
import { TinyJar } from '@/components/bench/tiny-jar'
import { walkSteps } from '@/components/bench/walk-steps'
import { useKept } from '@/components/device/use-kept'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { arrowKeys } from '@/components/ui/arrow-keys'
import type { Bench } from '@/lib/bench/queries/today'

type Props = {
  bench: Bench
  person: BenchPerson
  outbox: OutboxOnScreen
  /** The jar whose label was scanned. */
  called: string | null
  onCalled: (code: string | null) => void
  onOpen: (code: string) => void
  onChange: () => void
}

/** One instrument after the other: all photos, then all viscosities … each jar's number typed, Enter, the next jar. */
export function ByInstrument({ bench, person, outbox, called, onCalled, onOpen, onChange }: Props) {
  const [kept, setKept] = useKept<{ key: string; photographed: string[] }>('walk.step', {
    key: '',
    photographed: [],
  })
  const [skipped, setSkipped] = useState<string[]>([])
  const closed = settledHere(bench, outbox.items)
  const steps = walkSteps(
    bench,
    (jar, attribute) =>
      jar.read.includes(attribute) ||
      closed.has(jar.pullJarId) ||
      partsKept(outbox.items, jar.pullJarId).includes(attribute),
    person.mayAddPhotos,
  )
  const step =
    steps.find((one) => one.key === kept.key && one.jars.length > 0) ??
    steps.find((one) => one.jars.length > 0)
  if (!step) {
    return (
      <p className="px-4 pt-6 text-20 sm:px-5">
        No jar is at hand for an instrument now. What rests is shown jar by jar, with the time when it is
        ready.
      </p>
    )
  }
  const queue = [
    ...step.jars.filter((jar) => !skipped.includes(jar.pullJarId)),
    ...step.jars.filter((jar) => skipped.includes(jar.pullJarId)),
  ]
  const isElsewhere = called !== null && !queue.some((jar) => jar.code === called)
  const jar = queue.find((one) => one.code === called) ?? queue[0]!
  const goOn = () => {
    setSkipped((before) => [...before.filter((id) => id !== jar.pullJarId), jar.pullJarId])
    onCalled(null)
    onChange()
  }
  return (
    <div className="flex flex-1 flex-col">
      <div
        role="tablist"
        aria-label="Which instrument"
        onKeyDown={arrowKeys}
        className="mt-3 flex gap-3 overflow-x-auto px-4 sm:flex-wrap sm:px-5"
      >
        {steps.map((one) => (
          <button
            key={one.key}
            type="button"
            role="tab"
            aria-selected={one.key === step.key}
            onClick={() => {
              setKept({ key: one.key })
              setSkipped([])
              onCalled(null)
            }}
            className={`min-h-16 shrink-0 px-4 text-left leading-tight ${one.key === step.key ? 'border-t-[5px] border-ink bg-typed' : 'rounded border-2 border-rule bg-paper'}`}
          >
            <b className="text-18">{one.label}</b>
            <span className="block text-17 text-soft">
              {one.jars.length === 0
                ? one.waiting > 0
                  ? `${one.waiting} not ready`
                  : 'all in'
                : `${one.jars.length} to read`}
            </span>
          </button>
        ))}
      </div>
      {isElsewhere ? (
        <p role="alert" className="mx-4 mt-3 border-l-[5px] border-ink pl-3 text-20 sm:mx-5">
          Jar <b className="font-mono">{called}</b> is not among those that {step.label} is still asked of.{' '}
          <button
            type="button"
            className="min-h-11 underline underline-offset-4"
            onClick={() => onOpen(called)}
          >
            Open its own screen
          </button>
        </p>
      ) : null}
      <PartOfJar
        key={`${jar.pullJarId}.${step.key}`}
        {...{ jar, step, person, outbox, onOpen }}
        hasNext={queue.length > 1}
        onCalled={onCalled}
        onDone={goOn}
        onSkip={goOn}
      />
      <ol aria-label="In this row" className="mt-4 flex flex-wrap gap-3 px-4 sm:px-5">
        {queue.slice(0, 40).map((one) => (
          <li key={one.pullJarId}>
            <button
              type="button"
              aria-pressed={one === jar}
              aria-label={`Jar ${one.name}, ${one.batch.code}, ${one.label}`}
              onClick={() => onCalled(one.code)}
              className={`flex min-h-16 items-end gap-2 px-2 pb-1 ${one === jar ? 'border-b-[5px] border-ink' : 'border-b-2 border-rule'}`}
            >
              <TinyJar standing={one.standing} layers={one.layers} state={one.state} height={40} />
              <span className="font-mono text-20">{one.name}</span>
            </button>
          </li>
        ))}
      </ol>
      {step.waiting > 0 ? (
        <p className="px-4 pt-3 text-17 text-soft sm:px-5">
          {step.waiting} more {step.waiting === 1 ? 'is' : 'are'} asked for {step.label}: still at the
          station, or resting.
        </p>
      ) : null}
    </div>
  )
}
