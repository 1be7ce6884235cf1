'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { createFormulaInput, emulsionTypes } from '@/lib/formula/schema'

type Props = { clients: { id: string; name: string }[] }

/** Code, name and type; the lines are written on the formula's own page. */
export function NewFormulaForm({ clients }: Props) {
  const router = useRouter()
  const [ids] = useState(() => ({ id: newId(), versionId: newId() }))
  const [typed, setTyped] = useState({ code: '', name: '', emulsionType: '', clientId: '' })
  const [fields, setFields] = useState<Record<string, string>>({})
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)
  const set = (change: Partial<typeof typed>) => setTyped((now) => ({ ...now, ...change }))

  async function submit(event: FormEvent) {
    event.preventDefault()
    setRefusal(null)
    const parsed = createFormulaInput.safeParse({ ...ids, ...typed, clientId: typed.clientId || null })
    if (!parsed.success) {
      setFields(Object.fromEntries(parsed.error.issues.toReversed().map((one) => [one.path[0], one.message])))
      return
    }
    setFields({})
    setIsSending(true)
    try {
      const made = await send<{ code: string }>('/api/formulas', 'POST', parsed.data)
      router.push(`/formulas/${made.code}`)
    } catch (thrown) {
      setIsSending(false)
      if (!(thrown instanceof ClientError)) throw thrown
      const field = (thrown.detail as { field?: string } | undefined)?.field
      setFields(field ? { [field]: thrown.sentence } : thrown.fields)
      if (!field) setRefusal(thrown)
    }
  }

  return (
    <form onSubmit={(event) => void submit(event)} className="flex max-w-[460px] flex-col gap-4" noValidate>
      <Field
        label="Code"
        value={typed.code}
        error={fields['code']}
        onText={(code) => set({ code })}
        hint="Letters and digits, such as N86. Batches are numbered after it: N86-1, N86-2."
        autoFocus
      />
      <Field
        label="Name"
        value={typed.name}
        error={fields['name']}
        onText={(name) => set({ name })}
        hint="As one speaks of it: silicone-free cream."
      />
      <Select
        label="Emulsion type"
        empty="Choose"
        value={typed.emulsionType}
        error={fields['emulsionType']}
        options={emulsionTypes.map((type) => ({ value: type, label: type }))}
        onPick={(emulsionType) => set({ emulsionType })}
      />
      <Select
        label="Client"
        empty="The lab’s own"
        value={typed.clientId}
        error={fields['clientId']}
        options={clients.map((client) => ({ value: client.id, label: client.name }))}
        onPick={(clientId) => set({ clientId })}
      />
      <ErrorNote error={refusal} />
      <div className="flex gap-2">
        <Button type="submit" kind="primary" busy={isSending}>
          Write its lines
        </Button>
        <Link href="/formulas" className="btn" data-kind="secondary">
          Not now
        </Link>
      </div>
    </form>
  )
}
