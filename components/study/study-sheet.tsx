'use client'

import Link from 'next/link'
import { useState } from 'react'
import useSWR from 'swr'
import { CellStrip } from '@/components/charts/cell-strip'
import { Sheet } from '@/components/charts/sheet'
import { fetcher } from '@/lib/http/fetcher'
import { mishapText } from '@/lib/jar/rules/mishap'
import { besideLayers } from '@/lib/reading/rules/layers-words'
import { namedJar } from '@/lib/jar/rules/code'
import type { SheetPage, SheetShelf } from '@/lib/study/queries/sheet'
import { spokenDay } from '@/lib/study/rules/calendar'
import { studyKeys } from '@/lib/study/keys'
import type { AttributeKey } from '@/lib/reading/schema/attributes'
import { BatchTabs } from './batch-tabs'
import { SeriesDetails } from './series-details'
import { sheetProps, stripOf } from './sheet-props'
import { StudyActs } from './study-acts'
import { StudyHeading, type StudyRights } from './study-heading'
import { Amendments, Moves, StudyNotices } from './study-notices'

type Picked = { rowId: string; weeks: number }

/** The sheet of a study: the finding, the shelves, and the picked jar at the foot. */
export function StudySheet({
  code,
  rights,
  batch,
}: {
  code: string
  rights: StudyRights
  batch: string | null
}) {
  const { data: sheet } = useSWR<SheetPage>(studyKeys.sheet(code), fetcher)
  const [picked, setPicked] = useState<Picked | null>(null)
  if (!sheet) return null
  const { study, batches } = sheet
  const shown = batches.find((one) => one.code === batch) ?? batches[0]
  const shelves = sheet.shelves.find((one) => one.batchId === shown?.id)?.rows ?? []
  const selected = picked ?? lastRead(shelves)
  const shelf = shelves.find((one) => one.station.id === selected?.rowId)
  const unplaced = sheet.flags.filter((flag) => flag.studyStationId === null)
  return (
    <>
      <StudyHeading
        study={study}
        batches={batches}
        part="sheet"
        rights={rights}
        headline={sheet.finding.headline}
        sentence={sheet.finding.sentence}
        acts={
          rights.mayWrite ? <StudyActs study={study} stations={shelves.map((one) => one.station)} /> : null
        }
      />
      <StudyNotices study={study} />
      {batches.length > 1 ? (
        <BatchTabs code={code} path="" batches={batches} shown={shown?.code ?? ''} />
      ) : null}
      {unplaced.length > 0 ? (
        <ul className="mt-4 border-t border-hair">
          {unplaced.map((flag) => (
            <li key={flag.number} className="flex flex-wrap items-baseline gap-x-4 border-b border-hair py-2">
              <b>Flag {flag.number}</b>
              <span className="min-w-0 flex-1">{flag.sentence}</span>
              <Link href={`/flags/${flag.number}`} className="font-650 underline underline-offset-2">
                Answer<span className="sr-only"> flag {flag.number}</span>
              </Link>
            </li>
          ))}
        </ul>
      ) : null}
      <div className="mt-5">
        {shown ? (
          <Sheet
            title={`Sheet of ${code}, ${shown.isReference ? 'reference' : 'batch'} ${shown.code}`}
            {...sheetProps(sheet, shown.id)}
            selected={selected}
            onSelect={setPicked}
          />
        ) : null}
      </div>
      <Happened shelves={shelves} />
      {shown && shelf && selected ? (
        <Strip sheet={sheet} batchId={shown.id} shelf={shelf} weeks={selected.weeks} />
      ) : null}
      <Amendments study={study} />
      <Moves study={study} />
    </>
  )
}

/** What happened to jars that no pull asked for: a spare that broke on its shelf. */
function Happened({ shelves }: { shelves: SheetShelf[] }) {
  const all = shelves.flatMap(({ station }) => station.mishaps.map((one) => ({ one, station })))
  if (all.length === 0) return null
  return (
    <ul aria-label="Jars outside a pull" className="mt-4 text-15">
      {all.map(({ one, station }) => (
        <li key={`${one.code}-${one.at}`}>
          {station.name}: {mishapText(one, spokenDay(one.at.slice(0, 10), false))}
        </li>
      ))}
    </ul>
  )
}

type StripProps = { sheet: SheetPage; batchId: string; shelf: SheetShelf; weeks: number }

function Strip({ sheet, batchId, shelf, weeks }: StripProps) {
  const cell = shelf.cells.find((one) => one.weeks === weeks)
  if (!cell) return null
  const note = [
    cell.pullLabel,
    spokenDay(cell.dueOn || sheet.study.startedOn, false),
    ...(cell.readBy ? [`read by ${cell.readBy}`] : cell.state === 'read' ? [] : [cell.state]),
    ...besideLayers(cell),
  ].join(', ')
  return (
    <div className="mt-6 lg:sticky lg:bottom-0 lg:z-10">
      <CellStrip
        code={cell.code ? namedJar(cell.code, shelf.station) : 'initial'}
        note={note}
        happened={cell.mishaps.map((one) => mishapText(one, spokenDay(one.at.slice(0, 10), false)))}
        attributes={stripOf(shelf, weeks)}
        textAs={({ key, name, text }) => (
          <SeriesDetails
            code={sheet.study.code}
            series={{ batchId, studyStationId: shelf.station.id, attribute: key as AttributeKey }}
            figure={`${name} ${text}`}
          >
            {text}
          </SeriesDetails>
        )}
      />
    </div>
  )
}

/** Opened on what there is to see: the newest reading of the worst shelf. */
function lastRead(shelves: SheetShelf[]): Picked | null {
  const ranks = ['untold', 'steady', 'leaning', 'out']
  const worst = shelves.toSorted((a, b) => ranks.indexOf(b.standing) - ranks.indexOf(a.standing))[0]
  const cell = worst?.cells.filter((one) => one.state === 'read').at(-1)
  return worst && cell ? { rowId: worst.station.id, weeks: cell.weeks } : null
}
