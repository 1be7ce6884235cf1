import type { Role } from '@/lib/auth/actor'

export const roleWords: Record<Role, string> = {
  technician: 'technician',
  formulator: 'formulator',
  qa: 'QA',
  manager: 'manager',
  client: 'client',
}

/** What each does here, as it stands beside a choice of roles. */
export const roleHints: Record<Role, string> = {
  technician: 'logs readings, photos, cycles',
  formulator: 'formulas, batches, studies, cases',
  qa: 'reviews and signs, never own work',
  manager: 'people, stations, instruments',
  client: 'own shared studies and reports, nothing else',
}

export function rolesInWords(roles: readonly Role[]): string {
  return roles.map((role) => roleWords[role]).join(' and ')
}
