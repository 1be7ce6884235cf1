'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { ClientError, send } from '@/lib/http/fetcher'
import { ChoosePassword } from './choose-password'

type Props = { kind: 'invitation' | 'reset'; token: string; email: string }

const sending = {
  invitation: { url: '/api/invitations', method: 'POST' },
  reset: { url: '/api/resets', method: 'PUT' },
} as const

/** For whoever holds the link of an invitation or a reset: a new password, then straight in. */
export function TokenPasswordForm({ kind, token, email }: Props) {
  const [password, setPassword] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)

  async function set(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      await send(sending[kind].url, sending[kind].method, { token, password })
      window.location.assign('/')
    } catch (thrown) {
      setError(thrown)
      setSending(false)
    }
  }

  return (
    <form method="post" onSubmit={set} noValidate className="flex flex-col gap-4">
      {/* Password managers keep the new password under this address. */}
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <ChoosePassword
        value={password}
        onText={setPassword}
        autoFocus
        error={error instanceof ClientError ? error.fields['password'] : undefined}
      />
      <ErrorNote error={error} />
      <Button type="submit" kind="primary" busy={isSending} className="self-start">
        Set it and go in
      </Button>
    </form>
  )
}
