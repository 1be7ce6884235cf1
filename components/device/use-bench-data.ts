'use client'

import { useCallback, useEffect, useRef, useState } from 'react'
import useSWR, { useSWRConfig } from 'swr'
import type { BenchDays } from '@/lib/bench/queries/days'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { ClientError, fetcher } from '@/lib/http/fetcher'
import { benchOn, labDayHere, type KnownDays } from './bench-data'
import { useDevice } from './device-context'
import { keepStartPhotos } from './start-photo'
import { useRightPull } from './use-right-pull'

/** Others' entries appear within five seconds. */
const askEveryMs = 3_500
const daysEveryMs = 120_000

/**
 * The Bench as the server has it, or as it was when the network went: the pages of the coming days' jars are fetched in one
 * go and kept on the device. One number is asked for every few seconds, and only when it is another the Bench is.
 */
export function useBenchData(openCode: string | null) {
  const device = useDevice()
  const { cache, fallback, mutate } = useSWRConfig()
  const revision = useRef<string | null>(null)
  const daysReadAt = useRef(0)
  const [areDaysKept, setDaysKept] = useState(false)
  const { data: bench } = useSWR<Bench>(benchKeys.today, null)
  const code = useRef(openCode)
  useEffect(() => {
    code.current = openCode
  })

  const { know, toShow } = useRightPull(openCode)
  const showPages = useCallback(
    (days: KnownDays, isNewer: boolean) => {
      for (const [jarCode, pages] of know(days)) {
        const key = benchKeys.jar(jarCode)
        const isKnown = cache.get(key)?.data !== undefined || fallback[key] !== undefined
        if (isNewer || !isKnown) void mutate(key, toShow(pages), { revalidate: false })
      }
    },
    [cache, fallback, mutate, know, toShow],
  )

  const showBench = useCallback(
    async (read: Bench) => {
      await mutate(benchKeys.today, read, { revalidate: false })
      device?.outbox.noteRead(read.now)
      await device?.store.keepData('bench', { readAt: read.now, data: read }).catch(() => undefined)
    },
    [device, mutate],
  )

  const readDays = useCallback(async () => {
    if (!device) return
    const { revision: now, bench: read, ...days } = await fetcher<BenchDays>(benchKeys.days, device.personId)
    revision.current = now
    daysReadAt.current = Date.now()
    showPages(days, true)
    await showBench(read)
    await device.store
      .keepData('days', { readAt: read.now, data: days })
      .then(() => setDaysKept(true))
      .catch(() => undefined)
    // Beside everything else: a jar is read without its picture too.
    void keepStartPhotos(device.store, days.jars, device.personId).catch(() => undefined)
  }, [device, showBench, showPages])

  const readBench = useCallback(async () => {
    if (!device) return
    if (Date.now() - daysReadAt.current > daysEveryMs) return readDays()
    await showBench(await fetcher<Bench>(benchKeys.today, device.personId))
    if (code.current) await mutate(benchKeys.jar(code.current))
  }, [device, mutate, readDays, showBench])

  /** Tells the outbox what it found out about the network and the session. */
  const ask = useCallback(
    async (what: () => Promise<unknown>) => {
      try {
        await what()
        device?.outbox.noteReached(true)
      } catch (thrown) {
        if (thrown instanceof ClientError) device?.outbox.noteRefused(thrown)
      }
    },
    [device],
  )

  // What the device knows, then what the server does.
  useEffect(() => {
    if (!device) return
    void (async () => {
      const [kept, days] = await Promise.all([
        device.store.findData('bench').catch(() => undefined),
        device.store.findData('days').catch(() => undefined),
        device.outbox.ready,
      ])
      if (days) showPages(days.data as KnownDays, false)
      if (kept && fallback[benchKeys.today] === undefined) {
        const read = kept.data as Bench
        const today = labDayHere(read.zone)
        await mutate(benchKeys.today, days ? benchOn(today, read, days.data as KnownDays) : read, {
          revalidate: false,
        })
        device.outbox.noteRead(kept.readAt)
      }
      await ask(readDays)
    })()
  }, [device, fallback, mutate, showPages, readDays, ask])

  useEffect(() => {
    if (!device) return
    let isAsking = false
    const timer = setInterval(() => {
      if (isAsking || document.visibilityState !== 'visible') return
      isAsking = true
      void ask(async () => {
        const now = await fetcher<{ revision: string; today: string }>(benchKeys.revision, device.personId)
        const text = `${now.today} ${now.revision}`
        if (revision.current === text) return
        revision.current = text
        await readBench()
      }).finally(() => (isAsking = false))
    }, askEveryMs)
    return () => clearInterval(timer)
  }, [device, ask, readBench])

  return { bench, areDaysKept, refresh: useCallback(() => ask(readBench), [ask, readBench]) }
}
