'use client'

import { useState } from 'react'
import { Field, type FieldProps } from '@/components/ui/field'

/** A password that can be shown, pasted and kept by the browser. */
export function PasswordField(props: Omit<FieldProps, 'type' | 'end'>) {
  const [isShown, setShown] = useState(false)
  return (
    <Field
      {...props}
      type={isShown ? 'text' : 'password'}
      spellCheck={false}
      autoCapitalize="none"
      maxLength={128}
      end={
        <button
          type="button"
          aria-pressed={isShown}
          aria-label={isShown ? 'Hide the password' : 'Show the password'}
          onClick={() => setShown(!isShown)}
          className="-my-2 min-h-11 shrink-0 text-[length:var(--label-type)] font-600"
        >
          {isShown ? 'hide' : 'show'}
        </button>
      }
    />
  )
}
