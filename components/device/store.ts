import { openDB, type DBSchema, type IDBPDatabase } from 'idb'
import type { OutboxItem } from './outbox-item'

/** What this device keeps for one person. Another person's is another database, which nobody else's page opens. */
interface Tables extends DBSchema {
  /** What is being typed. */
  drafts: { key: string; value: unknown }
  /** What is still to be sent, under its place in the order in which it was typed. */
  outbox: { key: number; value: OutboxItem }
  /** What the server said, for when the network is away. */
  days: { key: string; value: KeptData }
  /** Which tab sends, where the browser has no locks of its own. */
  leases: { key: string; value: { tab: string; until: number } }
}
export type KeptData = { readAt: string; data: unknown }

type Table = 'drafts' | 'outbox' | 'days' | 'leases'
export type Store = ReturnType<typeof openStore>

/** The service worker opens it too: public/sw.js knows this name and version. */
export const databaseOf = (personId: string) => `stillstand.${personId}`

/** Opened at its first use, and again where the browser closed it. */
export function openStore(personId: string) {
  let opened: Promise<IDBPDatabase<Tables>> | null = null

  function open(): Promise<IDBPDatabase<Tables>> {
    opened ??= openDB<Tables>(databaseOf(personId), 1, {
      upgrade(database) {
        for (const table of ['drafts', 'days', 'leases'] as const) database.createObjectStore(table)
        database.createObjectStore('outbox', { keyPath: 'place', autoIncrement: true })
      },
      // A newer version of the application wants it in another tab.
      blocking: () => void opened?.then((database) => database.close()).finally(() => (opened = null)),
      terminated: () => (opened = null),
    }).catch((failed: unknown) => {
      opened = null
      throw failed
    })
    return opened
  }

  async function change(table: Table) {
    const transaction = (await open()).transaction(table, 'readwrite', { durability: 'strict' })
    return { transaction, rows: transaction.store }
  }

  return {
    async listItems(): Promise<OutboxItem[]> {
      return (await open()).getAll('outbox')
    },

    /** Put at the end, in place of those that it replaces, at once. */
    async addItem(item: OutboxItem, replaced: readonly OutboxItem[]): Promise<void> {
      const { transaction } = await change('outbox')
      const rows = transaction.objectStore('outbox')
      await Promise.all([
        ...replaced.map(({ place }) => rows.delete(place!)),
        rows.add(item),
        transaction.done,
      ])
    },

    /** Only where it still waits: another tab may have sent it. */
    async changeItem(item: OutboxItem): Promise<void> {
      const { transaction } = await change('outbox')
      const rows = transaction.objectStore('outbox')
      const now = await rows.get(item.place!)
      if (now) await rows.put(now.copy ? { copy: now.copy, ...item } : item)
      await transaction.done
    },

    /** Beside its photo, where that still waits. */
    async keepCopy(id: string, copy: Blob): Promise<void> {
      const { transaction } = await change('outbox')
      const rows = transaction.objectStore('outbox')
      const now = (await rows.getAll()).find((one) => one.id === id)
      if (now) await rows.put({ ...now, copy })
      await transaction.done
    },

    async dropItem(item: OutboxItem): Promise<void> {
      const { transaction } = await change('outbox')
      await Promise.all([transaction.objectStore('outbox').delete(item.place!), transaction.done])
    },

    async listDrafts(): Promise<[string, unknown][]> {
      const rows = (await open()).transaction('drafts').store
      const [keys, values] = await Promise.all([rows.getAllKeys(), rows.getAll()])
      return keys.map((key, at) => [key, values[at]])
    },

    async findDraft(key: string): Promise<unknown> {
      return (await open()).get('drafts', key)
    },

    /** Several at once; one that is undefined goes. */
    async keepDrafts(drafts: readonly [string, unknown][]): Promise<void> {
      const { transaction } = await change('drafts')
      const rows = transaction.objectStore('drafts')
      await Promise.all([
        ...drafts.map(([key, draft]) => (draft === undefined ? rows.delete(key) : rows.put(draft, key))),
        transaction.done,
      ])
    },

    async findData(key: string): Promise<KeptData | undefined> {
      return (await open()).get('days', key)
    },

    async keepData(key: string, kept: KeptData): Promise<void> {
      await (await open()).put('days', kept, key)
    },

    /** Pictures lie under their addresses: those of others go; gives which of these are still to be fetched. */
    async keepPicturesOf(addresses: readonly string[]): Promise<string[]> {
      const { transaction } = await change('days')
      const rows = transaction.objectStore('days')
      const kept = (await rows.getAllKeys()).filter((key) => key.startsWith('/'))
      await Promise.all(kept.filter((key) => !addresses.includes(key)).map((key) => rows.delete(key)))
      await transaction.done
      return addresses.filter((address) => !kept.includes(address))
    },

    /** What was read goes, what was typed stays. */
    async dropData(): Promise<void> {
      await (await open()).clear('days')
    },

    /** Whether this tab may send for the next while. */
    async takeLease(name: string, tab: string, forMs: number): Promise<boolean> {
      const { transaction } = await change('leases')
      const rows = transaction.objectStore('leases')
      const lease = await rows.get(name)
      const isFree = !lease || lease.tab === tab || lease.until < Date.now()
      if (isFree) await rows.put({ tab, until: Date.now() + forMs }, name)
      await transaction.done
      return isFree
    },

    async endLease(name: string): Promise<void> {
      await (await open()).delete('leases', name)
    },
  }
}
