'use client'

import { usePathname } from 'next/navigation'
import { BenchDay } from '@/components/bench/bench-day'
import { JarScreen } from '@/components/bench/jar-screen'
import { UndoBar } from '@/components/bench/undo-bar'
import { useBenchData } from '@/components/device/use-bench-data'
import { useRememberPerson, type BenchPerson } from '@/components/device/last-person'
import { useOutbox } from '@/components/device/use-outbox'

/**
 * The walk and the jars are one page: going from jar to jar needs no network, because the day's jars were
 * fetched when the day was.
 */
export function BenchApp({ person }: { person: BenchPerson }) {
  const path = usePathname()
  const code = path.startsWith('/bench/') ? decodeURIComponent(path.slice('/bench/'.length)) : null
  const { bench, refresh } = useBenchData(code)
  const outbox = useOutbox(refresh)
  useRememberPerson(person)

  if (!bench)
    return (
      <p role="status" className="p-5">
        The Bench is being looked up.
      </p>
    )
  return (
    <>
      <UndoBar outbox={outbox} onOpen={openJar} onChange={refresh} />
      {code === null ? (
        <BenchDay bench={bench} person={person} outbox={outbox} onOpen={openJar} onChange={refresh} />
      ) : (
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
