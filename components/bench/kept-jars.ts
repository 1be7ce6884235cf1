import type { OutboxItem } from '@/components/device/outbox-item'

/** The readings of a jar that are still only on this device. */
export function isKeptJar(item: OutboxItem): boolean {
  return item.about.kind === 'jar'
}

export function codesKept(items: readonly OutboxItem[]): Set<string> {
  return new Set(items.filter(isKeptJar).flatMap(({ about }) => (about.code ? [about.code] : [])))
}
