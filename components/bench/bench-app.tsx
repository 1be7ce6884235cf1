'use client'

import { usePathname } from 'next/navigation'
import { Suspense, useState } from 'react'
import { BenchDay } from '@/components/bench/bench-day'
import { JarScreen, loadAhead } from '@/components/bench/later'
import { UndoBar } from '@/components/bench/undo-bar'
import { useBenchData } from '@/components/device/use-bench-data'
import { useRememberPerson, type BenchPerson } from '@/components/device/last-person'
import { useOutbox } from '@/components/device/use-outbox'
import { useReady } from '@/components/device/use-ready'
import { useLoadAhead } from '@/components/ui/load-ahead'
import { readSegment } from '@/lib/address/rules'

/**
 * The walk and the jars are one page: going from jar to jar needs no network, because the day's jars were
 * fetched when the day was.
 */
export function BenchApp({ person }: { person: BenchPerson }) {
  const path = usePathname()
  const code = path.startsWith('/bench/') ? readSegment(path.slice('/bench/'.length)) : null
  const { bench, areDaysKept, refresh } = useBenchData(code)
  const isReady = useReady(areDaysKept)
  const outbox = useOutbox(refresh)
  const [called, setCalled] = useState<string | null>(null)
  useRememberPerson(person)
  useLoadAhead(loadAhead)

  if (!bench)
    return (
      <p role="status" className="p-5">
        The Bench is being looked up.
      </p>
    )
  return (
    <>
      <UndoBar
        outbox={outbox}
        onOpen={openJar}
        onCall={(jarCode) => {
          setCalled(jarCode)
          if (code !== null) openWalk()
        }}
        onChange={refresh}
      />
      {code === null ? (
        <BenchDay
          bench={bench}
          person={person}
          outbox={outbox}
          isReady={isReady}
          called={called}
          onCalled={setCalled}
          onOpen={(jarCode) => {
            setCalled(null)
            openJar(jarCode)
          }}
          onChange={refresh}
        />
      ) : (
        <Suspense fallback={<p role="status">The jar is being looked up.</p>}>
          <JarScreen
            key={code}
            code={code}
            bench={bench}
            person={person}
            outbox={outbox}
            onOpen={openJar}
            onWalk={openWalk}
            onChange={refresh}
          />
        </Suspense>
      )}
    </>
  )
}

// pushState instead of a navigation: the address is right, and nothing is fetched.
function openJar(code: string): void {
  window.history.pushState(null, '', `/bench/${encodeURIComponent(code)}`)
  window.scrollTo(0, 0)
}

function openWalk(): void {
  window.history.pushState(null, '', '/bench')
  window.scrollTo(0, 0)
}
