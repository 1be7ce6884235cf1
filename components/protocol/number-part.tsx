'use client'

import { useState } from 'react'
import { NumberField } from '@/components/ui/number-field'
import { readDecimal } from '@/lib/number/rules'

/** Keeps the text while it is typed; hands on only what is a number. */
export function NumberPart({
  label,
  value,
  onNumber,
  error,
  wrap = 'w-[110px]',
}: {
  label: string
  value: number
  onNumber: (value: number) => void
  error?: string
  wrap?: string
}) {
  const [text, setText] = useState(String(value))
  return (
    <NumberField
      label={label}
      value={readDecimal(text) === value || text === '' || readDecimal(text) === null ? text : String(value)}
      onText={(typed, number) => {
        setText(typed)
        if (number !== null) onNumber(number)
      }}
      error={error}
      wrap={wrap}
    />
  )
}
