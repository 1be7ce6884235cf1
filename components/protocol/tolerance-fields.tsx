'use client'

import { useState } from 'react'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import type { Tolerance } from '@/lib/protocol/schema'

type Props = { tolerance: Tolerance; onChange: (tolerance: Tolerance) => void }

const kinds = [
  { value: 'range', label: 'between limits' },
  { value: 'percent', label: '% of the initial' },
  { value: 'shift', label: 'units from the initial' },
]

/** How far an attribute may move: its kind and both limits. */
export function ToleranceFields({ tolerance, onChange }: Props) {
  return (
    <>
      <Select
        label="Tolerance"
        value={tolerance.kind}
        options={kinds}
        onPick={(kind) => onChange(emptyTolerance(kind))}
        wrap="w-[190px]"
      />
      <Limits key={tolerance.kind} tolerance={tolerance} onChange={onChange} />
    </>
  )
}

function emptyTolerance(kind: string): Tolerance {
  if (kind === 'range') return { kind: 'range', upper: 1 }
  return kind === 'percent'
    ? { kind: 'percent', below: 20, above: 20 }
    : { kind: 'shift', below: 0.3, above: 0.3 }
}

/** Two sides, either of which may stay empty: that side is then open. */
function Limits({ tolerance, onChange }: Props) {
  const [low, high] =
    tolerance.kind === 'range' ? [tolerance.lower, tolerance.upper] : [tolerance.below, tolerance.above]
  const [texts, setTexts] = useState({ low: text(low), high: text(high) })
  const names = tolerance.kind === 'range' ? ['from', 'to'] : ['below', 'above']

  function write(side: 'low' | 'high', typed: string, number: number | null) {
    setTexts((before) => ({ ...before, [side]: typed }))
    if (number === null && typed.trim() !== '') return
    const value = number ?? undefined
    const sides = { low, high, [side]: value }
    onChange(
      tolerance.kind === 'range'
        ? { kind: 'range', ...given('lower', sides.low), ...given('upper', sides.high) }
        : { kind: tolerance.kind, ...given('below', sides.low), ...given('above', sides.high) },
    )
  }

  return (
    <>
      <NumberField
        label={names[0]}
        value={texts.low}
        onText={(typed, number) => write('low', typed, number)}
        wrap="w-[90px]"
      />
      <NumberField
        label={names[1]}
        value={texts.high}
        onText={(typed, number) => write('high', typed, number)}
        wrap="w-[90px]"
      />
    </>
  )
}

function text(value: number | undefined): string {
  return value === undefined ? '' : String(value)
}

function given<K extends string>(key: K, value: number | undefined): { [P in K]?: number } {
  return value === undefined ? {} : ({ [key]: value } as { [P in K]?: number })
}
