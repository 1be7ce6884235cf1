'use client'

import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { roleHints, roleWords } from '@/components/shell/role-words'
import { roles, type Role } from '@/lib/auth/actor'
import type { ClientRow } from '@/lib/client/queries'

export type PersonDraft = {
  name: string
  initials: string
  roles: Role[]
  clientId: string | null
}

type Props = {
  draft: PersonDraft
  onDraft: (draft: PersonDraft) => void
  clients: ClientRow[]
  fields: Record<string, string>
  /** Nobody changes their own roles. */
  rolesAreFixed?: boolean
  proposedInitials?: string
}

export function PersonFields({ draft, onDraft, clients, fields, rolesAreFixed, proposedInitials }: Props) {
  const isClient = draft.roles.includes('client')

  function setRole(role: Role, isHeld: boolean) {
    const held = isHeld ? [...draft.roles, role] : draft.roles.filter((one) => one !== role)
    onDraft({ ...draft, roles: roles.filter((one) => held.includes(one)) })
  }

  return (
    <>
      <div className="grid grid-cols-[1fr_7rem] gap-3">
        <Field
          label="Name"
          name="name"
          value={draft.name}
          onText={(name) => onDraft({ ...draft, name })}
          error={fields['name']}
        />
        <Field
          label="Initials"
          name="initials"
          maxLength={6}
          value={draft.initials || (proposedInitials ?? '')}
          onText={(initials) => onDraft({ ...draft, initials })}
          error={fields['initials']}
        />
      </div>
      <fieldset>
        <legend className="font-600">Roles</legend>
        {roles.map((role) => (
          <Checkbox
            key={role}
            label={roleWords[role]}
            hint={roleHints[role]}
            checked={draft.roles.includes(role)}
            disabled={rolesAreFixed}
            onSet={(isHeld) => setRole(role, isHeld)}
          />
        ))}
        {rolesAreFixed ? (
          <p className="text-13 text-soft">Nobody changes their own roles. Ask another manager.</p>
        ) : null}
        {fields['roles'] ? (
          <p role="alert" className="text-13 text-alarm">
            {fields['roles']}
          </p>
        ) : null}
      </fieldset>
      {isClient ? (
        <Select
          label="Of which client"
          empty="Choose"
          options={clients.map((client) => ({ value: client.id, label: client.name }))}
          value={draft.clientId ?? ''}
          onPick={(id) => onDraft({ ...draft, clientId: id || null })}
          error={fields['clientId']}
          hint={clients.length === 0 ? 'Add the client first, below the list of people.' : undefined}
        />
      ) : null}
    </>
  )
}
