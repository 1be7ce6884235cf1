'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { LinkButton } from '@/components/ui/link-button'
import { ClientError, send } from '@/lib/http/fetcher'

export function ResetRequestForm() {
  const [email, setEmail] = useState('')
  const [state, setState] = useState<'typing' | 'sending' | 'sent'>('typing')
  const [error, setError] = useState<unknown>(null)

  async function request(event: FormEvent) {
    event.preventDefault()
    setState('sending')
    setError(null)
    try {
      await send('/api/resets', 'POST', { email })
      setState('sent')
    } catch (thrown) {
      setError(thrown)
      setState('typing')
    }
  }

  if (state === 'sent') {
    return (
      <div role="status" className="flex flex-col items-start gap-4">
        <p className="text-17">
          If <b>{email.trim()}</b> belongs to someone of this lab, a mail with a link is on its way there. The
          link works once, for an hour.
        </p>
        <LinkButton href="/sign-in">Back to sign-in</LinkButton>
      </div>
    )
  }
  return (
    <form method="post" onSubmit={request} noValidate className="flex flex-col gap-4">
      <Field
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        autoFocus
        value={email}
        onText={setEmail}
        error={error instanceof ClientError ? error.fields['email'] : undefined}
      />
      <ErrorNote error={error} />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" kind="primary" busy={state === 'sending'}>
          Send the link
        </Button>
        <LinkButton href="/sign-in">Back to sign-in</LinkButton>
      </div>
    </form>
  )
}
