'use client'

import { useState, useSyncExternalStore, type FormEvent } from 'react'
import { roleHints, roleWords } from '@/components/shell/role-words'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { ClientError, send } from '@/lib/http/fetcher'
import { proposeInitials } from '@/lib/person/rules'
import { ChoosePassword } from './choose-password'

type Answers = Record<'code' | 'labName' | 'timeZone' | 'name' | 'initials' | 'email' | 'password', string>

const besides = ['technician', 'formulator', 'qa'] as const

const none: Answers = { code: '', labName: '', timeZone: '', name: '', initials: '', email: '', password: '' }

export function SetupForm({ timeZones }: { timeZones: string[] }) {
  const [answers, setAnswers] = useState(none)
  const [roles, setRoles] = useState<(typeof besides)[number][]>([])
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const here = useSyncExternalStore(never, zoneOfDevice, () => '')
  const fields = error instanceof ClientError ? error.fields : {}
  const timeZone = answers.timeZone || (timeZones.includes(here) ? here : '')

  const initials = answers.initials || proposeInitials(answers.name)

  const bind = (key: keyof Answers) => ({
    name: key,
    value: answers[key],
    onText: (text: string) => setAnswers((was) => ({ ...was, [key]: text })),
    error: fields[key],
  })

  async function begin(event: FormEvent) {
    event.preventDefault()
    setSending(true)
    setError(null)
    try {
      await send('/api/setup', 'POST', {
        ...answers,
        timeZone,
        initials,
        roles,
      })
      window.location.assign('/people')
    } catch (thrown) {
      setError(thrown)
      setSending(false)
    }
  }

  return (
    <form method="post" onSubmit={begin} noValidate className="flex flex-col gap-4">
      <Field
        label="Code from the server’s console"
        hint="It was printed when the server started, and works once."
        autoFocus
        spellCheck={false}
        autoCapitalize="none"
        className="font-mono"
        {...bind('code')}
      />
      <Field label="Name of the lab" autoComplete="organization" {...bind('labName')} />
      <Select
        label="Time zone of the lab"
        name="timeZone"
        hint="Days and pulls follow the lab’s clock."
        empty="Choose"
        options={timeZones.map((zone) => ({ value: zone, label: zone.replaceAll('_', ' ') }))}
        value={timeZone}
        onPick={(zone) => setAnswers((was) => ({ ...was, timeZone: zone }))}
        error={fields['timeZone']}
      />
      <h2 className="mt-2 border-b border-ink pb-1 text-20 font-650">The first manager</h2>
      <Field label="Name" autoComplete="name" {...bind('name')} />
      <Field
        label="Initials"
        hint="They stand beside every entry and signature."
        maxLength={6}
        {...bind('initials')}
        value={initials}
      />
      <Field label="E-mail" type="email" autoComplete="username" {...bind('email')} />
      <ChoosePassword
        label="Password"
        value={answers.password}
        onText={(password) => setAnswers((was) => ({ ...was, password }))}
        error={fields['password']}
      />
      <fieldset>
        <legend className="font-600">What this person does besides</legend>
        <p className="text-13 text-soft">Nobody changes their own roles later; another manager does.</p>
        {besides.map((role) => (
          <Checkbox
            key={role}
            label={roleWords[role]}
            hint={roleHints[role]}
            checked={roles.includes(role)}
            onSet={(isHeld) =>
              setRoles((was) => (isHeld ? [...was, role] : was.filter((one) => one !== role)))
            }
          />
        ))}
      </fieldset>
      <ErrorNote error={error} />
      <Button type="submit" kind="primary" busy={isSending} className="self-start">
        Begin the notebook
      </Button>
    </form>
  )
}

function never() {
  return () => undefined
}

function zoneOfDevice(): string {
  return Intl.DateTimeFormat().resolvedOptions().timeZone
}
