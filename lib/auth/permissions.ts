import type { Actor, Role } from './actor'

const lab = ['technician', 'formulator', 'qa', 'manager'] as const
const everyone = [...lab, 'client'] as const

/**
 * Who may do what, and the only place that decides it. Whose object it is, is the query's business (its
 * `where`); what a person did before (own work is never signed) is the command's.
 */
export const permissions = {
  'reading.log': ['technician', 'formulator'],
  'photo.add': ['technician', 'formulator'],
  // The original with what the camera wrote into it, place and all; everybody else gets it without.
  'photo.audit': ['qa', 'manager'],
  'handover.write': ['technician', 'formulator'],
  'day.review': ['qa'],
  'cycle.log': ['technician', 'formulator'],
  'flag.comment': lab,
  'flag.answer': ['formulator', 'qa'],
  'flag.close-out': ['qa'],
  'formula.read': lab,
  'formula.write': ['formulator'],
  'batch.read': lab,
  'batch.write': ['formulator'],
  'protocol.read': lab,
  'protocol.write': ['formulator'],
  'protocol.approve': ['qa'],
  'study.read': everyone,
  'study.write': ['formulator'],
  'bench.read': lab,
  'reading.read': lab,
  'case.read': lab,
  'case.put-forward': ['formulator'],
  'case.sign': ['qa'],
  'station.read': lab,
  'station.write': ['manager'],
  'station.log': ['technician', 'manager'],
  // What happened to jars is logged by who logs a cycle's half; stations are the manager's as well.
  'jar.move': ['technician', 'formulator', 'manager'],
  'instrument.read': lab,
  'instrument.write': ['manager'],
  'instrument.calibrate': ['technician', 'manager'],
  'person.manage': ['manager'],
  'lab.manage': ['manager'],
  'mail.read': ['manager'],
  'trail.read': lab,
  'report.read': everyone,
  'profile.own': everyone,
  public: [],
} as const satisfies Record<string, readonly Role[]>

export type Permission = keyof typeof permissions

export function may(actor: Pick<Actor, 'roles'>, permission: Permission): boolean {
  if (permission === 'public') return true
  const allowed: readonly Role[] = permissions[permission]
  return actor.roles.some((role) => allowed.includes(role))
}
