'use client'

import { shownValue } from '@/lib/study/rules/words'
import { useState } from 'react'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { HollowDot } from '@/components/bench/value-panel'
import { bandText, slotLabel } from '@/components/bench/verdict'
import { BandBar } from '@/components/marks/band-bar'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/schema'
import { shortDay } from '@/lib/report/rules'

type Props = { jar: BenchJarPage; entry: JarEntry; onChange: () => void }

/** A measuring jar: every field with its band and its last three values; first it may rest. */
export function OverviewPanel({ jar, entry, onChange }: Props) {
  const { tabs, at } = entry
  return (
    <div className="grid gap-x-6 gap-y-3 px-4 pt-3 sm:grid-cols-[140px_minmax(0,1fr)] sm:px-7">
      <div className="hidden sm:block">
        <JarGlyph
          height={200}
          kind="measuring"
          topPercent={jar.layers?.topPercent ?? 0}
          bottomPercent={jar.layers?.bottomPercent ?? 0}
          title="The jar, opened once, with the layers last seen at its station"
        />
        {jar.asks === 'repeat' ? <p className="mt-2 text-17">A repeat on a spare jar.</p> : null}
      </div>
      <div className="min-w-0">
        {jar.state === 'due' && jar.restHours > 0 ? <TakeOut jar={jar} onChange={onChange} /> : null}
        <ul>
          {tabs.map(({ key, slot, verdict }) => (
            <li key={key} className="border-b border-hair">
              <button
                type="button"
                onClick={() => entry.goTo(key)}
                aria-pressed={key === at}
                className="grid min-h-16 w-full grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 py-2 text-left sm:grid-cols-[220px_150px_minmax(0,1fr)]"
              >
                <span className={key === at ? 'font-700' : ''}>
                  {slotLabel(slot)}
                  <span className="block whitespace-nowrap text-17 font-430 text-soft">
                    {bandText(slot.field)}
                  </span>
                </span>
                <span className="hidden sm:block">
                  {slot.field.words ? null : (
                    <BandBar
                      width={150}
                      lower={slot.field.band?.lower ?? null}
                      upper={slot.field.band?.upper ?? null}
                      initial={slot.field.initial}
                      last={slot.field.last[0]?.value ?? null}
                      now={verdict.state === 'value' ? verdict.value : null}
                    />
                  )}
                </span>
                <span className="text-right text-17 sm:text-left">
                  {slot.field.last.length === 0 ? 'first reading' : <HollowDot />}{' '}
                  {slot.field.last.slice(0, 3).map((l) => (
                    <span key={l.readingId} className="mr-3 inline-block whitespace-nowrap">
                      {l.word ?? (l.value === null ? l.typed : shownValue(slot.field, l.value))}{' '}
                      <span className="text-soft">{shortDay(l.day)}</span>
                    </span>
                  ))}
                </span>
              </button>
            </li>
          ))}
        </ul>
      </div>
    </div>
  )
}

function TakeOut({ jar, onChange }: { jar: BenchJarPage; onChange: () => void }) {
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function takeOut() {
    setBusy(true)
    setError(null)
    try {
      await send(pullKeys.takeOut(jar.pullJarId), 'POST', { version: jar.version })
      onChange()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }
  return (
    <div className="mb-2 flex flex-wrap items-center justify-between gap-3 border-b-2 border-ink pb-3">
      <p className="min-w-0 flex-1">
        It rests closed for {jar.restHours} h before it is opened. Already at room temperature? Then measure
        now.
      </p>
      <Button density="bench" busy={isBusy} onClick={takeOut}>
        Taken out
      </Button>
      <ErrorNote error={error} />
    </div>
  )
}
