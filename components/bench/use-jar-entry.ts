import { useState } from 'react'
import { askLocally, type AlreadyRead, type Answer } from '@/components/bench/answers'
import { conditionsUsed, groupsOf, withIds, type Draft, type Slot } from '@/components/bench/draft'
import { setLastSave, type LastSave } from '@/components/bench/last-save'
import { isKeptJar, partsKept } from '@/components/bench/kept-jars'
import { useJarDraft } from '@/components/bench/use-jar-draft'
import { useOpening } from '@/components/bench/use-opening'
import { verdictOf, type Verdict } from '@/components/bench/verdict'
import type { OutboxItem } from '@/components/device/outbox-item'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { ClientError } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/keys'
import type { AssignedRepeat } from '@/lib/pull/schema'
import { changedConditions, conditionsIn } from '@/lib/reading/rules/conditions'
import { readTyped } from '@/lib/reading/schema/typed'

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

/** A height on the ruler: to a tenth, within the fill. */
const inFill = (mm: number, fillMm: number) =>
  (Math.round(Math.max(0, Math.min(fillMm, mm)) * 10) / 10).toFixed(1)

/** Reading one jar in one pull: where the hand is, what is typed means, and keeping it. */
export function useJarEntry(options: Options) {
  const { jar, outbox, mayType, part, paperAt = null, asksPhoto = false, onChange, onDone } = options
  const typing = useJarDraft(jar, part)
  const { fields, draftKey, draft, setDraft, slots, entries, entriesNow, at, setAt, type } = typing
  const [seenPhoto, setSeenPhoto] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const [asked, setAsked] = useState<ClientError | null>(null)
  const [twice, setTwice] = useState<AlreadyRead | null>(null)
  const [isBusy, setBusy] = useState(false)
  const versionNow = useOpening(jar, mayType && part === undefined, onChange)
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

  const heightOf = (tab: FieldTab) => readTyped(tab.text) ?? 0
  const setHeight = (tab: FieldTab, mm: number) => type(tab.key, inFill(mm, jar.fillHeightMm))

  /** Typed with one press, and on to what is open. */
  function fill(texts: Record<string, string>) {
    for (const [key, text] of Object.entries(texts)) type(key, text)
    const filled = { ...draft, texts: { ...draft.texts, ...texts } }
    const following = nextOpen(filled, Object.keys(texts).at(-1)!)
    if (following) goTo(following)
  }

  async function save(extra: Answer = {}) {
    const filled = withIds(draft, slots)
    const confirmed = [...new Set([...filled.confirmed, ...(extra.confirmed ?? [])])]
    const sending = { ...filled, confirmed }
    setDraft(() => sending)
    const readings = entriesNow(sending)
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
        part: part === undefined ? null : { key: part, label: labelOf(part) },
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

  const { instrumentOf, note, measure, markOnPhoto, chooseInstrument, setConditions } = typing
  return {
    ...{ slots, tabs, groups, open, entries, draft, at, error, asked, twice, isBusy },
    ...{ type, note, measure, markOnPhoto, instrumentOf, chooseInstrument, setConditions },
    ...{ goTo, fill, step, save, versionNow, heightOf, setHeight },
    kept: outbox.items.find(isThisJar),
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
