import { afterEach, expect, it, vi } from 'vitest'
import { atNewVersion, confirmed, versionIn } from '@/components/device/conflict'
import { newItem, type OutboxItem, type Refusal } from '@/components/device/outbox-item'
import { postItem } from '@/components/device/post-item'

const about = { kind: 'temperature', label: 'Oven 3' } as const
const refused = (code: string, detail: unknown, fields = {}): Refusal => ({
  ...{ status: 409, code, sentence: '', fields, detail },
})
const itemOf = (body: OutboxItem['body'], refusal: Refusal | null = null): OutboxItem => ({
  ...newItem({ url: '/api/x', body, about }),
  refusal,
})

afterEach(() => vi.unstubAllGlobals())

/** Bodies as they went out. */
async function sent(body: OutboxItem['body']): Promise<Record<string, unknown>> {
  const bodies: string[] = []
  vi.stubGlobal('fetch', async (_url: string, { body: text }: { body: string }) => {
    bodies.push(text)
    return new Response('{}', { headers: { 'content-type': 'application/json' } })
  })
  await postItem(itemOf(body), 'somebody', () => undefined)
  return JSON.parse(bodies[0]!) as Record<string, unknown>
}

it("the device's time is that of the attempt, so that what waited keeps the time it was read at", async () => {
  const typedAt = '2026-12-02T06:00:00.000Z'
  const temperature = { readings: [{ id: '1', measuredAt: typedAt, temperatureC: 45 }], deviceNow: typedAt }
  const out = await sent(temperature)
  expect(Date.parse(out['deviceNow'] as string)).toBeGreaterThan(Date.now() - 60_000)
  expect(out['readings']).toEqual(temperature.readings)
  const jar = await sent({ claimedAt: typedAt, deviceNow: typedAt })
  expect(jar['claimedAt']).toBe(typedAt)
  expect(Date.parse(jar['deviceNow'] as string)).toBeGreaterThan(Date.now() - 60_000)
  expect(await sent({ version: 1 })).toEqual({ version: 1 })
})

it('a question of the server about a half of a cycle or a daily check is answered by its author’s yes', () => {
  const half = itemOf({ press: 'end', isConfirmed: false }, refused('confirm', { shortfalls: ['short'] }))
  expect(confirmed(half)).toEqual({ press: 'end', isConfirmed: true })
  const jar = itemOf({ readings: [{ typed: '9' }] }, refused('confirm', {}, { 'missing.look': 'Read it.' }))
  expect(confirmed(jar)).toEqual({ readings: [{ typed: '9', isConfirmed: true }], leaveOut: ['look'] })
})

it('what happened to a jar goes out again at the version the jar has now', () => {
  const pull = { pullJarId: 'p', version: 1 }
  const broken = itemOf({ kind: 'broken', pull }, refused('stale', { version: 2, state: 'due' }))
  const again = atNewVersion(broken)!
  expect(again).toEqual({ kind: 'broken', pull: { ...pull, version: 2 } })
  expect(versionIn(again)).toBe(2)
  const jar = itemOf({ version: 1, readings: [] }, refused('stale', { version: 3, state: 'due' }))
  expect(atNewVersion(jar)).toEqual({ version: 3, readings: [] })
})
