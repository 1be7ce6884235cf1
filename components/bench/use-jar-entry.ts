'use client'

import { useEffect, useMemo, useRef, useState } from 'react'
import { askLocally, type AlreadyRead, type Answer } from '@/components/bench/answers'
import type { BenchPerson } from '@/components/bench/bench-app'
import { dayInstrument, rememberInstrument } from '@/components/bench/day-instrument'
import { entriesOf, slotsOf, withIds, type Slot } from '@/components/bench/draft'
import { jarOutbox } from '@/components/bench/kept-jars'
import type { Outbox } from '@/components/bench/tray'
import { useDraft } from '@/components/bench/use-draft'
import { verdictOf } from '@/components/bench/verdict'
import { isPassing } from '@/components/ui/outbox'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/schema'

type Options = {
  jar: BenchJarPage
  person: BenchPerson
  outbox: Outbox
  mayType: boolean
  onChange: () => void
  /** The entry is on its way: on the server, or on this tablet. */
  onDone: (sentence: string) => void
}

export type JarEntry = ReturnType<typeof useJarEntry>

/** What is typed of one jar in one pull: where the hand is, what it means, and keeping it. */
export function useJarEntry({ jar, person, outbox, mayType, onChange, onDone }: Options) {
  const slots = useMemo(
    () => slotsOf(jar.fields, jar.tareG !== null && jar.grossG !== null),
    [jar.fields, jar.tareG, jar.grossG],
  )
  const [draft, setDraft, forget] = useDraft(person.personId, jar.pullJarId)
  const [at, setAt] = useState<string>(slots[0]?.key ?? 'note')
  const [error, setError] = useState<unknown>(null)
  const [asked, setAsked] = useState<ClientError | null>(null)
  const [twice, setTwice] = useState<AlreadyRead | null>(null)
  const [isBusy, setBusy] = useState(false)
  const opening = useOpening(jar, mayType, onChange)
  const entries = useMemo(
    () => entriesOf(slots, draft, jar.fillHeightMm, (s) => dayInstrument(jar, s)),
    [slots, draft, jar],
  )
  const tabs = slots.map((slot) => {
    const entry = entries.find((e) => e.attribute === slot.field.attribute && e.replicate === slot.replicate)
    const text = draft.texts[slot.key] ?? ''
    return { key: slot.key, slot, text, verdict: verdictOf(slot.field, entry, jar) }
  })
  const open = slots.filter((s) => (draft.texts[s.key] ?? '').trim() === '')
  const isThisJar = (kept: { pullJarId: string }) => kept.pullJarId === jar.pullJarId

  function type(key: string, text: string) {
    const id = slots.find((s) => s.key === key)
    setDraft((d) => ({
      ...withIds(d, slots),
      texts: { ...d.texts, [key]: text },
      // A changed number is a new question.
      confirmed: d.confirmed.filter((c) => id === undefined || c !== `${id.field.attribute}.${id.replicate}`),
    }))
  }

  function chooseInstrument(slot: Slot, id: string) {
    rememberInstrument(slot, id)
    setDraft((d) => ({
      ...d,
      instruments: { ...d.instruments, [`${slot.field.attribute}.${slot.replicate}`]: id },
    }))
  }

  async function save(extra: Answer = {}) {
    const filled = withIds(draft, slots)
    const confirmed = [...new Set([...filled.confirmed, ...(extra.confirmed ?? [])])]
    const sending = { ...filled, confirmed }
    setDraft(() => sending)
    const readings = entriesOf(slots, sending, jar.fillHeightMm, (s) => dayInstrument(jar, s))
    const missing = jar.fields.filter((f) => !readings.some((r) => r.attribute === f.attribute))
    setBusy(true)
    // Opening counts as a change of the jar; the jar as it is shown may still be the one before.
    const opened = (await opening.current) ?? jar.version
    const body = {
      version: extra.version ?? Math.max(jar.version, opened),
      claimedAt: new Date().toISOString(),
      deviceNow: new Date().toISOString(),
      note: sending.note,
      readings,
      leaveOut: extra.leaveOut ?? [],
      ...(extra.resolution ? { resolution: extra.resolution } : {}),
    }
    setError(null)
    try {
      await send(pullKeys.readings(jar.pullJarId), 'POST', body)
      jarOutbox.drop(isThisJar)
      done(`Kept: ${jar.name}`)
    } catch (refused) {
      if (!(refused instanceof ClientError)) setError(refused)
      else if (isPassing(refused) && missing.length > 0 && !extra.leaveOut) {
        // Asked here, because nobody will be at the jar when the entry goes out.
        setAsked(askLocally(missing))
      } else if (isPassing(refused)) {
        jarOutbox.keep(
          {
            ...{ id: newId(), personId: person.personId, url: pullKeys.readings(jar.pullJarId), body },
            ...{ pullJarId: jar.pullJarId, jarName: jar.name, code: jar.code },
          },
          isThisJar,
        )
        outbox.setOnline(false)
        done(`Kept on this tablet: ${jar.name}. It goes out when the network is back.`)
      } else if (refused.code === 'confirm') setAsked(refused)
      else if (refused.code === 'already read') setTwice(refused.detail as AlreadyRead)
      else setError(refused)
    } finally {
      setBusy(false)
    }
  }

  function done(sentence: string) {
    if (!outbox.kept.some(isThisJar)) forget()
    setAsked(null)
    setTwice(null)
    onDone(sentence)
  }

  function step() {
    const from = slots.findIndex((s) => s.key === at)
    const following = slots.slice(from + 1).find((s) => (draft.texts[s.key] ?? '') === '') ?? open[0]
    if (following && following.key !== at) setAt(following.key)
    else if (entries.length > 0) void save()
  }

  return {
    ...{ slots, tabs, open, entries, draft, at, error, asked, twice, isBusy },
    kept: outbox.kept.find(isThisJar),
    instrumentOf: (slot: Slot) =>
      draft.instruments[`${slot.field.attribute}.${slot.replicate}`] ?? dayInstrument(jar, slot),
    goTo: setAt,
    note: (note: string) => setDraft((d) => ({ ...d, note })),
    ...{ type, step, save, done, chooseInstrument },
    askNoMore: () => setAsked(null),
    decideLater: () => setTwice(null),
  }
}

/** Others see who has the jar open. Without network, or with the jar in other hands, one may still go on. */
function useOpening(jar: BenchJarPage, mayType: boolean, onChange: () => void) {
  const opening = useRef<Promise<number> | null>(null)
  useEffect(() => {
    if (mayType && jar.state === 'due' && !jar.openedBy)
      opening.current = send<{ version: number }>(pullKeys.open(jar.pullJarId), 'POST', {
        version: jar.version,
      }).then(
        (opened) => {
          onChange()
          return opened.version
        },
        () => jar.version,
      )
    // Once per jar: its screen is keyed by the jar in its pull.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [])
  return opening
}
