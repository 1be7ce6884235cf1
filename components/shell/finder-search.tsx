'use client'

import { useRouter } from 'next/navigation'
import { Dialog } from 'radix-ui'
import { useId, useState } from 'react'
import useSWR from 'swr'
import { ErrorNote } from '@/components/ui/error-note'
import type { Found, FoundKind } from '@/lib/finder/queries'
import { findKey } from '@/lib/finder/keys'
import { fetcher } from '@/lib/http/fetcher'
import type { Place } from './places'
import { useSettled } from '@/components/ui/use-settled'

type Entry = { key: string; word: string; code: string; name: string; href: string }

const words: Record<FoundKind, string> = {
  formula: 'formula',
  batch: 'batch',
  study: 'study',
  jar: 'jar',
  ingredient: 'ingredient',
  protocol: 'protocol',
  case: 'case',
  station: 'station',
  instrument: 'instrument',
}

type Props = { places: Place[]; onClose: () => void; onClosed: () => void }

export function FinderSearch({ places, onClose, onClosed }: Props) {
  return (
    <Dialog.Root open onOpenChange={(open) => (open ? undefined : onClose())}>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-50 bg-ground/70" />
        <Dialog.Content
          aria-describedby={undefined}
          onCloseAutoFocus={(event) => {
            event.preventDefault()
            onClosed()
          }}
          className="floats fixed left-1/2 top-[12dvh] z-50 flex max-h-[76dvh] w-[calc(100vw-32px)] max-w-[620px] -translate-x-1/2 flex-col p-0"
        >
          <Dialog.Title className="sr-only">Find by name or code</Dialog.Title>
          <Search places={places} onGo={onClose} />
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  )
}

function Search({ places, onGo }: { places: Place[]; onGo: () => void }) {
  const router = useRouter()
  const list = useId()
  const [typed, setTyped] = useState('')
  const [picked, setPicked] = useState(0)
  const settled = useSettled(typed.trim(), 150)
  const { data, error, isLoading } = useSWR<Found[]>(settled ? findKey(settled) : null, fetcher, {
    keepPreviousData: true,
  })
  const entries = entriesOf(places, typed.trim(), settled ? (data ?? []) : [])
  const at = Math.min(picked, entries.length - 1)
  const go = (entry: Entry | undefined) => {
    if (!entry) return
    onGo()
    router.push(entry.href)
  }
  return (
    <>
      <input
        autoFocus
        role="combobox"
        aria-expanded={entries.length > 0}
        aria-controls={list}
        aria-activedescendant={at >= 0 ? `${list}-${at}` : undefined}
        aria-label="Part of a name or code"
        autoComplete="off"
        spellCheck={false}
        placeholder="Part of a name or code"
        value={typed}
        onChange={(event) => {
          setTyped(event.target.value)
          setPicked(0)
        }}
        onKeyDown={(event) => {
          const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0
          if (step !== 0 && entries.length > 0) {
            event.preventDefault()
            setPicked((at + step + entries.length) % entries.length)
          } else if (event.key === 'Enter' && !event.nativeEvent.isComposing) {
            event.preventDefault()
            go(entries[at])
          }
        }}
        className="h-14 w-full border-b-[1.75px] border-ink bg-typed px-5 text-20 outline-none placeholder:text-soft"
      />
      <div className="min-h-0 overflow-y-auto py-2">
        <ul id={list} role="listbox" aria-label="Found">
          {entries.map((entry, i) => (
            <li
              key={entry.key}
              id={`${list}-${i}`}
              role="option"
              aria-selected={i === at}
              ref={(row) => {
                if (i === at) row?.scrollIntoView({ block: 'nearest' })
              }}
              onPointerMove={() => setPicked(i)}
              onClick={() => go(entry)}
              className={`flex min-h-11 cursor-pointer items-center gap-4 px-5 py-1 text-15 ${i === at ? 'bg-ink text-onink' : ''}`}
            >
              <span className={`w-20 shrink-0 text-13 ${i === at ? '' : 'text-soft'}`}>{entry.word}</span>
              <span className="shrink-0 font-650">{entry.code}</span>
              <span className="min-w-0 truncate">{entry.name}</span>
            </li>
          ))}
        </ul>
        {error ? (
          <div className="px-5 py-3">
            <ErrorNote error={error} />
          </div>
        ) : null}
        {settled && entries.length === 0 && !isLoading && !error ? (
          <p role="status" className="px-5 py-3 text-15">
            Nothing you may see has “{settled}” in its name or code.
          </p>
        ) : null}
        {typed === '' ? (
          <p className="px-5 py-3 text-13 text-soft">
            Formulas, batches, studies, jars, ingredients, protocols, cases, stations, instruments and pages.
            Arrows pick, Enter opens, Escape leaves.
          </p>
        ) : null}
      </div>
    </>
  )
}

/** Pages whose name fits come first: they are few and known by heart. */
function entriesOf(places: Place[], typed: string, found: Found[]): Entry[] {
  const wanted = typed.toLowerCase()
  const pages = places
    .filter((place) => wanted !== '' && place.label.toLowerCase().includes(wanted))
    .map(({ href, label }) => ({ key: href, word: 'page', code: label, name: '', href }))
  return [
    ...pages,
    ...found.map(({ kind, code, name, href }) => ({
      key: `${kind} ${code}`,
      word: words[kind],
      code,
      name,
      href,
    })),
  ]
}
