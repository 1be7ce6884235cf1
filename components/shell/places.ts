import type { Actor } from '@/lib/auth/actor'
import { may, type Permission } from '@/lib/auth/permissions'

export type Place = { href: string; label: string }

type Entry = Place & { permission: Permission; isHidden?: (given: Given) => boolean }
type Given = { actor: Pick<Actor, 'roles'>; hasMailFake: boolean }

const entries: Entry[] = [
  { href: '/bench', label: 'Bench', permission: 'bench.read' },
  { href: '/studies', label: 'Studies', permission: 'study.read' },
  { href: '/formulas', label: 'Formulas', permission: 'formula.read' },
  { href: '/ingredients', label: 'Ingredients', permission: 'formula.read' },
  { href: '/batches', label: 'Batches', permission: 'batch.read' },
  { href: '/protocols', label: 'Protocols', permission: 'protocol.read' },
  { href: '/stations', label: 'Stations', permission: 'station.read' },
  { href: '/instruments', label: 'Instruments', permission: 'instrument.read' },
  { href: '/flags', label: 'Flags', permission: 'flag.comment' },
  { href: '/cases', label: 'Cases', permission: 'case.read' },
  { href: '/reports', label: 'Reports', permission: 'report.read' },
  { href: '/days', label: 'Days', permission: 'day.review' },
  { href: '/trail', label: 'Record', permission: 'trail.read' },
  { href: '/lab', label: 'Lab', permission: 'bench.read' },
  { href: '/people', label: 'People', permission: 'person.manage' },
  { href: '/mails', label: 'Mail', permission: 'mail.read', isHidden: ({ hasMailFake }) => !hasMailFake },
]

/** Where this person may go; what would be refused is not shown. */
export function placesOf(given: Given): Place[] {
  return entries
    .filter((entry) => may(given.actor, entry.permission) && !entry.isHidden?.(given))
    .map(({ href, label }) => ({ href, label }))
}

export function isAt(path: string, place: Place): boolean {
  return path === place.href || path.startsWith(`${place.href}/`)
}
