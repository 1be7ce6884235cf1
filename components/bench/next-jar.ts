import { settledHere } from '@/components/bench/kept-jars'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import type { Bench } from '@/lib/bench/queries/today'

/** The next jar to read at the same station, then at those after it. */
export function nextJar(bench: Bench, code: string, outbox: OutboxOnScreen) {
  const kept = settledHere(bench, outbox.items)
  const all = bench.stations.flatMap((s) => s.jars)
  const from = all.findIndex((j) => j.code === code)
  const isOpen = (j: (typeof all)[number]) =>
    j.code !== code && !kept.has(j.pullJarId) && (j.state === 'due' || j.isReady)
  return [...all.slice(from + 1), ...all.slice(0, Math.max(0, from))].find(isOpen) ?? null
}
