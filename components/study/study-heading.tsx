'use client'

import Link from 'next/link'
import type { ReactNode } from 'react'
import { Button } from '@/components/ui/button'
import { Heading } from '@/components/ui/heading'
import type { StudyBatchRow } from '@/lib/study/queries/head'
import type { ShownStudy } from '@/lib/study/queries/sheet'
import { spokenDay } from '@/lib/study/rules/calendar'
import type { Phrase } from '@/lib/study/rules/finding'
import { listed } from '@/lib/study/rules/words'
import { FollowButton } from './follow-button'
import { Phrases } from './phrases'

export type StudyPart = 'sheet' | 'curves' | 'readings' | 'jars' | 'record'
/** What this person may do here; what would be refused is not shown. */
export type StudyRights = {
  mayWrite: boolean
  mayPutForward: boolean
  mayReadReadings: boolean
  maySeeJars: boolean
  maySeeRecord: boolean
  mayReadBatches: boolean
}

type Props = {
  study: ShownStudy
  batches: StudyBatchRow[]
  part: StudyPart
  rights: StudyRights
  headline: Phrase[]
  sentence?: ReactNode
  acts?: ReactNode
}

export function StudyHeading({ study, batches, part, rights, headline, sentence, acts }: Props) {
  const base = `/studies/${encodeURIComponent(study.code)}`
  const tab = (key: StudyPart, label: string, path: string) => ({
    href: `${base}${path}`,
    label,
    isHere: part === key,
  })
  return (
    <Heading
      crumb={<Crumb study={study} batches={batches} rights={rights} />}
      headline={<Phrases phrases={headline} />}
      sentence={sentence}
      tabsLabel={`Parts of study ${study.code}`}
      tabs={[
        tab('sheet', 'Sheet', ''),
        tab('curves', 'Curves', '/curves'),
        ...(rights.mayReadReadings ? [tab('readings', 'Readings', '/readings')] : []),
        ...(rights.maySeeJars ? [tab('jars', 'Jars', '/jars')] : []),
        ...(rights.maySeeRecord ? [tab('record', 'Record', '/record')] : []),
      ]}
      acts={
        <span className="flex flex-wrap items-center gap-x-5">
          {acts}
          <FollowButton code={study.code} isFollowing={study.isFollowing} />
          {rights.mayPutForward ? <CaseLink study={study} /> : null}
        </span>
      }
    />
  )
}

/** Off where the study's own protocol bars it; the sheet says why. */
function CaseLink({ study }: { study: ShownStudy }) {
  const label = 'Put a shelf-life case forward'
  if (study.protocolApproval === 'not approved') {
    return (
      <Button kind="link" why="Its protocol was not approved when it began.">
        {label}
      </Button>
    )
  }
  return (
    <Link href={`/cases/new?study=${encodeURIComponent(study.code)}`} className="btn" data-kind="link">
      {label}
    </Link>
  )
}

function Crumb({ study, batches, rights }: Pick<Props, 'study' | 'batches' | 'rights'>) {
  const own = batches.filter((batch) => !batch.isReference)
  const references = batches.filter((batch) => batch.isReference)
  const [first] = own
  return (
    <>
      {study.code}, {own.length === 1 ? 'batch ' : 'batches '}
      <BatchNames batches={own} rights={rights} />
      {first ? `: ${first.formulaName}, ${inside(first)}. ` : '. '}
      {references.length > 0 ? (
        <>
          Beside {own.length === 1 ? 'it' : 'them'} as a reference{' '}
          <BatchNames batches={references} rights={rights} />:{' '}
          {listed(
            references.map(
              ({ formulaName, productLot }) => formulaName + (productLot && `, lot ${productLot}`),
            ),
          )}
          .{' '}
        </>
      ) : null}
      {study.title}
      {/\d (weeks|months)/.test(study.title) ? '' : `, ${span(study.endWeeks)}`}, begun{' '}
      {spokenDay(study.startedOn)}
      {study.endedOn ? `, ended ${spokenDay(study.endedOn)}` : ''}
    </>
  )
}

function BatchNames({ batches, rights }: Pick<Props, 'batches' | 'rights'>) {
  return batches.map((batch, index) => (
    <span key={batch.id}>
      {index > 0 ? (index === batches.length - 1 ? ' and ' : ', ') : ''}
      {rights.mayReadBatches ? <Link href={`/batches/${batch.code}`}>{batch.code}</Link> : batch.code}
    </span>
  ))
}

function inside(batch: StudyBatchRow): string {
  const what = batch.emulsionType === 'oil-in-water' ? 'oil' : 'water'
  return `${batch.internalPercent.toFixed(1)} % ${what} inside`
}

export function span(endWeeks: number): string {
  if (endWeeks > 52) return `${Math.round((endWeeks / 13) * 3)} months`
  return `${endWeeks} ${endWeeks === 1 ? 'week' : 'weeks'}`
}
