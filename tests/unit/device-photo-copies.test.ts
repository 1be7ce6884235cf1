import { readFileSync } from 'node:fs'
import { runInNewContext } from 'node:vm'
import { expect, it, vi } from 'vitest'
import { newItem, type OutboxItem } from '@/components/device/outbox-item'
import { keepCopies } from '@/components/device/photo-copies'
import { photoKeys } from '@/lib/photo/keys'

const photo = (url: string = photoKeys.add): OutboxItem => ({
  ...newItem({
    url,
    body: { note: 'a' },
    about: { kind: 'photo', label: 'Photo' },
    file: new Blob(['whole']),
  }),
  place: 1,
})

it('makes the copy of a photo once, keeps it beside the photo, and none of anything else', async () => {
  const kept: [string, Blob][] = []
  let made = 0
  const copies = keepCopies(
    { keepCopy: async (id, copy) => void kept.push([id, copy]) },
    async () => new Blob([`copy ${(made += 1)}`]),
  )
  const item = photo()
  const [first, again] = await Promise.all([copies.beside(item), copies.beside(item)])
  expect([made, await first.copy!.text(), again.copy]).toEqual([1, 'copy 1', first.copy])
  expect(kept).toEqual([[item.id, first.copy]])
  expect(await copies.beside(first)).toEqual(first)
  expect((await copies.beside(photo('/api/batches/B-1/photos'))).copy).toBeUndefined()
  expect((await copies.beside({ ...photo(), file: null })).copy).toBeUndefined()
  expect(made).toBe(1)
})

it('sends a photo without a copy where the browser comes to no end with it', async () => {
  vi.useFakeTimers()
  const stuck = keepCopies({ keepCopy: async () => undefined }, () => new Promise(() => undefined))
  const both = Promise.all([stuck.beside(photo()), stuck.beside(photo())])
  await vi.advanceTimersByTimeAsync(60_000)
  expect((await both).map((item) => item.copy)).toEqual([undefined, undefined])
  vi.useRealTimers()
})

it('sends a photo without a copy where none can be made, and with one that the device has no room for', async () => {
  const none = keepCopies({ keepCopy: async () => undefined }, async () => null)
  expect((await none.beside(photo())).copy).toBeUndefined()
  const full = keepCopies({ keepCopy: () => Promise.reject(new Error('full')) }, async () => new Blob(['c']))
  expect(await (await full.beside(photo())).copy!.text()).toBe('c')
})

/** public/sw.js as a browser wakes it: no page open, these entries waiting; gives the forms that it sends. */
async function sentByWorker(items: OutboxItem[]): Promise<FormData[]> {
  const forms: FormData[] = []
  const hearers = new Map<string, (event: unknown) => void>()
  /** Answers as IndexedDB does: later, through onsuccess. */
  const asked = (result: unknown) => {
    const request: { result: unknown; onsuccess?: () => void } = { result }
    setTimeout(() => request.onsuccess?.())
    return request
  }
  const rows = { getAll: () => asked(items), delete: () => asked(undefined), get: () => asked(undefined) }
  const database = { transaction: () => ({ objectStore: () => rows }), close: () => undefined }
  const self = {
    location: { href: 'http://lab.example/sw.js?build=1', origin: 'http://lab.example' },
    addEventListener: (name: string, hear: (event: unknown) => void) => hearers.set(name, hear),
    clients: { matchAll: async () => [] },
    navigator: { locks: { request: (_: string, work: () => Promise<void>) => work() } },
  }
  runInNewContext(readFileSync('public/sw.js', 'utf8'), {
    ...{ self, URL, FormData, setTimeout, clearTimeout },
    indexedDB: { open: () => asked(database) },
    fetch: async (_: string, { body }: { body: FormData }) => {
      forms.push(body)
      return new Response('{}', { status: 200 })
    },
  })
  await new Promise((resolve) =>
    hearers.get('sync')!({ tag: 'outbox.me', waitUntil: (work: Promise<void>) => void work.then(resolve) }),
  )
  return forms
}

it('the service worker sends a photo with the copy that lies beside it, and alone where none does', async () => {
  const [withCopy, alone] = await sentByWorker([{ ...photo(), copy: new Blob(['copy']) }, photo()])
  expect(await (withCopy!.get('file') as File).text()).toBe('whole')
  expect(await (withCopy!.get('copy') as File).text()).toBe('copy')
  expect((withCopy!.get('copy') as File).name).toBe('copy.jpg')
  expect([...alone!.keys()]).toEqual(['note', 'file'])
})
