'use client'

import Link from 'next/link'
import { useState } from 'react'
import { heatLine } from '@/components/marks/heat'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Ledger } from '@/components/ui/ledger'
import { RadioGroup } from '@/components/ui/radio-group'
import { Section } from '@/components/ui/section'
import type { StandingJar } from '@/lib/station/queries/places'
import type { StationRow } from '@/lib/station/queries/stations'
import type { SeriesPlace } from '@/lib/station/rules/moves'
import { capacityOf } from '@/lib/station/rules/places'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { kindWords } from './jar-words'
import { MoveForm, type Moved } from './move-form'
import { ShelfMap } from './shelf-map'

type Props = {
  station: StationRow
  jars: StandingJar[]
  seriesPlaces: SeriesPlace[]
  stations: StationRow[]
  mayMove: boolean
  onMoved: () => void
}

/** The shelves of a station: whose jars stand where, and how they leave for another station. */
export function ShelfRoom({ station, jars, seriesPlaces, stations, mayMove, onMoved }: Props) {
  const [picked, setPicked] = useState<string | null>(null)
  const [taken, setTaken] = useState<ReadonlySet<string> | null>(null)
  const [moved, setMoved] = useState<Moved | null>(null)
  const studies = [...new Set(jars.map((jar) => jar.studyCode))].toSorted()
  const free = capacityOf(station) - jars.length
  const own = (code: string) => jars.filter((jar) => jar.studyCode === code)
  const chosen = jars.filter((jar) => taken?.has(jar.id))

  return (
    <Section
      title="Shelves"
      sentence={`${capital(counted(jars.length, 'place'))} taken, ${counted(free, 'place')} free: ${counted(station.shelves, 'shelf', 'shelves')} of ${station.placesPerShelf}.`}
      aside={
        mayMove && jars.length > 0 && taken === null ? (
          <Button
            onClick={() => {
              setMoved(null)
              setTaken(new Set())
            }}
          >
            Move jars
          </Button>
        ) : undefined
      }
    >
      {moved ? <NewLabels moved={moved} /> : null}
      {studies.length > 1 && taken === null ? (
        <RadioGroup
          label="Jars in ink"
          value={picked ?? ''}
          onPick={(code) => setPicked(code || null)}
          options={[
            { value: '', label: 'of every study' },
            ...studies.map((code) => ({ value: code, label: `${code}, ${own(code).length}` })),
          ]}
        />
      ) : null}
      {jars.length === 0 ? (
        <Empty
          title="No jar stands here"
          sentence="A study that starts here, or a move, puts jars on these shelves."
        />
      ) : null}
      <div className="mt-3">
        <ShelfMap
          station={station}
          line={station.temperatureC === null ? 2 : Math.max(1, heatLine(station.temperatureC))}
          jars={jars}
          picked={picked}
          taken={taken}
          onTake={(jar) =>
            setTaken((before) => {
              const next = new Set(before)
              if (!next.delete(jar.id)) next.add(jar.id)
              return next
            })
          }
        />
      </div>
      {taken !== null ? (
        <MoveForm
          station={station}
          jars={jars}
          chosen={chosen}
          studies={studies}
          seriesPlaces={seriesPlaces}
          stations={stations}
          onChoose={(ids) => setTaken(new Set(ids))}
          onClose={() => setTaken(null)}
          onMoved={(done) => {
            setTaken(null)
            setMoved(done)
            onMoved()
          }}
        />
      ) : null}
      {jars.length > 0 ? (
        <details className="mt-4">
          <summary className="min-h-11 cursor-pointer py-2.5 text-15 underline underline-offset-4">
            The same as a table
          </summary>
          <Ledger
            caption={`Jars at ${station.name}`}
            rows={jars}
            rowKey={(jar) => jar.id}
            columns={[
              { key: 'place', title: 'place', cell: (jar) => `shelf ${jar.shelf}, place ${jar.place}` },
              {
                key: 'jar',
                title: 'jar',
                cell: (jar) => (
                  <Link
                    href={`/studies/${jar.studyCode}/jars#${jar.code}`}
                    className="font-mono font-600 underline-offset-4 hover:underline"
                  >
                    {jar.code}
                  </Link>
                ),
              },
              { key: 'study', title: 'study', cell: (jar) => jar.studyCode },
              { key: 'batch', title: 'batch', from: 'tablet', cell: (jar) => jar.batchCode },
              { key: 'kind', title: 'kind', cell: (jar) => kindWords[jar.kind] },
              {
                key: 'until',
                title: 'stands until',
                from: 'tablet',
                cell: (jar) => `${spokenDay(jar.leavesOn)}, ${jar.leavesAt}`,
              },
            ]}
          />
        </details>
      ) : null}
    </Section>
  )
}

/** What stands printed on the jars is the place they came from. */
function NewLabels({ moved }: { moved: Moved }) {
  return (
    <p role="status" className="mb-4 border-l-4 border-ink pl-3">
      {capital(counted(moved.count, 'jar'))} now {moved.count === 1 ? 'stands' : 'stand'} at{' '}
      <b>{moved.toName}</b>. The place on {moved.count === 1 ? 'its label' : 'their labels'} is the old one:
      print new labels of{' '}
      {moved.studies.map((code, index) => (
        <span key={code}>
          {index > 0 ? (index === moved.studies.length - 1 ? ' and ' : ', ') : ''}
          <Link href={`/studies/${code}/labels?of=moved`} className="underline underline-offset-4">
            {code}
          </Link>
        </span>
      ))}
      .
    </p>
  )
}
