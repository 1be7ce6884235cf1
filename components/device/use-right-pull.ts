'use client'

import { useCallback, useEffect, useRef } from 'react'
import { useSWRConfig } from 'swr'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { pagesByCode, pageToShow, type KnownDays } from './bench-data'
import { useDevice } from './device-context'

/**
 * Without network, a jar that is asked for in two pulls is shown in the second once what waits here settles the first, as
 * the server would show it. The one on screen stays: something may still be asked of it.
 */
export function useRightPull(openCode: string | null) {
  const device = useDevice()
  const { cache, fallback, mutate } = useSWRConfig()
  const known = useRef(new Map<string, BenchJarPage[]>())
  const know = useCallback((days: KnownDays) => (known.current = pagesByCode(days)), [])
  const shown = useCallback(
    (key: string): unknown => cache.get(key)?.data ?? fallback[key],
    [cache, fallback],
  )
  const toShow = useCallback(
    (pages: readonly BenchJarPage[]) =>
      pageToShow(pages, shown(benchKeys.today) as Bench | undefined, device?.outbox.state().items ?? []),
    [device, shown],
  )

  useEffect(() => {
    if (!device) return
    const show = () => {
      if (device.outbox.state().isOnline) return
      for (const [code, pages] of known.current) {
        if (pages.length === 1 || code === openCode) continue
        const key = benchKeys.jar(code)
        const page = toShow(pages)
        if ((shown(key) as BenchJarPage | undefined)?.pullJarId !== page.pullJarId)
          void mutate(key, page, { revalidate: false })
      }
    }
    show()
    return device.outbox.onChange(show)
  }, [device, mutate, openCode, shown, toShow])

  return { know, toShow }
}
