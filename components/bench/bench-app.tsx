'use client'

import { usePathname } from 'next/navigation'
import { useCallback, useEffect } from 'react'
import useSWR, { preload } from 'swr'
import { BenchDay } from '@/components/bench/bench-day'
import { JarScreen } from '@/components/bench/jar-screen'
import { useOutbox } from '@/components/device/use-outbox'
import { benchKeys } from '@/lib/bench/schema'
import type { Bench } from '@/lib/bench/queries/today'
import { fetcher } from '@/lib/http/fetcher'

export type BenchPerson = { personId: string; initials: string; mayLog: boolean; mayAddPhotos: boolean }

/**
 * The walk and the jars are one page: going from jar to jar needs no network, because the day's jars were
 * fetched when the day was.
 */
export function BenchApp({ person }: { person: BenchPerson }) {
  const path = usePathname()
  const code = path.startsWith('/bench/') ? decodeURIComponent(path.slice('/bench/'.length)) : null
  const { data: bench, mutate } = useSWR<Bench>(benchKeys.today, fetcher, { refreshInterval: 30_000 })
  const refresh = useCallback(() => void mutate(), [mutate])
  const outbox = useOutbox(refresh)

  useEffect(() => {
    if (!bench) return
    const open = bench.stations
      .flatMap((s) => s.jars)
      .filter((j) => j.state === 'due' || j.state === 'resting')
    for (const jar of open.slice(0, 60))
      void preload(benchKeys.jar(jar.code), fetcher)?.catch?.(() => undefined)
  }, [bench])

  if (!bench) return null
  return code === null ? (
    <BenchDay bench={bench} outbox={outbox} onOpen={openJar} />
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
