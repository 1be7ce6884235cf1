'use client'

import { useEffect, useRef } from 'react'
import useSWR from 'swr'
import type { BenchPerson } from '@/components/device/last-person'
import { FieldPanel } from '@/components/bench/field-panel'
import { JarQuestions } from '@/components/bench/jar-questions'
import { PaperButton, PaperTime, usePaper } from '@/components/bench/paper-switch'
import { SlotTabs } from '@/components/bench/slot-tabs'
import { useAwake } from '@/components/bench/use-awake'
import { useJarEntry } from '@/components/bench/use-jar-entry'
import { photoStep, type WalkStep } from '@/components/bench/walk-steps'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { PhotoPanel } from '@/components/photo/photo-panel'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { benchKeys } from '@/lib/bench/keys'
import { fetcher } from '@/lib/http/fetcher'
import { readJarCode } from '@/lib/jar/rules/code'

type Props = {
  jar: BenchJar
  step: WalkStep
  person: BenchPerson
  outbox: OutboxOnScreen
  hasNext: boolean
  onCalled: (code: string) => void
  onOpen: (code: string) => void
  onDone: () => void
  onSkip: () => void
}

/** One attribute of one jar, with its place, so that the right one is taken from the shelf. */
export function PartOfJar({ jar, step, ...rest }: Props) {
  const paper = usePaper()
  const { data, error } = useSWR<BenchJarPage>(benchKeys.jar(jar.code), fetcher)
  const place = jar.shelf === null ? '' : `Shelf ${jar.shelf}, place ${jar.place}. `
  const here = useRef<HTMLElement>(null)
  // On a phone the number and the keys stand on the page together only where nothing stands above them.
  useEffect(() => {
    if (window.innerWidth < 640 && here.current!.getBoundingClientRect().bottom > window.innerHeight)
      here.current!.scrollIntoView({ block: 'start' })
  }, [data])
  return (
    <section ref={here} aria-label={`${step.label} of jar ${jar.name}`} className="mt-3 bg-typed pt-3">
      <div className="flex flex-wrap items-end justify-between gap-3 px-4 sm:px-5">
        <div>
          <h2 className="font-mono text-36 font-700 leading-none sm:text-48">{jar.name}</h2>
          <p className="mt-1 text-17">
            {jar.batch.code}, {jar.label}. {place}
            {jar.standsAs}
          </p>
        </div>
        <div className="flex items-center gap-4">
          {step.key === photoStep ? null : <PaperButton paper={paper} />}
          <Button density="bench" onClick={rest.onSkip}>
            {rest.hasNext ? 'Later' : 'Leave it open'}
          </Button>
        </div>
      </div>
      {data && data.pullJarId === jar.pullJarId ? (
        step.key === photoStep ? (
          <div className="px-4 pb-5 pt-4 sm:px-7">
            <PhotoPanel jar={data} onMeasured={null} />
            <Button density="bench" kind="primary" className="mt-4 w-full" onClick={rest.onDone}>
              Next jar
            </Button>
          </div>
        ) : (
          <Part jar={data} step={step} paper={paper} {...rest} />
        )
      ) : (
        <div className="p-5">
          {error ? <ErrorNote error={error} /> : <p role="status">The jar is being looked up.</p>}
        </div>
      )}
    </section>
  )
}

function Part({
  jar,
  step,
  paper,
  person,
  outbox,
  hasNext,
  onCalled,
  onDone,
}: Omit<Props, 'jar'> & { jar: BenchJarPage; paper: ReturnType<typeof usePaper> }) {
  useAwake(true)
  const entry = useJarEntry({
    ...{ jar, outbox, mayType: true, part: step.key, paperAt: paper.paperAt, onChange: onDone },
    onDone,
  })
  /** A label reader types into the field that has the focus: a code is no number. */
  function next() {
    const code = readJarCode(entry.draft.texts[entry.at] ?? '')
    if (code === null) return entry.step()
    entry.type(entry.at, '')
    onCalled(code)
  }
  return (
    <>
      {entry.slots.length > 1 ? <SlotTabs entry={entry} hasPhotos={false} /> : null}
      <PaperTime paper={paper} />
      <FieldPanel jar={jar} entry={{ ...entry, step: next }} hasNextJar={hasNext} />
      <JarQuestions jar={jar} person={person} entry={entry} />
    </>
  )
}
