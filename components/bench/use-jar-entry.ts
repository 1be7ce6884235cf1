'use client'

import { useEffect, useMemo, useRef, useState } from 'react'
import { askLocally, type AlreadyRead, type Answer } from '@/components/bench/answers'
import { dayInstrument, instrumentKind, type ChosenInstruments } from '@/components/bench/day-instrument'
import {
  conditionsUsed,
  emptyDraft,
  entriesOf,
  groupsOf,
  slotsOf,
  withIds,
  type OnPhoto,
  type Draft,
  type Slot,
} from '@/components/bench/draft'
import { setLastSave, type LastSave } from '@/components/bench/last-save'
import { isKeptJar, partsKept } from '@/components/bench/kept-jars'
import { verdictOf, type Verdict } from '@/components/bench/verdict'
import type { OutboxItem } from '@/components/device/outbox-item'
import { useKept } from '@/components/device/use-kept'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { ClientError, send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/keys'
import type { AssignedRepeat } from '@/lib/pull/schema'
import { changedConditions, conditionsIn, type Conditions } from '@/lib/reading/rules/conditions'
import { readTyped } from '@/lib/reading/schema/typed'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { separationOfLines } from '@/lib/science/photo-lines'

type Options = {
  jar: BenchJarPage
  outbox: OutboxOnScreen
  mayType: boolean
  /** One attribute of it, with others to come: kept as a part. */
  part?: string
  /** Read off a paper form: when it was really measured. */
  paperAt?: string | null
  onChange: () => void
  /** The entry is on its way: on the server, or on this tablet. */
  onDone: () => void
  /** A watch jar's picture is taken each time, by whoever may. */
  asksPhoto?: boolean
}

export type JarEntry = ReturnType<typeof useJarEntry>
export type FieldTab = { key: string; slot: Slot; text: string; verdict: Verdict }

const isOpen = (draft: Draft, key: string) => (draft.texts[key] ?? '').trim() === ''

const entryKey = ({ field, replicate }: Slot) => `${field.attribute}.${replicate}`

const without = (all: Record<string, OnPhoto>, key: string) =>
  Object.fromEntries(Object.entries(all).filter(([other]) => other !== key))

/** A height on the ruler: to a tenth, within the fill. */
const inFill = (mm: number, fillMm: number) =>
  (Math.round(Math.max(0, Math.min(fillMm, mm)) * 10) / 10).toFixed(1)

/** What is typed of one jar in one pull: where the hand is, what it means, and keeping it. */
export function useJarEntry(options: Options) {
  const { jar, outbox, mayType, part, paperAt = null, asksPhoto = false, onChange, onDone } = options
  // What was read one attribute at a time is not asked for again.
  const fields = useMemo(
    () =>
      jar.fields.filter(
        (f) => !jar.read.includes(f.attribute) && (part === undefined || f.attribute === part),
      ),
    [jar.fields, jar.read, part],
  )
  const draftKey = part === undefined ? `jar.${jar.pullJarId}` : `jar.${jar.pullJarId}.${part}`
  const [draft, setDraft] = useKept(draftKey, emptyDraft(''))
  const [chosen, setChosen] = useKept<ChosenInstruments>('instruments', {})
  const slots = useMemo(
    () => slotsOf(fields, jar.tareG !== null && jar.grossG !== null, draft.direct),
    [fields, jar.tareG, jar.grossG, draft.direct],
  )
  const isThere = (key: string) => key === 'photo' || key === 'note' || slots.some((s) => s.key === key)
  const at = draft.at && isThere(draft.at) ? draft.at : (slots[0]?.key ?? 'note')
  const setAt = (key: string) => setDraft((before) => ({ ...before, at: key }))
  const [seenPhoto, setSeenPhoto] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const [asked, setAsked] = useState<ClientError | null>(null)
  const [twice, setTwice] = useState<AlreadyRead | null>(null)
  const [isBusy, setBusy] = useState(false)
  const opening = useOpening(jar, mayType && part === undefined, onChange)
  const entries = useMemo(
    () => entriesOf(slots, draft, jar.fillHeightMm, (s) => dayInstrument(jar, s, chosen)),
    [slots, draft, jar, chosen],
  )
  const tabs = slots.map((slot): FieldTab => {
    const entry = entries.find((e) => e.attribute === slot.field.attribute && e.replicate === slot.replicate)
    const text = draft.texts[slot.key] ?? ''
    return { key: slot.key, slot, text, verdict: verdictOf(slot.field, entry, jar) }
  })
  const groups = groupsOf(tabs)
  const open = slots.filter((s) => isOpen(draft, s.key))
  const isThisJar = (item: OutboxItem) =>
    item.about.pullJarId === jar.pullJarId &&
    (part === undefined ? isKeptJar(item) : partsKept([item], jar.pullJarId).includes(part))

  function type(key: string, text: string) {
    const id = slots.find((s) => s.key === key)
    setDraft((d) => ({
      ...withIds(d, slots),
      texts: { ...d.texts, [key]: text },
      // A changed number is a new question.
      confirmed: d.confirmed.filter((c) => id === undefined || c !== `${id.field.attribute}.${id.replicate}`),
      ...(id && d.onPhoto ? { onPhoto: without(d.onPhoto, entryKey(id)) } : {}),
    }))
  }

  /** Both layers at once, from lines on a photo. */
  function measure(photoLines: PhotoLinesOfReading) {
    const top = slots.find((s) => s.part === 'top')
    const bottom = slots.find((s) => s.part === 'bottom')
    if (!top || !bottom) return
    const shares = separationOfLines(photoLines.lines)
    const mm = (percent: number) => ((percent / 100) * (jar.fillHeightMm ?? 0)).toFixed(1)
    type(top.key, mm(shares.topPercent))
    type(bottom.key, mm(shares.bottomPercent))
    markOnPhoto(top, { photoLines })
    setAt(top.key)
  }

  /** Where on a photo the text that was just typed was measured. */
  function markOnPhoto(slot: Slot, onPhoto: OnPhoto) {
    setDraft((d) => ({ ...d, onPhoto: { ...d.onPhoto, [entryKey(slot)]: onPhoto } }))
  }

  function chooseInstrument(slot: Slot, id: string) {
    const kind = instrumentKind(slot)
    if (kind) setChosen({ [kind]: id })
    setDraft((d) => ({
      ...d,
      instruments: { ...d.instruments, [`${slot.field.attribute}.${slot.replicate}`]: id },
    }))
  }

  function setConditions({ field }: Slot, conditions: Partial<Conditions>, isDirect: boolean) {
    const { attribute } = field
    setDraft((d) => {
      const others = d.direct.filter((one) => one !== attribute)
      const isOther = isDirect !== d.direct.includes(attribute)
      const keys = Object.keys(d.texts).filter((key) => isOther && key.startsWith(`${attribute}.`))
      return {
        ...d,
        direct: isDirect ? [...others, attribute] : others,
        conditions: { ...d.conditions, [attribute]: conditions },
        texts: { ...d.texts, ...Object.fromEntries(keys.map((key) => [key, ''])) },
      }
    })
  }

  const heightOf = (tab: FieldTab) => readTyped(tab.text) ?? 0
  const setHeight = (tab: FieldTab, mm: number) => type(tab.key, inFill(mm, jar.fillHeightMm))

  /** Typed with one press, and on to what is open. */
  function fill(texts: Record<string, string>) {
    for (const [key, text] of Object.entries(texts)) type(key, text)
    const filled = { ...draft, texts: { ...draft.texts, ...texts } }
    const following = nextOpen(filled, Object.keys(texts).at(-1)!)
    if (following) goTo(following)
  }

  /** Opening counts as a change of the jar; the jar as it is shown may still be the one before. */
  const versionNow = async () => Math.max(jar.version, (await opening.current) ?? 0)

  async function save(extra: Answer = {}) {
    const filled = withIds(draft, slots)
    const confirmed = [...new Set([...filled.confirmed, ...(extra.confirmed ?? [])])]
    const sending = { ...filled, confirmed }
    setDraft(() => sending)
    const readings = entriesOf(slots, sending, jar.fillHeightMm, (s) => dayInstrument(jar, s, chosen))
    const missing = fields.filter((f) => !readings.some((r) => r.attribute === f.attribute))
    setBusy(true)
    const version = extra.version ?? (await versionNow())
    const body = {
      version,
      claimedAt: paperAt ?? new Date().toISOString(),
      ...(paperAt === null ? {} : { isFromPaper: true }),
      ...(part === undefined ? {} : { isPartial: true }),
      deviceNow: new Date().toISOString(),
      note: sending.note,
      readings,
      leaveOut: extra.leaveOut ?? [],
      ...(extra.resolution ? { resolution: extra.resolution } : {}),
    }
    setError(null)
    try {
      const outcome = await outbox.send<{ repeats: AssignedRepeat[] }>(
        {
          ...{ url: pullKeys.readings(jar.pullJarId), body },
          about: {
            ...{ kind: 'jar', label: `Jar ${jar.name}`, code: jar.code, pullJarId: jar.pullJarId },
            what: readings.map((entry) => `${labelOf(entry.attribute)} ${entry.typed}`).join(', '),
            href: `/bench/${jar.code}`,
          },
          draft: { key: draftKey, value: sending },
        },
        isThisJar,
      )
      const save = {
        jar: { ...jar, stationName: jar.station.name },
        readings: readings.map((entry) => entry.id),
        draft: sending,
        draftKey,
      }
      if (outcome.how === 'sent') done({ ...save, isKeptHere: false, repeats: outcome.answer.repeats })
      // Asked here, because nobody will be at the jar when the entry goes out.
      else if (missing.length > 0 && !extra.leaveOut) setAsked(askLocally(missing))
      else done({ ...save, isKeptHere: true, repeats: [] })
    } catch (refused) {
      if (!(refused instanceof ClientError)) setError(refused)
      else if (refused.code === 'confirm') setAsked(refused)
      else if (refused.code === 'already read') setTwice(refused.detail as AlreadyRead)
      else setError(refused)
    } finally {
      setBusy(false)
    }
  }

  function done(save: Omit<LastSave, 'at'>) {
    setAsked(null)
    setTwice(null)
    setLastSave(save)
    onDone()
  }

  const labelOf = (attribute: string) =>
    jar.fields.find((field) => field.attribute === attribute)?.label ?? attribute

  /** The next that is open, in the protocol's order; a watch jar's last is its photo. */
  function nextOpen(now: Draft, from: string): string | null {
    const at = slots.findIndex((s) => s.key === from)
    const around = [...slots.slice(at + 1), ...slots.slice(0, Math.max(0, at))]
    return around.find((s) => isOpen(now, s.key))?.key ?? (asksPhoto && !seenPhoto ? 'photo' : null)
  }

  function goTo(key: string) {
    if (key === 'photo') setSeenPhoto(true)
    setAt(key)
  }

  function step() {
    const following = nextOpen(draft, at)
    if (following && following !== at) goTo(following)
    else if (entries.length > 0) void save()
  }

  return {
    ...{ slots, tabs, groups, open, entries, draft, at, error, asked, twice, isBusy },
    kept: outbox.items.find(isThisJar),
    instrumentOf: (slot: Slot) =>
      draft.instruments[`${slot.field.attribute}.${slot.replicate}`] ?? dayInstrument(jar, slot, chosen),
    goTo,
    note: (note: string) => setDraft((d) => ({ ...d, note })),
    ...{
      versionNow,
      type,
      fill,
      measure,
      markOnPhoto,
      step,
      save,
      chooseInstrument,
      setConditions,
      heightOf,
      setHeight,
    },
    stepHeight: (tab: FieldTab, by: number) => setHeight(tab, heightOf(tab) + by),
    /** Whether it is read under other conditions than the initial was. */
    isChanged: (slot: Slot) =>
      changedConditions(conditionsIn(conditionsUsed(slot, draft)), slot.field.conditions) !== null,
    /** Whether Enter leads somewhere before it keeps the jar. */
    hasNext: nextOpen(draft, at) !== null,
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
