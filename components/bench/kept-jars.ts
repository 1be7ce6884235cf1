import type { OutboxItem } from '@/components/device/outbox-item'

/** The readings of a jar that are still only on this device and close it. */
export function isKeptJar(item: OutboxItem): boolean {
  return item.about.kind === 'jar' && item.body['isPartial'] !== true
}

/** The attributes of a jar that were read one at a time and are still only on this device. */
export function partsKept(items: readonly OutboxItem[], pullJarId: string): string[] {
  return items
    .filter((item) => item.about.pullJarId === pullJarId && item.body['isPartial'] === true)
    .flatMap((item) => (item.body['readings'] as { attribute: string }[]).map((one) => one.attribute))
}

export function codesKept(items: readonly OutboxItem[]): Set<string> {
  return new Set(items.filter(isKeptJar).flatMap(({ about }) => (about.code ? [about.code] : [])))
}
