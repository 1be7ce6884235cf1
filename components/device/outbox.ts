import { isSignedOut, keep } from '@/components/session/keep'
import { newId } from '@/lib/db/id'
import { ClientError, isPassing } from '@/lib/http/fetcher'
import { versionIn, withVersion } from './conflict'
import type { Drafts } from './drafts'
import {
  laneOf,
  mayGoOut,
  newItem,
  nextToSend,
  type Lane,
  type NewItem,
  type OutboxItem,
} from './outbox-item'
import { oneTabAtATime } from './one-tab'
import { keepCopies } from './photo-copies'
import { postItem } from './post-item'
import type { Store } from './store'
import type { Tabs } from './tabs'
import { makeWaiting, type Outcome } from './waiting'

export type OutboxState = {
  items: readonly OutboxItem[]
  /** Whether the server was reached when it was last asked. */
  isOnline: boolean
  isSignedOut: boolean
  /** Percent of what is on its way, by its id. */
  sending: Readonly<Record<string, number>>
  /** Ids of entries that somebody stands and waits for; they are told there, not among what waits. */
  awaited: readonly string[]
  /** When the server last told what the page shows. */
  asOf: string | null
}
export const emptyOutbox: OutboxState = {
  ...{ items: [], isOnline: true, isSignedOut: false, sending: {}, awaited: [], asOf: null },
}

export type Outbox = ReturnType<typeof makeOutbox>

const lanes: Lane[] = ['entries', 'files']
/** A server that fails so often over one entry, while it answers, will go on failing. */
const mostFaults = 4
/** After each attempt that did not reach; the last one from then on. */
const pausesMs = [2_000, 4_000, 8_000, 16_000, 32_000, 60_000]

/**
 * What is still to be sent: kept on the device before it is sent, sent in the order typed, each once, by one tab at a
 * time, until the server has answered.
 */
export function makeOutbox(personId: string, store: Store, drafts: Drafts, tabs: Tabs) {
  let state = emptyOutbox
  const listeners = new Set<() => void>()
  const sentListeners = new Set<(item: OutboxItem, answer: unknown) => void>()
  const waiting = makeWaiting((awaited) => set({ awaited }))
  const alone = oneTabAtATime(store)
  const copies = keepCopies(store)
  const running = new Map<Lane, Promise<void>>()
  const faults = new Map<string, number>()
  let failures = 0
  let timer: ReturnType<typeof setTimeout> | undefined

  function set(change: Partial<OutboxState>): void {
    state = { ...state, ...change }
    listeners.forEach((listen) => listen())
  }

  async function read(): Promise<void> {
    const items = await store.listItems().catch(() => null)
    if (items) set({ items })
  }

  const ready = read()
  tabs.listen('outbox', () => void read())
  tabs.listen('sent', (text) => {
    const { item, answer } = JSON.parse(text) as { item: OutboxItem; answer: unknown }
    waiting.settle(item.id, { how: 'sent', answer })
    sentListeners.forEach((hear) => hear(item, answer))
  })

  async function changed(): Promise<void> {
    await read()
    tabs.tell('outbox', '')
  }

  /** Sends what may go out, until nothing is left or the server is not reached. */
  function run(lane: Lane): Promise<void> {
    const now = running.get(lane)
    // What was added meanwhile is found by the one that runs.
    if (now) return now
    const run = alone(`stillstand.${personId}.${lane}`, async () => {
      await read()
      for (let item = nextToSend(state.items, lane); item; item = nextToSend(state.items, lane))
        if (!(await sendOne(item))) break
    })
      // The store or its lock failed: looked at again after a pause.
      .catch(() => void (failures += 1))
      .finally(() => {
        running.delete(lane)
        plan()
      })
    running.set(lane, run)
    return run
  }

  function flush(): Promise<unknown> {
    clearTimeout(timer)
    return Promise.all(lanes.map(run))
  }

  /** A longer pause after each attempt that did not reach. */
  function plan(): void {
    clearTimeout(timer)
    if (!lanes.some((lane) => !running.has(lane) && nextToSend(state.items, lane))) return
    if (failures === 0) return void flush()
    askForWaking(personId)
    timer = setTimeout(() => void flush(), pausesMs[Math.min(failures, pausesMs.length) - 1])
  }

  const showProgress = (id: string, percent: number | null) => {
    const { [id]: _, ...others } = state.sending
    set({ sending: percent === null ? others : { ...others, [id]: percent } })
  }

  /** False where what follows must wait as well. */
  async function sendOne(item: OutboxItem): Promise<boolean> {
    const attempt = async () =>
      postItem(await copies.beside(item), personId, (percent) => showProgress(item.id, percent))
    showProgress(item.id, 0)
    try {
      const answer = await (waiting.isAwaited(item.id) ? askingWho(item, attempt) : attempt())
      failures = 0
      faults.delete(item.id)
      set({ isOnline: true, isSignedOut: false })
      await sent(item, answer)
      return true
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      if (isPassing(thrown) && !isHopeless(item, thrown)) {
        failures += 1
        set({ isOnline: thrown.status !== 0, isSignedOut: isSignedOut(thrown) })
        waiting.settleAll((id) => state.items.some((one) => one.id === id && laneOf(one) === laneOf(item)))
        return false
      }
      set({ isOnline: true })
      if (waiting.isAwaited(item.id) || !(await isRebased(item, thrown))) await refused(item, thrown)
      return true
    } finally {
      showProgress(item.id, null)
    }
  }

  /** Whose session ended is asked for the password in place; who leaves that goes on without network, as it were. */
  function askingWho(item: OutboxItem, attempt: () => Promise<unknown>): Promise<unknown> {
    const patiently = () =>
      attempt().catch((thrown: unknown) => {
        if (isSignedOut(thrown)) waiting.holdOn(item.id)
        throw thrown
      })
    const { label, what } = item.about
    return keep(patiently, { what: label, ...(what ? { text: what } : {}) })
  }

  function isHopeless(item: OutboxItem, error: ClientError): boolean {
    if (error.status !== 500) return false
    const times = (faults.get(item.id) ?? 0) + 1
    faults.set(item.id, times)
    return times >= mostFaults
  }

  async function sent(item: OutboxItem, answer: unknown): Promise<void> {
    await store.dropItem(item)
    copies.forget(item.id)
    if (item.draft) {
      const { key, value } = item.draft
      // What was typed on since is a new entry's.
      drafts.change(key, (now) => (JSON.stringify(now) === JSON.stringify(value) ? undefined : now))
    }
    await changed()
    waiting.settle(item.id, { how: 'sent', answer })
    sentListeners.forEach((hear) => hear(item, answer))
    const { copy: _, ...rest } = item
    tabs.tell('sent', JSON.stringify({ item: { ...rest, file: null }, answer }))
  }

  /** Others only had the jar open meanwhile: nothing stands against it, so it goes out at the jar as it is now. */
  async function isRebased(item: OutboxItem, error: ClientError): Promise<boolean> {
    const { state: now, version } = (error.detail ?? {}) as { state?: string; version?: number }
    if (error.code !== 'stale' || now !== 'due' || !version || version === versionIn(item.body)) return false
    await store.changeItem({ ...item, key: newId(), body: withVersion(item.body, version) })
    await changed()
    return true
  }

  /** Beside the form where its author waits for it, else kept until a person decides; a file is kept in any case. */
  async function refused(item: OutboxItem, error: ClientError): Promise<void> {
    if (waiting.isAwaited(item.id) && !item.file) {
      await store.dropItem(item)
      waiting.refuse(item.id, error)
    } else {
      const { status, code, sentence, fields, detail } = error
      await store.changeItem({ ...item, refusal: { status, code, sentence, fields, detail } })
      waiting.settle(item.id, { how: 'kept' })
    }
    await changed()
  }

  return {
    ready,
    readAgain: changed,
    flush: () => {
      failures = 0
      return flush()
    },
    state: () => state,

    onChange(listen: () => void): () => void {
      listeners.add(listen)
      return () => void listeners.delete(listen)
    },

    onSent(hear: (item: OutboxItem, answer: unknown) => void): () => void {
      sentListeners.add(hear)
      return () => void sentListeners.delete(hear)
    },

    /** What another request found out. */
    noteReached(isReached: boolean): void {
      if (isReached !== state.isOnline || (isReached && state.isSignedOut))
        set({ isOnline: isReached, isSignedOut: state.isSignedOut && !isReached })
      if (isReached && failures > 0) {
        failures = 0
        plan()
      }
    },

    noteRead: (at: string) => set({ asOf: at }),

    noteRefused(error: ClientError): void {
      if (isSignedOut(error) && !state.isSignedOut) set({ isSignedOut: true })
      if (error.status === 0) set({ isOnline: false })
    },

    /**
     * 'sent' with the server's answer; 'kept' where it waits on the device. A refusal is thrown, as ClientError, while
     * somebody waits for it. Whatever `replaces` says yes to goes in the same moment.
     */
    async send<T>(
      entry: NewItem,
      replaces: (item: OutboxItem) => boolean = () => false,
    ): Promise<Outcome<T>> {
      const item = newItem(entry)
      const outcome = waiting.await<T>(item.id, item.file !== null)
      await ready
      try {
        await store.addItem(item, state.items.filter(replaces))
      } catch {
        // A full or forbidden store: sent all the same, only not kept for later.
        waiting.drop(item.id)
        const whole = await copies.beside(item)
        copies.forget(item.id)
        return { how: 'sent', answer: (await postItem(whole, personId, () => undefined)) as T }
      }
      await changed()
      void copies.beside(item)
      const isHeld = !mayGoOut(state.items, item)
      if (isHeld || (failures > 0 && !navigator.onLine)) waiting.settle(item.id, { how: 'kept' })
      else void run(laneOf(item))
      return outcome
    },

    /** Sent once more after it was refused, as it is or changed. */
    async sendAgain(item: OutboxItem, change: Partial<Pick<OutboxItem, 'body' | 'url'>> = {}): Promise<void> {
      await store.changeItem({ ...item, ...change, key: newId(), refusal: null })
      await changed()
      void run(laneOf(item))
    },

    async drop(item: OutboxItem): Promise<void> {
      await store.dropItem(item)
      waiting.settle(item.id, { how: 'kept' })
      await changed()
    },
  }
}

/** Where the browser can, it wakes the service worker when the network is back, also with no page open. */
function askForWaking(personId: string): void {
  type WithSync = ServiceWorkerRegistration & { sync?: { register: (tag: string) => Promise<void> } }
  void navigator.serviceWorker?.ready
    .then((registration) => (registration as WithSync).sync?.register(`outbox.${personId}`))
    .catch(() => undefined)
}
