import type { OutboxItem } from '@/components/device/outbox-item'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { Bench } from '@/lib/bench/queries/today'

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

/** Whether what waits on this device is all that is asked of a jar in this pull: what is read of it, or why nothing is. */
export function isSettledHere(
  items: readonly OutboxItem[],
  { pullJarId, fields, read }: Pick<BenchJar, 'pullJarId' | 'fields' | 'read'>,
): boolean {
  const parts = [...read, ...partsKept(items, pullJarId)]
  if (fields.length > 0 && fields.every((field) => parts.includes(field.attribute))) return true
  return items.some((item) => item.about.pullJarId === pullJarId && (isKeptJar(item) || isMishap(item)))
}

function isMishap({ about, body }: OutboxItem): boolean {
  return about.kind === 'missed' && typeof body['kind'] === 'string' && body['kind'] !== 'pulled early'
}

/** The jars in their pulls that are settled by what waits on this device. */
export function settledHere(bench: Bench, items: readonly OutboxItem[]): Set<string> {
  const jars = bench.stations.flatMap((station) => station.jars)
  return new Set(jars.filter((jar) => isSettledHere(items, jar)).map((jar) => jar.pullJarId))
}
