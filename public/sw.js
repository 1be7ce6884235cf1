// Keeps the application's own files and one page without data, so that the Bench opens without network. Its data lie in
// IndexedDB (components/device/store.ts); answers of the API and pages with data are never kept here.

const build = new URL(self.location.href).searchParams.get('build') ?? '0'
const cacheName = `stillstand-${build}`
const shell = '/shell'
/** A network that says nothing for so long counts as away. */
const patienceMs = 8_000

self.addEventListener('install', (event) => {
  event.waitUntil(keepShell().then(() => self.skipWaiting()))
})

self.addEventListener('activate', (event) => {
  event.waitUntil(dropOldCaches().then(() => self.clients.claim()))
})

self.addEventListener('fetch', (event) => {
  const { request } = event
  const url = new URL(request.url)
  if (request.method !== 'GET' || url.origin !== self.location.origin) return
  if (request.mode === 'navigate' && !/^\/(api|sign-in)(\/|$)/.test(url.pathname))
    event.respondWith(open(request))
  else if (isOwnFile(url.pathname)) event.respondWith(fromCache(request))
})

self.addEventListener('sync', (event) => {
  if (event.tag.startsWith('outbox.')) event.waitUntil(sendWaiting(event.tag.slice('outbox.'.length)))
})

/** Files whose name changes with their content, and the mark. */
const isOwnFile = (path) => path.startsWith('/_next/static/') || path === '/mark.svg'

async function keepShell() {
  const cache = await caches.open(cacheName)
  const answer = await fetch(shell, { credentials: 'omit', cache: 'reload' })
  if (!answer.ok) throw new Error('The shell page did not come.')
  const files = filesIn(await answer.clone().text())
  const known = new Set(files)
  await Promise.all([...files, '/mark.svg'].map((file) => keepFile(cache, file, known)))
  // Last: where a file is missing there is no shell either. Its own headers go along, with the nonce of its scripts.
  await cache.put(shell, answer)
}

/** A file and whatever it names: a script what it loads later, a style its fonts. */
async function keepFile(cache, address, known) {
  const answer = await fetch(address)
  if (!answer.ok) throw new Error(`${address} did not come.`)
  await cache.put(address, answer.clone())
  if (!/\.(css|js)$/.test(address)) return
  const more = filesIn(await answer.text()).filter((file) => !known.has(file))
  more.forEach((file) => known.add(file))
  await Promise.all(more.map((file) => keepFile(cache, file, known)))
}

/** Scripts name others without the folder's own prefix, styles their fonts from where they lie. */
const filesIn = (text) => [
  ...new Set(
    [...text.matchAll(/(?:static\/(?:chunks|media)|\.\.\/media)\/[\w.~-]+\.\w+/g)].map(([name]) =>
      name.replace(/^(?:static|\.\.)\//, '/_next/static/'),
    ),
  ),
]

/** The build before stays until the next one: a page that is still open may want its files. */
async function dropOldCaches() {
  const own = (await caches.keys()).filter((name) => name.startsWith('stillstand-')).sort()
  await Promise.all(
    own
      .filter((name) => name !== cacheName)
      .slice(0, -1)
      .map((name) => caches.delete(name)),
  )
}

async function fromCache(request) {
  const kept = await caches.match(request, { ignoreVary: true })
  if (kept) return kept
  const answer = await fetch(request)
  if (answer.ok) {
    const copy = answer.clone()
    void caches.open(cacheName).then((cache) => cache.put(request, copy))
  }
  return answer
}

async function open(request) {
  const kept = await caches.open(cacheName).then((cache) => cache.match(shell, { ignoreVary: true }))
  if (!kept) return fetch(request)
  let timer
  const late = new Promise((resolve) => {
    timer = setTimeout(() => resolve(null), patienceMs)
  })
  try {
    const answer = await Promise.race([fetch(request), late])
    // A proxy that stands before a server which restarts.
    return !answer || [502, 503, 504].includes(answer.status) ? kept : answer
  } catch {
    return kept
  } finally {
    clearTimeout(timer)
  }
}

/** The browser found the network again: an open page sends; where none is open, this does, in the same order. */
async function sendWaiting(personId) {
  const pages = await self.clients.matchAll({ type: 'window' })
  if (pages.length > 0) return pages.forEach((page) => page.postMessage('send'))
  await self.navigator.locks.request(`stillstand.${personId}.entries`, async () => {
    await self.navigator.locks.request(`stillstand.${personId}.files`, () => sendAll(personId))
  })
}

async function sendAll(personId) {
  const database = await asPromise(indexedDB.open(`stillstand.${personId}`))
  try {
    const items = await asPromise(database.transaction('outbox').objectStore('outbox').getAll())
    const held = new Set(items.filter((one) => one.refusal && !one.file).map(subjectOf))
    for (const item of items) {
      if (item.refusal || (!item.file && held.has(subjectOf(item)))) continue
      const answer = await post(item, personId)
      // What is not taken is left to a page, where a person decides.
      if (answer.status === 401 || answer.status === 429 || answer.status >= 500) return
      if (answer.ok) await putAway(database, item)
      else if (!item.file) held.add(subjectOf(item))
    }
  } finally {
    database.close()
  }
}

/** Sent: it waits no longer, and what stood in its form goes where nothing was typed since. */
async function putAway(database, { place, draft }) {
  const change = database.transaction(['outbox', 'drafts'], 'readwrite', { durability: 'strict' })
  await asPromise(change.objectStore('outbox').delete(place))
  if (!draft) return
  const drafts = change.objectStore('drafts')
  const now = await asPromise(drafts.get(draft.key))
  if (JSON.stringify(now) === JSON.stringify(draft.value)) await asPromise(drafts.delete(draft.key))
}

const subjectOf = ({ about, id }) => about.subject ?? about.pullJarId ?? id

function post(item, personId) {
  const isTimed = 'claimedAt' in item.body || 'deviceNow' in item.body
  const body = isTimed ? { ...item.body, deviceNow: new Date().toISOString() } : item.body
  const headers = { accept: 'application/json', 'idempotency-key': item.key, 'stillstand-person': personId }
  if (!item.file) {
    headers['content-type'] = 'application/json'
    return fetch(item.url, { method: item.method, headers, body: JSON.stringify(body) })
  }
  const form = new FormData()
  for (const [name, value] of Object.entries(body)) form.append(name, String(value))
  form.append('file', item.file, item.file.name ?? 'photo')
  // Made by the page that kept the photo, where it came to it.
  if (item.copy) form.append('copy', item.copy, 'copy.jpg')
  return fetch(item.url, { method: item.method, headers, body: form })
}

const asPromise = (request) =>
  new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result)
    request.onerror = () => reject(request.error)
  })
