import type { Device } from './device'
import { newItem, type OutboxItem } from './outbox-item'

// Until December 2026 drafts and entries lay in localStorage, all persons' together. They are brought over once, each
// when its author opens the notebook.

type OldJar = { id: string; personId: string; keptAt: string; body: Record<string, unknown> } & {
  url: string
  pullJarId: string
  jarName: string
  code: string
}
type OldEntry = { id: string; personId: string; keptAt: string; body: Record<string, unknown> } & {
  batchCode: string
  kind: 'weighings' | 'steps' | 'fills' | 'readings'
  name: string
}

export async function carryOver(device: Device): Promise<void> {
  try {
    await carryDrafts(device)
    await carryItems<OldJar>(device, 'stillstand.outbox', (old) => ({
      ...newItem({
        id: old.id,
        url: old.url,
        body: old.body,
        about: {
          ...{ kind: 'jar', label: `Jar ${old.jarName}`, code: old.code, pullJarId: old.pullJarId },
          href: `/bench/${old.code}`,
        },
      }),
      keptAt: old.keptAt,
    }))
    await carryItems<OldEntry>(device, 'stillstand.batch-outbox', (old) => ({
      ...newItem({
        id: old.id,
        url: `/api/batches/${encodeURIComponent(old.batchCode)}/${old.kind}`,
        method: old.kind === 'weighings' || old.kind === 'steps' ? 'PUT' : 'POST',
        body: old.body,
        about: { kind: 'batch', label: old.name, batchCode: old.batchCode, list: old.kind },
      }),
      keptAt: old.keptAt,
    }))
  } catch {
    // Where the device keeps nothing, nothing was kept before.
  }
}

async function carryItems<Old extends { personId: string }>(
  { personId, store, outbox }: Device,
  place: string,
  itemOf: (old: Old) => OutboxItem,
): Promise<void> {
  const text = localStorage.getItem(place)
  if (!text) return
  const olds = JSON.parse(text) as Old[]
  for (const old of olds.filter((one) => one.personId === personId)) await store.addItem(itemOf(old), [])
  const others = olds.filter((one) => one.personId !== personId)
  if (others.length > 0) localStorage.setItem(place, JSON.stringify(others))
  else localStorage.removeItem(place)
  await outbox.readAgain()
}

/** "stillstand.draft.PERSON.PULLJAR", "stillstand.batch-draft.[balance.]PERSON[.…]", "stillstand:formula:PERSON:VERSION" */
async function carryDrafts({ personId, store, drafts }: Device): Promise<void> {
  const places = Array.from({ length: localStorage.length }, (_, at) => localStorage.key(at) ?? '')
  const own = places.flatMap((place): { place: string; key: string }[] => {
    const [, kind, rest] = /^stillstand[.:](draft|batch-draft|formula)[.:](.*)$/.exec(place) ?? []
    if (!rest?.includes(personId)) return []
    const key = rest.replace(personId, '').replace(/^[.:]|\.$/, '')
    return [{ place, key: kind === 'draft' ? `jar.${key}` : `${kind === 'formula' ? kind : 'batch'}.${key}` }]
  })
  // Before the device has been read, so that a form that asks then finds it.
  for (const { place, key } of own) {
    const draft: unknown = JSON.parse(localStorage.getItem(place) ?? 'null') ?? undefined
    drafts.change(key, (now) => now ?? draft)
  }
  if (own.length === 0) return
  await drafts.ready
  await store.keepDrafts(own.map(({ key }): [string, unknown] => [key, drafts.find(key)]))
  for (const { place } of own) localStorage.removeItem(place)
}
