import type { Slot } from '@/components/bench/draft'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { instrumentKind, type InstrumentKind } from '@/lib/reading/rules/instrument-kind'

/** By kind; kept on the device for the person, beside what is being typed. */
export type ChosenInstruments = { [kind in InstrumentKind]?: string }

/** The instrument that this person chose last, else the first whose calibration and daily check are good. */
export function dayInstrument(jar: BenchJarPage, slot: Slot, chosen: ChosenInstruments): string | null {
  const kind = instrumentKind(slot.field.attribute)
  if (kind === null) return null
  const usable = jar.instruments.filter((i) => i.kind === kind)
  const good = usable.find((i) => !i.isOverdue && i.result === 'good' && !i.hasFailedCheck)
  return (usable.find((i) => i.id === chosen[kind]) ?? good ?? usable[0])?.id ?? null
}
