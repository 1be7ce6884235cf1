import { ListPages } from '@/components/list/list-pages'
import { TrailTable } from '@/components/trail/trail-view'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import { listAddress } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import type { StudyBatchRow } from '@/lib/study/queries/head'
import type { ShownStudy } from '@/lib/study/queries/sheet'
import type { TrailPage } from '@/lib/trail/queries'
import { trailList } from '@/lib/trail/rules/list'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = {
  study: ShownStudy
  batches: StudyBatchRow[]
  rights: StudyRights
  trail: TrailPage
  query: ListQuery
}

/** What was done in this study, by whom, when and why, newest first. */
export function StudyRecord({ study, batches, rights, trail, query }: Props) {
  const path = `/studies/${encodeURIComponent(study.code)}/record`
  const whole = listAddress(
    '/trail',
    trailList,
    { ...query, place: null },
    { filters: { study: study.code } },
  )
  return (
    <>
      <StudyHeading
        study={study}
        batches={batches}
        part="record"
        rights={rights}
        headline={[
          { text: 'Every change', isStrong: true },
          { text: ' of this study, newest first', isStrong: false },
        ]}
        sentence="Written by the database itself, one entry a changed row; none can be altered."
        acts={<LinkButton href={whole}>Search and export it</LinkButton>}
      />
      {trail.rows.length === 0 ? (
        <Empty
          title="Nothing of yours is here"
          sentence="You see your own entries; QA and the manager see all of them."
        />
      ) : (
        <TrailTable lines={trail.rows} columns={query.columns} />
      )}
      <ListPages list={trailList} path={path} query={{ ...query, filters: noFilters }} page={trail} />
    </>
  )
}

/** The study stands in the path already. */
const noFilters = {}
