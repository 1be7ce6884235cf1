'use client'

import { DonePanel } from '@/components/bench/done-panel'
import { FieldPanel, isOnKeys } from '@/components/bench/field-panel'
import { JarHead } from '@/components/bench/jar-head'
import { JarNotices } from '@/components/bench/jar-notices'
import { JarQuestions } from '@/components/bench/jar-questions'
import type { JarScreenProps } from '@/components/bench/jar-screen'
import { LayersPanel } from '@/components/bench/layers-panel'
import { nextJar } from '@/components/bench/next-jar'
import { OverviewPanel } from '@/components/bench/overview-panel'
import { PaperTime, usePaper } from '@/components/bench/paper-switch'
import { RestPanel } from '@/components/bench/rest-panel'
import { SlotTabs } from '@/components/bench/slot-tabs'
import { StationLine } from '@/components/bench/station-line'
import { TakeOut } from '@/components/bench/take-out'
import { useAwake } from '@/components/bench/use-awake'
import { useJarEntry } from '@/components/bench/use-jar-entry'
import { WalkStrip } from '@/components/bench/walk-strip'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Props = Omit<JarScreenProps, 'code'> & {
  jar: BenchJarPage
  /** The jar cannot be read; its version may be a later one than the page shows. */
  onMiss: (versionNow: () => Promise<number>) => void
}

/** The jar that is in hand: its head, what it shows, its fields and the one being typed. */
export function OpenJar({ jar, bench, person, outbox, onOpen, onWalk, onChange, onMiss }: Props) {
  const isDone = jar.state === 'done' || jar.state === 'missed'
  const isResting = jar.state === 'resting' && !jar.isReady
  const mayType = person.mayLog && !isDone && !isResting && !jar.isEarly && jar.isStudyRunning
  useAwake(mayType)
  const next = nextJar(bench, jar.code, outbox)
  const paper = usePaper()
  const entry = useJarEntry({
    ...{ jar, outbox, mayType, paperAt: paper.paperAt, onChange, onDone: goOn },
    asksPhoto: jar.asks === 'watch' && person.mayAddPhotos,
  })

  function goOn() {
    onChange()
    if (next) onOpen(next.code)
    else onWalk()
  }

  return (
    <div className="mx-auto flex min-h-dvh max-w-[1440px] flex-col">
      <JarHead jar={jar} outbox={outbox} onWalk={onWalk} />
      <div className="beside:hidden">
        <WalkStrip bench={bench} code={jar.code} onOpen={onOpen} />
      </div>
      <StationLine
        jar={jar}
        paper={mayType ? paper : null}
        onMiss={mayType ? () => onMiss(entry.versionNow) : null}
      />
      {mayType ? <PaperTime paper={paper} /> : null}
      <JarNotices
        jar={jar}
        kept={entry.kept}
        isOthers={mayType && jar.openedBy?.personId !== person.personId}
      />
      {mayType || isResting ? null : (
        <DonePanel
          jar={jar}
          personId={person.personId}
          mayLog={person.mayLog}
          onChange={onChange}
          onWalk={onWalk}
          next={next}
          onOpen={onOpen}
        />
      )}
      {isResting ? <RestPanel jar={jar} onWalk={onWalk} onChange={onChange} /> : null}
      {mayType ? (
        <>
          {jar.state === 'due' && jar.restHours > 0 && jar.asks !== 'watch' ? (
            <TakeOut jar={jar} onChange={onChange} />
          ) : null}
          <div className="flex flex-1 flex-col beside:grid beside:grid-cols-[minmax(0,1fr)_minmax(0,1.25fr)] beside:grid-rows-[auto_1fr] beside:gap-x-3">
            <div className="beside:row-span-2">
              {entry.slots.some((s) => s.kind === 'layer') ? (
                <LayersPanel jar={jar} entry={entry} />
              ) : (
                <OverviewPanel jar={jar} entry={entry} />
              )}
            </div>
            {/* Upright, the keys stay at the tablet's edge whatever a caution or a notice takes above them. */}
            <div
              className={`flex flex-1 flex-col beside:contents ${isOnKeys(entry) ? 'sm:sticky sm:bottom-0 sm:bg-ground' : ''}`}
            >
              <SlotTabs entry={entry} hasPhotos={person.mayAddPhotos} />
              <FieldPanel jar={jar} entry={entry} hasNextJar={next !== null} />
            </div>
          </div>
        </>
      ) : null}
      <JarQuestions jar={jar} person={person} entry={entry} />
    </div>
  )
}
