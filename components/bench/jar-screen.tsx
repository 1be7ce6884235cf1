'use client'

import { useEffect, useMemo, useRef, useState } from 'react'
import useSWR from 'swr'
import { AskAgain, askLocally, TwoPeople, type AlreadyRead, type Answer } from '@/components/bench/answers'
import type { BenchPerson } from '@/components/bench/bench-app'
import { entriesOf, slotsOf, withIds } from '@/components/bench/draft'
import { dayInstrument, rememberInstrument } from '@/components/bench/day-instrument'
import { DonePanel } from '@/components/bench/done-panel'
import { JarHead } from '@/components/bench/jar-head'
import { KeepButton, whyNotKeep } from '@/components/bench/keep-button'
import { JarNotices } from '@/components/bench/jar-notices'
import { LayersPanel } from '@/components/bench/layers-panel'
import { MissDialog } from '@/components/bench/miss-dialog'
import { nextJar } from '@/components/bench/next-jar'
import { OverviewPanel } from '@/components/bench/overview-panel'
import { NotePanel, PhotoPanel, WordPanel } from '@/components/bench/other-panels'
import { jarOutbox } from '@/components/bench/kept-jars'
import { RestPanel } from '@/components/bench/rest-panel'
import { SlotTabs, type TabState } from '@/components/bench/slot-tabs'
import type { Outbox } from '@/components/bench/tray'
import { useDraft } from '@/components/bench/use-draft'
import { ValuePanel } from '@/components/bench/value-panel'
import { verdictOf } from '@/components/bench/verdict'
import { WalkStrip } from '@/components/bench/walk-strip'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { isPassing } from '@/components/ui/outbox'
import { toast } from '@/components/ui/toast'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/schema'
import { newId } from '@/lib/db/id'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/schema'

type Props = {
  code: string
  bench: Bench
  person: BenchPerson
  outbox: Outbox
  onOpen: (code: string) => void
  onWalk: () => void
  onChange: () => void
}

/** One jar: what is asked of it, typed by gloved hands, judged while it is typed, kept with one press. */
export function JarScreen({ code, bench, person, outbox, onOpen, onWalk, onChange }: Props) {
  const { data: jar, error: unread, mutate } = useSWR<BenchJarPage>(benchKeys.jar(code), fetcher)
  if (!jar)
    return (
      <div className="mx-auto flex max-w-[820px] flex-col gap-5 p-5">
        {unread ? <ErrorNote error={unread} /> : <p role="status">The jar is being looked up.</p>}
        <Button density="bench" onClick={onWalk}>
          Back to the walk
        </Button>
      </div>
    )
  return (
    <OpenJar
      key={jar.pullJarId}
      {...{ jar, bench, person, outbox, onOpen, onWalk }}
      onChange={() => {
        void mutate()
        onChange()
      }}
    />
  )
}

type OpenProps = Omit<Props, 'code'> & { jar: BenchJarPage }

function OpenJar({ jar, bench, person, outbox, onOpen, onWalk, onChange }: OpenProps) {
  const slots = useMemo(
    () => slotsOf(jar.fields, jar.tareG !== null && jar.grossG !== null),
    [jar.fields, jar.tareG, jar.grossG],
  )
  const [draft, setDraft, forget] = useDraft(person.personId, jar.pullJarId)
  const [at, setAt] = useState<string>(slots[0]?.key ?? 'note')
  const [error, setError] = useState<unknown>(null)
  const [asked, setAsked] = useState<ClientError | null>(null)
  const [twice, setTwice] = useState<AlreadyRead | null>(null)
  const [isMissing, setMissing] = useState(false)
  const [isBusy, setBusy] = useState(false)
  const opening = useRef<Promise<number> | null>(null)
  const entries = useMemo(
    () => entriesOf(slots, draft, jar.fillHeightMm, (s) => dayInstrument(jar, s)),
    [slots, draft, jar],
  )
  const entryOf = (attribute: string, replicate: number) =>
    entries.find((e) => e.attribute === attribute && e.replicate === replicate)
  const verdicts = slots.map((slot) => ({
    slot,
    verdict: verdictOf(slot.field, entryOf(slot.field.attribute, slot.replicate), jar),
  }))
  const isThisJar = (kept: { pullJarId: string }) => kept.pullJarId === jar.pullJarId
  const keptHere = outbox.kept.find(isThisJar)
  const isDone = jar.state === 'done' || jar.state === 'missed'
  const isResting = jar.state === 'resting' && !jar.isReady
  const mayType = person.mayLog && !isDone && !isResting && !jar.isEarly && jar.isStudyRunning
  const next = nextJar(bench, jar.code, outbox)
  const slot = slots.find((s) => s.key === at)
  const open = slots.filter((s) => (draft.texts[s.key] ?? '').trim() === '')

  useEffect(() => {
    // Others see who has it open. Without network, or with the jar in other hands, one may still go on.
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
    // Once per jar: the key of this component is the jar and its version.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [])

  function type(key: string, text: string) {
    const id = slots.find((s) => s.key === key)
    setDraft((d) => ({
      ...withIds(d, slots),
      texts: { ...d.texts, [key]: text },
      // A changed number is a new question.
      confirmed: d.confirmed.filter((c) => id === undefined || c !== `${id.field.attribute}.${id.replicate}`),
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
    toast(sentence)
    onChange()
    if (next) onOpen(next.code)
    else onWalk()
  }

  function step() {
    const from = slots.findIndex((s) => s.key === at)
    const following = slots.slice(from + 1).find((s) => (draft.texts[s.key] ?? '') === '') ?? open[0]
    if (following && following.key !== at) setAt(following.key)
    else if (entries.length > 0) void save()
  }

  const tabs: TabState[] = [
    ...verdicts.map(({ slot: s, verdict }) => ({
      key: s.key,
      slot: s,
      verdict,
      text: draft.texts[s.key] ?? '',
    })),
  ]
  const impossible = verdicts.find((v) => v.verdict.state === 'impossible')
  const keepButton = (
    <KeepButton
      busy={isBusy}
      left={open.length}
      why={whyNotKeep(entries.length, impossible?.verdict)}
      hasNext={next !== null}
      onKeep={() => void save()}
      onStep={open.some((s) => s.key !== at) ? step : null}
    />
  )
  const hasLayers = slots.some((s) => s.kind === 'layer')
  return (
    <div className="mx-auto flex min-h-dvh max-w-[1180px] flex-col">
      <JarHead jar={jar} outbox={outbox} onWalk={onWalk} />
      <WalkStrip bench={bench} code={jar.code} />
      <div className="flex flex-wrap items-center justify-between gap-3 px-4 pt-2.5 text-17 sm:px-7">
        <p>
          {jar.station.name}
          {jar.station.temperatureC === null ? '' : `, ${jar.station.temperatureC} °C`}.{' '}
          {jar.station.caution ? <b>{jar.station.caution}</b> : null}
        </p>
        {mayType ? (
          <button
            type="button"
            className="min-h-11 underline underline-offset-4"
            onClick={() => setMissing(true)}
          >
            Cannot be read
          </button>
        ) : null}
      </div>
      <JarNotices
        jar={jar}
        kept={keptHere}
        isOthers={mayType && jar.openedBy?.personId !== person.personId}
      />
      {mayType || isResting ? null : (
        <DonePanel
          jar={jar}
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
          {hasLayers ? (
            <LayersPanel
              jar={jar}
              slots={slots}
              draft={draft}
              verdicts={verdicts}
              at={at}
              onPick={setAt}
              onText={type}
            />
          ) : (
            <OverviewPanel jar={jar} tabs={tabs} at={at} onPick={setAt} onChange={onChange} />
          )}
          <SlotTabs tabs={tabs} at={at} onPick={setAt} note={draft.note} hasPhotos={person.mayAddPhotos} />
          <div className="flex-1 bg-typed px-4 pb-5 pt-4 sm:px-7">
            <ErrorNote error={error} />
            {slot && slot.kind !== 'word' ? (
              <ValuePanel
                jar={jar}
                slot={slot}
                text={draft.texts[slot.key] ?? ''}
                verdict={verdicts.find((v) => v.slot.key === slot.key)!.verdict}
                instrument={
                  draft.instruments[`${slot.field.attribute}.${slot.replicate}`] ?? dayInstrument(jar, slot)
                }
                onInstrument={(id) => {
                  rememberInstrument(slot, id)
                  setDraft((d) => ({
                    ...d,
                    instruments: { ...d.instruments, [`${slot.field.attribute}.${slot.replicate}`]: id },
                  }))
                }}
                onText={(text) => type(slot.key, text)}
                onEnter={step}
                keepButton={keepButton}
              />
            ) : (
              <>
                {slot?.kind === 'word' ? (
                  <WordPanel
                    slot={slot}
                    text={draft.texts[slot.key] ?? ''}
                    onText={(text) => type(slot.key, text)}
                  />
                ) : null}
                {at === 'note' ? (
                  <NotePanel note={draft.note} onNote={(note) => setDraft((d) => ({ ...d, note }))} />
                ) : null}
                {at === 'photo' ? <PhotoPanel jar={jar} /> : null}
                <div className="ml-auto mt-4 max-w-[300px]">{keepButton}</div>
              </>
            )}
          </div>
        </>
      ) : null}
      {asked ? (
        <AskAgain
          refusal={asked}
          onConfirm={() =>
            void save({
              confirmed: entries.map((e) => `${e.attribute}.${e.replicate}`),
              leaveOut: jar.fields
                .map((f) => f.attribute)
                .filter((attribute) => !entries.some((e) => e.attribute === attribute)),
            })
          }
          onAgain={() => setAsked(null)}
          isBusy={isBusy}
        />
      ) : null}
      {twice ? (
        <TwoPeople
          jar={jar}
          person={person}
          theirs={twice}
          mine={entries}
          isBusy={isBusy}
          onDecide={(resolution) => void save({ resolution, version: twice.version })}
          onClose={() => setTwice(null)}
        />
      ) : null}
      {isMissing ? (
        <MissDialog
          jar={jar}
          onClose={() => setMissing(false)}
          onDone={() => {
            setMissing(false)
            done(`${jar.name} is noted as not read.`)
          }}
        />
      ) : null}
    </div>
  )
}
