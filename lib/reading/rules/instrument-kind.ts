import type { AttributeKey } from '../schema/attributes'

export type InstrumentKind = 'meter' | 'viscometer' | 'balance'

const kinds: Partial<Record<AttributeKey, InstrumentKind>> = {
  ph: 'meter',
  viscosity: 'viscometer',
  mass: 'balance',
}
const names: Record<InstrumentKind, string> = {
  meter: 'a pH meter',
  viscometer: 'a viscometer',
  balance: 'a balance',
}

/** What an attribute is read with; null where none of the lab's instruments is asked for. */
export function instrumentKind(attribute: string): InstrumentKind | null {
  return kinds[attribute as AttributeKey] ?? null
}

/** Why this instrument cannot have read that, as a sentence; null where it can. */
export function wrongInstrument(
  attribute: { attribute: string; label: string },
  { code, kind }: { code: string; kind: string },
): string | null {
  const asked = instrumentKind(attribute.attribute)
  if (asked === null || asked === kind) return null
  return `${attribute.label} is read with ${names[asked]}, and ${code} is ${names[kind as InstrumentKind] ?? kind}. Choose another.`
}
