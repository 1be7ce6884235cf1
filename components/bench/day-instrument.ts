import type { Slot } from '@/components/bench/draft'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Kind = 'meter' | 'viscometer' | 'balance'

export function instrumentKind(slot: Slot): Kind | null {
  if (slot.kind === 'torque') return 'viscometer'
  if (slot.kind === 'gross') return 'balance'
  return slot.field.attribute === 'ph' ? 'meter' : null
}

const storeKey = (kind: Kind) => `stillstand.instrument.${kind}`

/** The instrument last chosen on this tablet, else the first whose calibration and daily check are good. */
export function dayInstrument(jar: BenchJarPage, slot: Slot): string | null {
  const kind = instrumentKind(slot)
  if (kind === null) return null
  const usable = jar.instruments.filter((i) => i.kind === kind)
  const chosen = typeof localStorage === 'undefined' ? null : localStorage.getItem(storeKey(kind))
  const good = usable.find((i) => !i.isOverdue && i.result === 'good' && !i.hasFailedCheck)
  return (usable.find((i) => i.id === chosen) ?? good ?? usable[0])?.id ?? null
}

export function rememberInstrument(slot: Slot, id: string): void {
  const kind = instrumentKind(slot)
  if (kind !== null) localStorage.setItem(storeKey(kind), id)
}
