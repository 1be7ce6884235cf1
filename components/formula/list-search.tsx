'use client'

import Form from 'next/form'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'

type Props = { action: string; label: string; q: string; kept: Record<string, string>; placeholder: string }

/** A search that lives in the address, so that it can be shared and gone back to. */
export function ListSearch({ action, label, q, kept, placeholder }: Props) {
  return (
    <Form action={action} className="flex max-w-[460px] items-end gap-2" role="search">
      {Object.entries(kept).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <Field
        key={q}
        name="q"
        type="search"
        label={label}
        hideLabel
        defaultValue={q}
        placeholder={placeholder}
        wrap="flex-1"
      />
      <Button type="submit">Find</Button>
    </Form>
  )
}
