import type { ReactNode } from 'react'
import { dayWithName } from '@/components/shell/day'
import { placesOf } from '@/components/shell/places'
import { Shell } from '@/components/shell/shell'
import { env } from '@/lib/env'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'

export const permission = 'profile.own'

export default async function NotebookLayout({ children }: { children: ReactNode }) {
  const { actor, db, now } = await page(permission)
  const lab = await getLab(db)
  const { personId, name, initials, email, roles } = actor
  const demoPersonId = actor.isDemo ? actor.personId : null
  const isDemo = env().demo && lab.demoFilledAt !== null
  return (
    <Shell
      who={{ personId, name, initials, email, roles, demoPersonId }}
      places={placesOf({ actor, hasMailFake: env().smtpUrl === null && lab.demoFilledAt !== null })}
      labName={lab.name}
      day={dayWithName(now, lab.timeZone)}
      isDemo={isDemo}
    >
      {children}
    </Shell>
  )
}
