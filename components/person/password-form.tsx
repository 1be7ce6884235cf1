'use client'

import { useState, type FormEvent } from 'react'
import { ChoosePassword } from '@/components/session/choose-password'
import { PasswordField } from '@/components/session/password-field'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { ClientError, send } from '@/lib/http/fetcher'

export function PasswordForm({ email }: { email: string }) {
  const [current, setCurrent] = useState('')
  const [next, setNext] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const fields = error instanceof ClientError ? error.fields : {}

  async function change(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      await send('/api/me/password', 'POST', { current, next })
      setCurrent('')
      setNext('')
      toast('The password is changed; every other place is signed out')
    } catch (thrown) {
      setError(thrown)
    } finally {
      setSending(false)
    }
  }

  return (
    <form method="post" onSubmit={change} noValidate className="flex flex-col gap-4">
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <PasswordField
        label="The password you have now"
        name="current"
        autoComplete="current-password"
        value={current}
        onText={setCurrent}
        error={fields['current']}
      />
      <ChoosePassword value={next} onText={setNext} error={fields['next']} />
      <ErrorNote error={Object.keys(fields).length > 0 ? null : error} />
      <Button type="submit" kind="primary" busy={isSending} className="self-start">
        Change it
      </Button>
    </form>
  )
}
