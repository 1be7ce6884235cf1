'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { heatWeight } from '@/components/marks/heat'
import { FillDialog } from '@/components/jar/fill-dialog'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import type { JarRow } from '@/lib/jar/queries/jars'
import type { ListQuery } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'
import type { StudyJarsPage } from '@/lib/study/queries/jars'
import { fillOf, jarList, kindWords, nameOf, stationOf } from '@/lib/study/rules/jar-list'
import { capital, counted, listed } from '@/lib/study/rules/words'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = {
  page: StudyJarsPage
  query: ListQuery
  rights: StudyRights
  mayLog: boolean
  timeZone: string
}

/** Every jar of a study where it stands, with its label sheet. */
export function StudyJars({ page, query, rights, mayLog, timeZone }: Props) {
  const router = useRouter()
  const [weighed, setWeighed] = useState<JarRow | null>(null)
  const { study, counts } = page
  const path = `/studies/${encodeURIComponent(study.code)}/jars`
  return (
    <>
      <StudyHeading
        study={study}
        batches={page.batches}
        part="jars"
        rights={rights}
        headline={[
          { text: `${grouped(counts.standing, 0)} of ${grouped(counts.all, 0)}`, isStrong: true },
          { text: ' jars still stand at their stations', isStrong: false },
        ]}
        sentence={kindsSentence(counts.kinds)}
        acts={
          <LinkButton href={`/studies/${encodeURIComponent(study.code)}/labels`} kind="primary">
            Print the labels
          </LinkButton>
        }
      />
      <div className="mt-5">
        <ListTools
          list={jarList}
          path={path}
          query={query}
          choices={page.choices}
          searchLabel="Find a jar of this study"
          placeholder="Jar, batch, station"
          total={page.total}
        />
      </div>
      <div className="mt-3">
        <ListLedger
          list={jarList}
          path={path}
          query={query}
          page={page}
          caption={`Jars of ${study.code}`}
          timeZone={timeZone}
          rowKey={(jar) => jar.id}
          isQuiet={(jar) => jar.state === 'spent' || jar.state === 'lost'}
          before={[glyph]}
          cells={cellsFor(mayLog ? setWeighed : null)}
          empty={
            <Empty
              title={query.q ? `No jar of ${study.code} has ${query.q}.` : 'No jar is of that kind.'}
              sentence="The search looks in codes of jars and batches and in the names of stations."
              act={<LinkButton href={path}>Show all its jars</LinkButton>}
            />
          }
        />
      </div>
      {weighed ? (
        <FillDialog jar={weighed} onClose={() => setWeighed(null)} onDone={() => router.refresh()} />
      ) : null}
    </>
  )
}

const glyph = {
  key: 'glyph',
  title: <span className="sr-only">Drawing</span>,
  width: '34px',
  cell: (jar: JarRow) => (
    <JarGlyph
      height={22}
      kind={jar.kind as 'watch'}
      state={jar.state === 'spent' ? 'spent' : jar.state === 'lost' ? 'broken' : 'drawn'}
    />
  ),
}

function cellsFor(
  onWeigh: ((jar: JarRow) => void) | null,
): Parameters<typeof ListLedger<JarRow>>[0]['cells'] {
  return {
    code: {
      cell: (jar) => (
        <span id={jar.code} className="font-mono font-600 target:bg-ink target:px-1 target:text-onink">
          {nameOf(jar)}
        </span>
      ),
    },
    batch: { from: 'tablet' },
    station: {
      from: 'tablet',
      cell: (jar) => (
        <span
          className="whitespace-nowrap"
          style={{
            fontWeight: jar.temperatureC === null || jar.isFreezeThaw ? 430 : heatWeight(jar.temperatureC),
          }}
        >
          {stationOf(jar)}
        </span>
      ),
    },
    next: { from: 'tablet' },
    fill: {
      from: 'desk',
      cell: (jar) => {
        const fill = fillOf(jar)
        if (fill !== null) return grouped(fill, 2)
        return onWeigh && jar.state !== 'spent' ? (
          <Button kind="link" aria-label={`Weigh ${nameOf(jar)}`} onClick={() => onWeigh(jar)}>
            Weigh
          </Button>
        ) : (
          ''
        )
      },
    },
  }
}

function kindsSentence(kinds: StudyJarsPage['counts']['kinds']): string {
  const texts = Object.entries(kindWords).flatMap(([kind, word]) => {
    const count = kinds.find((one) => one.kind === kind)?.count ?? 0
    return count === 0 ? [] : [counted(count, word)]
  })
  return `${capital(listed(texts))}. A watch jar stays sealed to the end, a measuring jar is opened once.`
}
