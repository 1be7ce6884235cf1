'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { Empty } from '@/components/ui/empty'
import { Select } from '@/components/ui/select'
import { fetcher } from '@/lib/http/fetcher'
import { namedJar } from '@/lib/jar/rules'
import type { ReadingChain, StudyReadings as Page } from '@/lib/study/queries/readings'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { attributeName } from '@/lib/study/rules/finding'
import { shownWithUnit } from '@/lib/study/rules/words'
import { studyKeys } from '@/lib/study/schema'
import { ReadingActs } from './reading-acts'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = { code: string; rights: StudyRights; timeZone: string; personId: string; mayLog: boolean }

/** Every reading with all that it superseded: a correction hides nothing. */
export function StudyReadings({ code, rights, timeZone, personId, mayLog }: Props) {
  const { data: page, mutate } = useSWR<Page>(studyKeys.readings(code), fetcher)
  const [attribute, setAttribute] = useState('')
  if (!page) return null
  const present = [...new Set(page.readings.map((chain) => chain.current.attribute))]
  const shown = page.readings.filter((chain) => attribute === '' || chain.current.attribute === attribute)
  const corrected = page.readings.filter((chain) => chain.entries.length > 1).length
  return (
    <>
      <StudyHeading
        study={page.study}
        batches={page.batches}
        part="readings"
        rights={rights}
        headline={[
          { text: String(page.readings.length), isStrong: true },
          {
            text: page.readings.length === 1 ? ' reading is on record' : ' readings are on record',
            isStrong: false,
          },
        ]}
        sentence={
          corrected === 0
            ? 'None was corrected or voided.'
            : `${corrected} ${corrected === 1 ? 'was' : 'were'} corrected or voided; what stood before is struck through and stays.`
        }
      />
      <div data-screen-only className="mt-4">
        <Select
          label="Attribute"
          hideLabel
          value={attribute}
          options={[
            { value: '', label: 'Every attribute' },
            ...present.map((key) => ({ value: key, label: attributeName(key) })),
          ]}
          onPick={setAttribute}
          wrap="w-[220px]"
        />
      </div>
      {shown.length === 0 ? (
        <Empty title="Nothing was read yet" sentence="Readings appear here as they are taken at the Bench." />
      ) : (
        <div className="relative mt-2 overflow-x-auto" role="region" aria-label="Readings" tabIndex={0}>
          <table className="w-full border-collapse text-15">
            <caption className="sr-only">Readings of {code}, in the order they were recorded</caption>
            <thead>
              <tr className="border-b-[1.75px] border-ink text-left text-13 text-soft [&_th]:px-2 [&_th]:py-1.5 [&_th]:font-430 [&_th:first-child]:pl-0">
                <th scope="col">jar</th>
                <th scope="col">time</th>
                <th scope="col">attribute</th>
                <th scope="col" className="text-right">
                  value
                </th>
                <th scope="col" className="pl-6!">
                  as typed
                </th>
                <th scope="col">read by</th>
                <th scope="col">measured</th>
                <th scope="col">
                  <span className="sr-only">Acts</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {shown.map((chain) => (
                <Chain
                  key={chain.current.id}
                  chain={chain}
                  timeZone={timeZone}
                  acts={
                    mayLog && page.study.state === 'running' && !chain.current.isVoid ? (
                      <ReadingActs
                        reading={chain.current}
                        isOwn={chain.current.recordedBy === personId}
                        onDone={() => void mutate()}
                      />
                    ) : null
                  }
                />
              ))}
            </tbody>
          </table>
        </div>
      )}
    </>
  )
}

function Chain({ chain, timeZone, acts }: { chain: ReadingChain; timeZone: string; acts: React.ReactNode }) {
  return chain.entries.map((entry, index) => {
    const isCurrent = index === chain.entries.length - 1
    const old = isCurrent ? '' : 'line-through decoration-1 text-soft'
    return (
      <tr
        key={entry.id}
        className={`align-baseline [&_td]:px-2 [&_td]:py-1.5 [&_td:first-child]:pl-0 ${isCurrent ? 'border-b border-hair' : ''}`}
      >
        <td className="font-mono text-14 whitespace-nowrap">
          {entry.jarCode ? namedJar(entry.jarCode, stationOf(entry)) : entry.batchCode}
        </td>
        <td className="whitespace-nowrap">{entry.label ?? 'initial'}</td>
        <td>
          {attributeName(entry.attribute)}
          {entry.replicate > 1 ? <span className="text-soft"> {entry.replicate}</span> : null}
        </td>
        <td className={`text-right whitespace-nowrap ${isCurrent ? 'font-600' : ''}`}>
          <span className={old}>
            {entry.isVoid || entry.value === null ? 'void' : shownWithUnit(entry.attribute, entry.value)}
          </span>
          {isCurrent && chain.entries.length > 1 ? <span className="sr-only"> counts now</span> : null}
        </td>
        <td className="max-w-[260px] pl-6!">
          <span className={old}>{entry.typed}</span>
          {entry.reason ? <span className="block text-13 text-soft">because: {entry.reason}</span> : null}
          {entry.doubts.map((doubt) => (
            <span key={doubt.reason} className="block text-13 text-soft">
              doubt: {doubt.sentence}
            </span>
          ))}
        </td>
        <td className="whitespace-nowrap" title={entry.readByName}>
          {entry.readBy}
          {entry.instrumentCode ? <span className="text-soft">, {entry.instrumentCode}</span> : null}
        </td>
        <td className="whitespace-nowrap">{moment(entry.measuredAt, timeZone)}</td>
        <td className="text-right">{isCurrent ? acts : null}</td>
      </tr>
    )
  })
}

function stationOf(entry: ReadingChain['current']) {
  return entry.isFreezeThaw === null
    ? null
    : { temperatureC: entry.temperatureC, isFreezeThaw: entry.isFreezeThaw }
}

function moment(instant: string, timeZone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'short' }).format(new Date(instant))
  return `${spokenDay(dayIn(timeZone, instant))}, ${time}`
}
