import { choice, describeList } from '@/lib/list/schema'
import type { PersonRow } from './queries'

// Shared with forms, so that a password is judged while it is typed as it will be by the server.
export const shortestPassword = 12
export const longestPassword = 128

/** Initials proposed from a name: "Ada van Brandt" gives AVB. */
export function proposeInitials(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const letters = words.map((word) => [...word][0] ?? '').join('')
  return letters.toUpperCase().slice(0, 4)
}

const roleNames = ['technician', 'formulator', 'qa', 'manager', 'client'] as const

export const personList = describeList<PersonRow>()({
  name: 'people',
  sort: 'name',
  columns: [
    { key: 'initials', title: 'initials', sort: 'text', value: (person) => person.initials },
    { key: 'name', title: 'name', sort: 'text', value: (person) => person.name },
    { key: 'roles', title: 'roles', value: (person) => person.roles.join(', ') },
    { key: 'email', title: 'e-mail', sort: 'text', value: (person) => person.email },
    { key: 'state', title: 'signs in', value: signsIn },
    { key: 'client', title: 'client', sort: 'text', isExtra: true, value: (person) => person.clientName },
    {
      key: 'added',
      title: 'added',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (person) => person.createdAt,
    },
  ],
  filters: {
    role: choice('Role', roleNames),
    client: choice('Client'),
    account: choice('Account', ['open', 'closed']),
  },
})

function signsIn(person: PersonRow): string {
  if (!person.isActive) return 'closed'
  if (person.isDemo) return 'by one press'
  return person.hasPassword ? 'with a password' : 'invited, not yet answered'
}
