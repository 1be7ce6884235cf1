export const roles = ['technician', 'formulator', 'qa', 'manager', 'client'] as const
export type Role = (typeof roles)[number]

export type Actor = {
  personId: string
  name: string
  initials: string
  email: string
  roles: Role[]
  clientId: string | null
  sessionId: string
  requestId: string
  isDemo: boolean
}

/** The actor of what nobody in particular did. It has no password and no role, so it cannot sign in. */
export function systemActor(requestId = ''): Actor {
  return {
    personId: '00000000-0000-7000-8000-000000000001',
    name: 'Stillstand',
    initials: 'ST',
    email: 'system@stillstand.invalid',
    roles: [],
    clientId: null,
    sessionId: '',
    requestId,
    isDemo: false,
  }
}

/** A client sees only what is shared with its own firm; queries put this into their `where`. */
export function isClientOnly(actor: Pick<Actor, 'roles'>): boolean {
  return actor.roles.every((role) => role === 'client')
}
