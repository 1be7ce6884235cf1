'use client'

import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import { useRouter } from 'next/navigation'
import type { ReactNode } from 'react'
import { ListPages } from '@/components/list/list-pages'
import { ListTools } from '@/components/list/list-tools'
import { SortHead } from '@/components/list/sort-head'
import { Empty } from '@/components/ui/empty'
import { isNarrowed } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'
import { hairlineText } from '@/lib/reading/rules/layers-words'
import type { ReadingChain, ReadingEntry, StudyReadings as Page } from '@/lib/study/queries/readings'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { jarName, readingList } from '@/lib/study/rules/reading-list'
import { shownWithUnit } from '@/lib/study/rules/words'
import { OutsideResults } from './outside-results'
import { ReadingActs } from './reading-acts'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = {
  page: Page
  query: ListQuery
  rights: StudyRights
  timeZone: string
  personId: string
  mayLog: boolean
}

/** Every reading with all that it superseded: a correction hides nothing. */
export function StudyReadings({ page, query, rights, timeZone, personId, mayLog }: Props) {
  const router = useRouter()
  const { study, counts, rows } = page
  const path = `/studies/${encodeURIComponent(study.code)}/readings`
  const columns = readingList.columns.filter((column) => query.columns.includes(column.key))
  return (
    <>
      <StudyHeading
        study={study}
        batches={page.batches}
        part="readings"
        rights={rights}
        headline={[
          { text: grouped(counts.all, 0), isStrong: true },
          { text: counts.all === 1 ? ' reading is on record' : ' readings are on record', isStrong: false },
        ]}
        sentence={
          counts.changed === 0
            ? 'None was corrected or voided.'
            : `${grouped(counts.changed, 0)} ${counts.changed === 1 ? 'was' : 'were'} corrected or voided; what stood before is struck through and stays.`
        }
      />
      <div className="mt-4">
        <ListTools
          list={readingList}
          path={path}
          query={query}
          choices={page.choices}
          searchLabel="Find a reading"
          placeholder="Jar, attribute, typed, reason"
          total={page.total}
        />
      </div>
      {rows.length === 0 ? (
        isNarrowed(readingList, query) ? (
          <Empty title="No reading is of that kind" />
        ) : (
          <Empty
            title="Nothing was read yet"
            sentence="Readings appear here as they are taken at the Bench."
          />
        )
      ) : (
        <div className="relative mt-2 overflow-x-auto" role="region" aria-label="Readings" tabIndex={0}>
          <table className="w-full border-collapse text-15">
            <caption className="sr-only">Readings of {study.code}, each with what it superseded</caption>
            <thead>
              <tr className="border-b-[1.75px] border-ink text-left text-13 text-soft [&_th]:px-2 [&_th]:py-1.5 [&_th]:font-430 [&_th:first-child]:pl-0">
                {columns.map((column) => (
                  <SortHead key={column.key} list={readingList} path={path} query={query} column={column} />
                ))}
                <th scope="col">
                  <span className="sr-only">Acts</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {rows.map((chain) => (
                <Chain
                  key={chain.current.id}
                  chain={chain}
                  keys={columns.map((column) => column.key)}
                  timeZone={timeZone}
                  acts={
                    mayLog && study.state === 'running' && !chain.current.isVoid ? (
                      <ReadingActs
                        reading={chain.current}
                        isOwn={chain.current.recordedBy === personId}
                        onDone={() => router.refresh()}
                      />
                    ) : null
                  }
                />
              ))}
            </tbody>
          </table>
        </div>
      )}
      <ListPages list={readingList} path={path} query={query} page={page} />
      <OutsideResults code={study.code} batches={page.batches.map(({ code }) => code)} mayLog={mayLog} />
    </>
  )
}

type ChainProps = { chain: ReadingChain; keys: string[]; timeZone: string; acts: ReactNode }

function Chain({ chain, keys, timeZone, acts }: ChainProps) {
  return chain.entries.map((entry, index) => {
    const isCurrent = index === chain.entries.length - 1
    return (
      <tr
        key={entry.id}
        className={`align-baseline [&_td]:px-2 [&_td]:py-1.5 [&_td:first-child]:pl-0 ${isCurrent ? 'border-b border-hair' : ''}`}
      >
        {keys.map((key) => (
          <Cell
            key={key}
            of={key}
            entry={entry}
            isCurrent={isCurrent}
            isAmended={index > 0}
            timeZone={timeZone}
          />
        ))}
        <td className="text-right">{isCurrent ? acts : null}</td>
      </tr>
    )
  })
}

type CellProps = {
  of: string
  entry: ReadingEntry
  isCurrent: boolean
  isAmended: boolean
  timeZone: string
}

function Cell({ of, entry, isCurrent, isAmended, timeZone }: CellProps) {
  const old = isCurrent ? '' : 'line-through decoration-1 text-soft'
  switch (of) {
    case 'jar':
      return <td className="font-mono text-14 whitespace-nowrap">{jarName(entry)}</td>
    case 'attribute':
      return (
        <td>
          {attributeName(entry.attribute)}
          {entry.replicate > 1 ? <span className="text-soft"> {entry.replicate}</span> : null}
        </td>
      )
    case 'value':
      return (
        <td className={`text-right whitespace-nowrap ${isCurrent ? 'font-600' : ''}`}>
          <span className={old}>
            {entry.isVoid
              ? 'void'
              : entry.value === null
                ? (entry.word ?? entry.typed)
                : (hairlineText(entry.detail) ??
                  shownWithUnit(attributeOf(entry.attribute, entry), entry.value))}
          </span>
          {entry.detail.isEstimate && !entry.isVoid ? (
            <span className="block text-13 font-430 text-soft">an estimate</span>
          ) : null}
          {isCurrent && isAmended ? <span className="sr-only"> counts now</span> : null}
        </td>
      )
    case 'typed':
      return (
        <td className="max-w-[260px] pl-6!">
          <span className={old}>{entry.typed}</span>
          {entry.reason ? <span className="block text-13 text-soft">because: {entry.reason}</span> : null}
          {entry.doubts.map((doubt) => (
            <span key={doubt.reason} className="block text-13 text-soft">
              doubt: {doubt.sentence}
            </span>
          ))}
        </td>
      )
    case 'by':
      return (
        <td className="whitespace-nowrap" title={entry.readByName}>
          {entry.readBy}
          {entry.instrumentCode ? <span className="text-soft">, {entry.instrumentCode}</span> : null}
        </td>
      )
    case 'measured':
    case 'recorded':
      return (
        <td className="whitespace-nowrap">
          {moment(of === 'measured' ? entry.measuredAt : entry.recordedAt, timeZone)}
        </td>
      )
    default:
      return <td>{readingList.columns.find((column) => column.key === of)?.value(entry)}</td>
  }
}

function moment(instant: string, timeZone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'short' }).format(new Date(instant))
  return `${spokenDay(dayIn(timeZone, instant))}, ${time}`
}
