'use client'

import Link from 'next/link'
import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { ClientError, send } from '@/lib/http/fetcher'
import { PasswordField } from './password-field'

export function SignInForm({ to }: { to: string }) {
  const [email, setEmail] = useState('')
  const [password, setPassword] = useState('')
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const fields = error instanceof ClientError ? error.fields : {}

  async function signIn(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      await send('/api/session', 'POST', { email, password })
      window.location.assign(to)
    } catch (thrown) {
      setError(thrown)
      setSending(false)
    }
  }

  return (
    <form
      method="post"
      onSubmit={signIn}
      noValidate
      className="flex flex-col gap-4 [--control-type:1.0625rem] [--control:54px] [--label-type:1.0625rem] sm:[--control:44px] sm:[--label-type:0.9375rem]"
    >
      <Field
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        autoFocus
        value={email}
        onText={setEmail}
        error={fields['email']}
      />
      <PasswordField
        label="Password"
        name="password"
        autoComplete="current-password"
        value={password}
        onText={setPassword}
        error={fields['password']}
        aside={
          <Link
            href="/reset"
            className="relative text-[length:var(--label-type)] font-650 underline underline-offset-4 after:absolute after:-inset-y-3 after:inset-x-0"
          >
            Send me a new one
          </Link>
        }
      />
      <Button
        type="submit"
        kind="primary"
        busy={isSending}
        className="mt-1 min-h-16 w-full text-24 sm:min-h-12 sm:text-17"
      >
        Sign in
      </Button>
      <ErrorNote error={error} />
      <p className="hidden text-14 text-soft sm:block">
        After eight quiet hours you are signed out; what you have typed stays.
      </p>
    </form>
  )
}
