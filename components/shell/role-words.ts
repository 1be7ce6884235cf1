import type { Role } from '@/lib/auth/actor'

export const roleWords: Record<Role, string> = {
  technician: 'technician',
  formulator: 'formulator',
  qa: 'QA',
  manager: 'manager',
  client: 'client',
}

export function rolesInWords(roles: readonly Role[]): string {
  return roles.map((role) => roleWords[role]).join(' and ')
}
