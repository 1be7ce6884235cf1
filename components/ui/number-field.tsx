'use client'

import { Field, type FieldProps } from './field'
import { readDecimal } from '@/lib/number/rules'

type Props = Omit<FieldProps, 'type' | 'value' | 'onText' | 'onChange' | 'inputMode'> & {
  value: string
  /** The text as typed, and the number in it (null when there is none yet). */
  onText: (text: string, number: number | null) => void
}

/** Keeps the text as it was typed and reads decimal comma and point alike. */
export function NumberField({ value, onText, error, className, ...rest }: Props) {
  const isUnreadable =
    value.trim() !== '' && readDecimal(value) === null && !/^[+\-\u2212]?$/.test(value.trim())
  return (
    <Field
      {...rest}
      type="text"
      inputMode="decimal"
      value={value}
      onText={(text) => onText(text, readDecimal(text))}
      error={error ?? (isUnreadable ? 'Type digits, with one comma or point.' : undefined)}
      className={`text-right ${className ?? ''}`}
    />
  )
}
