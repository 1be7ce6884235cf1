import type { Store } from './store'
import type { Tabs } from './tabs'

export type Drafts = ReturnType<typeof keepDrafts>
type Change = (draft: unknown) => unknown

/** What a person is typing, in memory for the screen and on the device at each key. */
export function keepDrafts(store: Store, tabs: Tabs) {
  const held = new Map<string, unknown>()
  const listeners = new Set<() => void>()
  /** Typed before the device had been read. */
  const early = new Map<string, Change[]>()
  const unwritten = new Map<string, unknown>()
  let isWriting = false
  let isRead = false

  const tell = () => listeners.forEach((listen) => listen())

  const ready = store
    .listDrafts()
    .catch(() => [])
    .then((drafts) => {
      for (const [key, draft] of drafts) held.set(key, draft)
      isRead = true
      for (const [key, changes] of early)
        put(
          key,
          changes.reduce((draft, change) => change(draft), held.get(key)),
        )
      early.clear()
      tell()
    })

  tabs.listen('draft', async (key: string) => {
    if (unwritten.has(key)) return
    const draft = await store.findDraft(key)
    if (draft === undefined) held.delete(key)
    else held.set(key, draft)
    tell()
  })

  function put(key: string, draft: unknown): void {
    if (draft === undefined) held.delete(key)
    else held.set(key, draft)
    unwritten.set(key, draft)
    void write()
  }

  /** One transaction at a time, with whatever has been typed until it begins. */
  async function write(): Promise<void> {
    if (isWriting) return
    isWriting = true
    try {
      while (unwritten.size > 0) {
        const drafts = [...unwritten]
        unwritten.clear()
        await store.keepDrafts(drafts)
        for (const [key] of drafts) tabs.tell('draft', key)
      }
    } catch {
      // A full or forbidden store loses the draft at a reload, not what is on the screen.
    } finally {
      isWriting = false
    }
  }

  return {
    ready,
    isRead: () => isRead,
    find: (key: string): unknown => held.get(key),

    onChange(listen: () => void): () => void {
      listeners.add(listen)
      return () => void listeners.delete(listen)
    },

    /** `change` is given what is kept there, or undefined; undefined from it puts the draft away. */
    change(key: string, change: Change): void {
      if (isRead) put(key, change(held.get(key)))
      else {
        early.set(key, [...(early.get(key) ?? []), change])
        held.set(key, change(held.get(key)))
      }
      tell()
    },
  }
}
