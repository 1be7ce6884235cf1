'use client'

import { shortestPassword } from '@/lib/person/rules'
import { PasswordField } from './password-field'

type Props = {
  value: string
  onText: (text: string) => void
  error?: string
  label?: string
  autoFocus?: boolean
}

/** A new password: 12 characters or more, anything goes, and the count is said while typing. */
export function ChoosePassword({ value, onText, error, label = 'New password', autoFocus }: Props) {
  const missing = shortestPassword - [...value].length
  return (
    <PasswordField
      label={label}
      name="newPassword"
      autoComplete="new-password"
      autoFocus={autoFocus}
      value={value}
      onText={onText}
      error={error}
      hint={
        value !== '' && missing > 0
          ? `${missing} more ${missing === 1 ? 'character' : 'characters'}.`
          : `${shortestPassword} characters or more; a sentence is easier to keep than a code.`
      }
    />
  )
}
