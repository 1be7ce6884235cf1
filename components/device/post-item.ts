import { readAnswer, send, unreachable } from '@/lib/http/fetcher'
import { percentOf } from '@/lib/science/percent'
import type { OutboxItem } from './outbox-item'

/** A request that hears nothing for so long is sent again later. */
const patienceMs = 20_000
/** An upload that does not move for so long has broken off. */
const stalledMs = 45_000

/** One attempt. The device's time is set anew in it, because the server corrects by it. */
export function postItem(
  item: OutboxItem,
  personId: string,
  onProgress: (percent: number) => void,
): Promise<unknown> {
  const isTimed = 'claimedAt' in item.body || 'deviceNow' in item.body
  const body = isTimed ? { ...item.body, deviceNow: new Date().toISOString() } : item.body
  if (item.file) return postFile({ ...item, body }, item.file, personId, onProgress)
  return send(item.url, item.method, body, {
    key: item.key,
    personId,
    signal: AbortSignal.timeout(patienceMs),
  })
}

/** As a form, from its start at each attempt; fetch tells nothing of how far it is. */
function postFile(
  item: OutboxItem,
  file: Blob,
  personId: string,
  onProgress: (percent: number) => void,
): Promise<unknown> {
  const form = new FormData()
  for (const [name, value] of Object.entries(item.body)) form.append(name, String(value))
  form.append('file', file, file instanceof File ? file.name : 'photo')
  if (item.copy) form.append('copy', item.copy, 'copy.jpg')
  return new Promise<unknown>((resolve, reject) => {
    const request = new XMLHttpRequest()
    let stalled = setTimeout(() => request.abort(), stalledMs)
    const moved = () => {
      clearTimeout(stalled)
      stalled = setTimeout(() => request.abort(), stalledMs)
    }
    request.open(item.method, item.url)
    request.setRequestHeader('accept', 'application/json')
    request.setRequestHeader('idempotency-key', item.key)
    request.setRequestHeader('stillstand-person', personId)
    request.upload.onprogress = (event) => {
      moved()
      onProgress(event.total > 0 ? Math.floor(percentOf(event.loaded, event.total)) : 0)
    }
    request.onloadend = () => {
      clearTimeout(stalled)
      if (request.status === 0) return reject(unreachable())
      readAnswer(new Response(request.responseText, { status: request.status })).then(resolve, reject)
    }
    request.send(form)
  })
}
