import { useCallback, useMemo } from 'react'
import { dayInstrument, type ChosenInstruments } from '@/components/bench/day-instrument'
import {
  emptyDraft,
  entriesOf,
  slotsOf,
  withIds,
  type Draft,
  type OnPhoto,
  type Slot,
} from '@/components/bench/draft'
import { useKept } from '@/components/device/use-kept'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Conditions } from '@/lib/reading/rules/conditions'
import { instrumentKind } from '@/lib/reading/rules/instrument-kind'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { separationOfLines } from '@/lib/science/photo-lines'

const entryKey = ({ field, replicate }: Pick<Slot, 'field' | 'replicate'>) =>
  `${field.attribute}.${replicate}`

const without = (all: Record<string, OnPhoto>, key: string) =>
  Object.fromEntries(Object.entries(all).filter(([other]) => other !== key))

/** What is typed of one jar in one pull, or of one attribute of it: kept on the device at each key. */
export function useJarDraft(jar: BenchJarPage, part: string | undefined) {
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
  const entriesNow = useCallback(
    (now: Draft) => entriesOf(slots, now, jar.fillHeightMm, (slot) => dayInstrument(jar, slot, chosen)),
    [slots, jar, chosen],
  )
  const entries = useMemo(() => entriesNow(draft), [entriesNow, draft])
  const isThere = (key: string) => key === 'photo' || key === 'note' || slots.some((s) => s.key === key)

  function type(key: string, text: string) {
    const id = slots.find((s) => s.key === key)
    setDraft((d) => ({
      ...withIds(d, slots),
      texts: { ...d.texts, [key]: text },
      // A changed number is a new question.
      confirmed: d.confirmed.filter((c) => id === undefined || c !== entryKey(id)),
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
    const kind = instrumentKind(slot.field.attribute)
    if (kind) setChosen({ [kind]: id })
    setDraft((d) => ({ ...d, instruments: { ...d.instruments, [entryKey(slot)]: id } }))
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

  const setAt = (key: string) => setDraft((before) => ({ ...before, at: key }))

  return {
    ...{ fields, draftKey, draft, setDraft, slots, entries, entriesNow },
    at: draft.at && isThere(draft.at) ? draft.at : (slots[0]?.key ?? 'note'),
    ...{ setAt, type, measure, markOnPhoto, chooseInstrument, setConditions },
    instrumentOf: (slot: Slot) => draft.instruments[entryKey(slot)] ?? dayInstrument(jar, slot, chosen),
    note: (note: string) => setDraft((d) => ({ ...d, note })),
  }
}
