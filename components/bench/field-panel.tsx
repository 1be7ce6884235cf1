'use client'

import { useEffect, useRef, type KeyboardEvent, type ReactNode } from 'react'
import { KeepButton, whyNotKeep } from '@/components/bench/keep-button'
import { hasOwnPanel, KindPanel } from '@/components/bench/kind-panel'
import { LayerExtras } from '@/components/bench/layer-extras'
import { LayerFields } from '@/components/bench/layer-fields'
import { NotePanel } from '@/components/bench/note-panel'
import { NumberFields } from '@/components/bench/number-fields'
import { PhotoPanel } from '@/components/photo/photo-panel'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { WordPanel } from '@/components/bench/word-panel'
import { ErrorNote } from '@/components/ui/error-note'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Props = { jar: BenchJarPage; entry: JarEntry; hasNextJar: boolean }

/** Where the hand is: what is typed, and docked by the thumb the keys and what keeps the jar. */
export function FieldPanel({ jar, entry, hasNextJar }: Props) {
  const here = entry.tabs.find((tab) => tab.key === entry.at)
  const group = entry.groups.find((one) => one.some((tab) => tab.key === entry.at)) ?? []
  const impossible = entry.tabs.find((tab) => tab.verdict.state === 'impossible')
  const keepButton = (
    <KeepButton
      busy={entry.isBusy}
      left={entry.open.length}
      why={whyNotKeep(entry.entries.length, impossible?.verdict)}
      hasNext={hasNextJar}
      onKeep={() => void entry.save()}
      onStep={entry.hasNext ? entry.step : null}
    />
  )
  const kind = here?.slot.kind
  const hasPad = isOnKeys(entry)
  const isWide = here !== undefined && hasOwnPanel(here.slot)
  const read = (key: string) => entry.draft.texts[key] ?? ''
  const keys = useTypedAbove(entry.at)
  return (
    <div className="min-w-0 flex-1 bg-typed px-4 pt-3 sm:px-7">
      <ErrorNote error={entry.error} />
      <div className="grid gap-x-7 gap-y-2 sm:grid-cols-[minmax(0,1fr)_324px]">
        {here && hasPad ? (
          kind === 'layer' ? (
            <div className="min-w-0">
              <LayerFields jar={jar} entry={entry} group={group} here={here} />
              <details className="mt-2">
                <summary className="flex min-h-16 items-center text-18 underline underline-offset-4">
                  Hairline, bleed or a cream layer
                </summary>
                <LayerExtras slot={here.slot} text={here.text} read={read} type={entry.type} />
              </details>
            </div>
          ) : (
            <NumberFields jar={jar} entry={entry} group={group} here={here} />
          )
        ) : (
          <Landing key={entry.at} isWide={isWide} onEnter={entry.step}>
            {kind === 'word' ? <WordPanel jar={jar} entry={entry} group={group} /> : null}
            {isWide ? (
              <KindPanel
                {...{ jar, slot: here.slot, text: here.text, verdict: here.verdict, read }}
                type={entry.type}
                markOnPhoto={entry.markOnPhoto}
                onPhoto={entry.draft.onPhoto?.[`${here.slot.field.attribute}.${here.slot.replicate}`]}
              />
            ) : null}
            {entry.at === 'note' ? <NotePanel note={entry.draft.note} onNote={entry.note} /> : null}
            {entry.at === 'photo' ? (
              <PhotoPanel
                jar={jar}
                onMeasured={entry.slots.some((s) => s.kind === 'layer') ? entry.measure : null}
              />
            ) : null}
          </Landing>
        )}
        <div
          ref={keys}
          className={`sticky bottom-0 -mx-4 self-end bg-typed px-4 pb-3 pt-2 sm:mx-0 sm:px-0 [@media(max-height:640px)]:static ${isWide ? 'sm:col-span-2 sm:[&>*]:ml-auto sm:[&>*]:max-w-[324px]' : 'sm:col-start-2'}`}
        >
          {here && hasPad ? (
            <NumberPad
              hasMinus={here.slot.field.possible.lower < 0 && kind === 'number'}
              onKey={(key) => entry.type(here.key, afterKey(here.text, key))}
            >
              {keepButton}
            </NumberPad>
          ) : (
            keepButton
          )}
        </div>
      </div>
    </div>
  )
}

/** Whether what is in hand is typed on the docked keys. */
export function isOnKeys({ tabs, at }: Pick<JarEntry, 'tabs' | 'at'>): boolean {
  const here = tabs.find((tab) => tab.key === at)
  return here !== undefined && here.slot.kind !== 'word' && !hasOwnPanel(here.slot)
}

type LandingProps = { isWide: boolean; onEnter: () => void; children: ReactNode }

/** The focus comes along where no number is typed, so that the next key is for what is seen. */
function Landing({ isWide, onEnter, children }: LandingProps) {
  const place = useRef<HTMLDivElement>(null)
  /** From one number of the panel to the next, then on. */
  function enter(event: KeyboardEvent<HTMLDivElement>) {
    const fields = [...event.currentTarget.querySelectorAll<HTMLInputElement>('input[inputmode]')]
    const at = fields.findIndex((field) => field === event.target)
    if (event.key !== 'Enter' || at < 0) return
    event.preventDefault()
    const next = fields[at + 1]
    if (next) next.focus()
    else onEnter()
  }
  useEffect(() => place.current?.focus({ preventScroll: true }), [])
  return (
    <div
      ref={place}
      tabIndex={-1}
      onKeyDown={enter}
      className={`min-w-0 outline-none ${isWide ? 'sm:col-span-2' : ''}`}
    >
      {children}
    </div>
  )
}

/** On a phone the keys dock over what is typed where much stands above it: then the page moves on to the number. */
function useTypedAbove(at: string) {
  const keys = useRef<HTMLDivElement>(null)
  useEffect(() => {
    const goOn = () => {
      const typed = document.getElementById('typed')?.getBoundingClientRect()
      const docked = keys.current?.getBoundingClientRect()
      if (!typed || !docked || docked.left > typed.left || docked.top >= typed.bottom) return
      window.scrollBy(0, typed.bottom + 8 - docked.top)
    }
    // A caution or a notice above may come later than the field.
    const grown = new ResizeObserver(goOn)
    grown.observe(document.body)
    return () => grown.disconnect()
  }, [at])
  return keys
}
