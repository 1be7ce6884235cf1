import { attributeName, type AttributeKey } from '@/lib/reading/schema/attributes'
import type { OutboxItem, Refusal } from './outbox-item'

type Read = { attribute: AttributeKey; typed: string; word?: string | null }

/** What was typed here, a line a reading; else what the entry says of itself. */
export function mineOf(item: OutboxItem): string[] {
  const readings = item.body['readings'] as Read[] | undefined
  if (readings) return readings.map(lineOf)
  return [item.about.what ?? item.about.label]
}

/** What the server has instead, as its refusal tells it. */
export function theirsOf({ detail }: Refusal): { by: string; lines: string[] } | null {
  const on = (detail ?? {}) as {
    by?: string | { name: string }
    readings?: Read[]
    missedReason?: string
    lines?: string[]
    openedBy?: { name: string } | null
  }
  const by = typeof on.by === 'string' ? on.by : (on.by?.name ?? on.openedBy?.name)
  if (!by) return null
  if (on.readings) return { by, lines: on.readings.map(lineOf) }
  if (on.lines) return { by, lines: on.lines }
  if (on.missedReason) return { by, lines: [`not read: ${on.missedReason}`] }
  return { by, lines: [on.openedBy ? 'has it open or took it out' : 'has read it'] }
}

const lineOf = ({ attribute, word, typed }: Read) => `${attributeName(attribute)} ${word ?? typed}`

/** The same entry with what its author answers to a question of the server. */
export function confirmed(item: OutboxItem): OutboxItem['body'] {
  const readings = (item.body['readings'] as Read[] | undefined)?.map((one) => ({
    ...one,
    isConfirmed: true,
  }))
  if (!readings) return { ...item.body, isConfirmed: true }
  const missing = Object.keys(item.refusal?.fields ?? {}).flatMap((field) =>
    field.startsWith('missing.') ? [field.slice('missing.'.length)] : [],
  )
  return { ...item.body, readings, leaveOut: missing }
}

/** The same entry beside the other person's, and which counts. */
export function decided(item: OutboxItem, count: 'mine' | 'theirs', reason: string): OutboxItem['body'] {
  const { version } = item.refusal?.detail as { version: number }
  return { ...item.body, version, resolution: { count, reason } }
}

/** The same entry at the thing as it is now. */
export function atNewVersion(item: OutboxItem): OutboxItem['body'] | null {
  const { version } = (item.refusal?.detail ?? {}) as { version?: number }
  return version === undefined ? null : withVersion(item.body, version)
}

/** What happened to a jar names the pull as it was shown; all else is about the thing itself. */
export function withVersion(body: OutboxItem['body'], version: number): OutboxItem['body'] {
  const pull = body['pull'] as { version: number } | null | undefined
  return pull ? { ...body, pull: { ...pull, version } } : { ...body, version }
}

export function versionIn(body: OutboxItem['body']): unknown {
  const pull = body['pull'] as { version: number } | null | undefined
  return pull ? pull.version : body['version']
}
