import type { Metadata } from 'next'
import { readTrail } from '@/components/trail/trail-address'
import { trailLines } from '@/components/trail/trail-lines'
import { TrailView } from '@/components/trail/trail-view'
import type { Actor } from '@/lib/auth/actor'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listPeople } from '@/lib/person/queries'
import { getStudyHead } from '@/lib/study/queries/head'
import { listTrail } from '@/lib/trail/queries'

export const permission = 'trail.read'
export const metadata: Metadata = { title: 'Record' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function TrailPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const shown = readTrail(await searchParams)
  const { timeZone } = await getLab(db)
  const study = shown.study
    ? await getStudyHead(db, actor, shown.study).catch((thrown: unknown) => {
        if (thrown instanceof AppError && thrown.status === 404) return null
        throw thrown
      })
    : undefined
  const trail =
    study === null
      ? { entries: [], next: null }
      : await listTrail(db, actor, {
          table: shown.table ?? undefined,
          before: shown.before ?? undefined,
          studyId: study?.id,
        })
  const people = new Map((await listPeople(db, actor)).map((person) => [person.id, person.name]))
  return (
    <TrailView
      shown={shown}
      isStudyKnown={study !== null}
      lines={trailLines(trail, timeZone, people)}
      next={trail.next}
      timeZone={timeZone}
      scope={scopeOf(actor)}
    />
  )
}

function scopeOf({ roles }: Actor): string {
  if (roles.includes('qa') || roles.includes('manager')) return 'You read all of it.'
  return roles.includes('formulator')
    ? 'You read your own entries and those of your studies.'
    : 'You read your own entries.'
}
