'use client'

import Form from 'next/form'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'

type Props = {
  code: string
  from?: number
  to?: number
  /** Code of the other formula; empty for two versions of this one. */
  other: string
  numbers?: number[]
  otherNumbers?: number[]
}

/** Which two versions: they live in the address, so that the page can be shared. */
export function DifferencePick({ code, from, to, other, numbers = [], otherNumbers = [] }: Props) {
  return (
    <Form
      action={`/formulas/${encodeURIComponent(code)}/difference`}
      className="flex flex-wrap items-end gap-x-3 gap-y-2"
    >
      {numbers.length ? (
        <Versions name="from" label={`From, of ${code}`} value={from} numbers={numbers} />
      ) : null}
      {otherNumbers.length ? (
        <Versions name="to" label={`To, of ${other || code}`} value={to} numbers={otherNumbers} />
      ) : null}
      <Field name="with" label="Of another formula" defaultValue={other} placeholder="its code" wrap="w-40" />
      <Button type="submit">Put side by side</Button>
    </Form>
  )
}

type VersionsProps = { name: string; label: string; value?: number; numbers: number[] }

function Versions({ name, label, value, numbers }: VersionsProps) {
  return (
    <Select
      name={name}
      label={label}
      defaultValue={value === undefined ? undefined : String(value)}
      options={numbers.map((number) => ({ value: String(number), label: `version ${number}` }))}
      wrap="w-44"
    />
  )
}
