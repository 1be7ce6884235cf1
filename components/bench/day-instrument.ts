import type { Slot } from '@/components/bench/draft'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Kind = 'meter' | 'viscometer' | 'balance'

/** By kind; kept on the device for the person, beside what is being typed. */
export type ChosenInstruments = { [kind in Kind]?: string }

export function instrumentKind(slot: Slot): Kind | null {
  if (slot.kind === 'torque') return 'viscometer'
  if (slot.kind === 'gross') return 'balance'
  return slot.field.attribute === 'ph' ? 'meter' : null
}

/** The instrument that this person chose last, else the first whose calibration and daily check are good. */
export function dayInstrument(jar: BenchJarPage, slot: Slot, chosen: ChosenInstruments): string | null {
  const kind = instrumentKind(slot)
  if (kind === null) return null
  const usable = jar.instruments.filter((i) => i.kind === kind)
  const good = usable.find((i) => !i.isOverdue && i.result === 'good' && !i.hasFailedCheck)
  return (usable.find((i) => i.id === chosen[kind]) ?? good ?? usable[0])?.id ?? null
}
