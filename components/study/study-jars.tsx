'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { FillDialog } from '@/components/jar/fill-dialog'
import { Button } from '@/components/ui/button'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import { fetcher } from '@/lib/http/fetcher'
import type { JarRow } from '@/lib/jar/queries'
import { namedJar } from '@/lib/jar/rules'
import type { StudyJars as Page } from '@/lib/study/queries/jars'
import { spokenDay } from '@/lib/study/rules/calendar'
import { degrees } from '@/lib/study/rules/finding'
import { capital, counted, listed, withVariant } from '@/lib/study/rules/words'
import { studyKeys } from '@/lib/study/schema'
import { StudyHeading, type StudyRights } from './study-heading'

/** Every jar of a study where it stands, with its label sheet. */
export function StudyJars({ code, rights, mayLog }: { code: string; rights: StudyRights; mayLog: boolean }) {
  const { data: page, mutate } = useSWR<Page>(studyKeys.jars(code), fetcher)
  const [weighed, setWeighed] = useState<JarRow | null>(null)
  if (!page) return null
  const stored = page.jars.filter((jar) => jar.state === 'stored' || jar.state === 'resting').length
  return (
    <>
      <StudyHeading
        study={page.study}
        batches={page.batches}
        part="jars"
        rights={rights}
        headline={[
          { text: `${stored} of ${page.jars.length}`, isStrong: true },
          { text: ' jars still stand at their stations', isStrong: false },
        ]}
        sentence={kindsSentence(page.jars)}
        acts={
          <LinkButton href={`/studies/${encodeURIComponent(code)}/labels`} kind="primary">
            Print the labels
          </LinkButton>
        }
      />
      <div className="mt-6 grid gap-8">
        {stationsOf(page.jars).map(({ key, name, jars }) => (
          <Section key={key} title={name} sentence={capital(counted(jars.length, 'jar'))}>
            <Ledger
              caption={`Jars at ${name}`}
              columns={columns(mayLog ? setWeighed : null)}
              rows={jars}
              rowKey={(jar) => jar.id}
              isQuiet={(jar) => jar.state === 'spent' || jar.state === 'lost'}
            />
          </Section>
        ))}
      </div>
      {weighed ? (
        <FillDialog jar={weighed} onClose={() => setWeighed(null)} onDone={() => void mutate()} />
      ) : null}
    </>
  )
}

function columns(onWeigh: ((jar: JarRow) => void) | null): LedgerColumn<JarRow>[] {
  return [
    {
      key: 'glyph',
      title: <span className="sr-only">Drawing</span>,
      width: '34px',
      cell: (jar) => (
        <JarGlyph
          height={22}
          kind={jar.kind as 'watch'}
          state={jar.state === 'spent' ? 'spent' : jar.state === 'lost' ? 'broken' : 'drawn'}
        />
      ),
    },
    {
      key: 'code',
      title: 'jar',
      cell: (jar) => (
        <span id={jar.code} className="font-mono font-600 target:bg-ink target:px-1 target:text-onink">
          {nameOf(jar)}
        </span>
      ),
    },
    {
      key: 'kind',
      title: 'kind',
      cell: (jar) => (jar.setAsideFor ? `for ${jar.setAsideFor}` : (kindWords[jar.kind] ?? jar.kind)),
    },
    { key: 'batch', title: 'batch', from: 'tablet', cell: (jar) => jar.batchCode },
    { key: 'state', title: 'state', cell: (jar) => jar.state },
    {
      key: 'place',
      title: 'place',
      cell: (jar) => (jar.shelf === null ? '' : `shelf ${jar.shelf}, place ${jar.place}`),
    },
    {
      key: 'next',
      title: 'asked for next',
      from: 'tablet',
      cell: (jar) => (jar.nextDueOn ? spokenDay(jar.nextDueOn) : ''),
    },
    {
      key: 'fill',
      title: 'fill',
      align: 'right',
      from: 'desk',
      cell: (jar) =>
        jar.grossG !== null && jar.tareG !== null ? (
          `${(jar.grossG - jar.tareG).toFixed(2)} g`
        ) : onWeigh && jar.state !== 'spent' ? (
          <Button kind="link" aria-label={`Weigh ${nameOf(jar)}`} onClick={() => onWeigh(jar)}>
            Weigh
          </Button>
        ) : (
          ''
        ),
    },
  ]
}

const kindWords: Record<string, string> = {
  watch: 'watch jar',
  measuring: 'measuring jar',
  spare: 'spare',
  retain: 'retain',
}

function nameOf(jar: JarRow): string {
  return namedJar(
    jar.code,
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw },
  )
}

function kindsSentence(jars: JarRow[]): string {
  const kinds = Object.entries(kindWords).flatMap(([kind, word]) => {
    const count = jars.filter((jar) => jar.kind === kind).length
    return count === 0 ? [] : [counted(count, word)]
  })
  const text = listed(kinds)
  return `${capital(text)}. A watch jar stays sealed to the end, a measuring jar is opened once.`
}

function stationsOf(jars: JarRow[]) {
  const groups = new Map<string, { key: string; name: string; jars: JarRow[] }>()
  for (const jar of jars) {
    const key = jar.studyStationId ?? jar.kind
    const group = groups.get(key) ?? { key, name: placeName(jar), jars: [] }
    group.jars.push(jar)
    groups.set(key, group)
  }
  return [...groups.values()]
}

function placeName(jar: JarRow): string {
  if (jar.studyStationId === null) return jar.kind === 'retain' ? 'Retains' : 'Opened at the start'
  return withVariant(stationPlace(jar), jar.variant ?? '')
}

function stationPlace(jar: JarRow): string {
  if (jar.isFreezeThaw) return `Freeze-thaw, ${jar.stationName}`
  return jar.temperatureC === null
    ? (jar.stationName ?? '')
    : `${degrees(jar.temperatureC)}, ${jar.stationName}`
}
