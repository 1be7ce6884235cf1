'use client'

import { useState } from 'react'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { ClientError, fetcher } from '@/lib/http/fetcher'
import { readJarCode } from '@/lib/jar/rules/code'

export const notACode =
  'That is no jar’s code: five signs, the last one checks the others. Read the label again.'
export const notOnDevice = (code: string) =>
  `Jar ${code} is not among the jars on this device, and without network nothing more is known of it.`

/** A jar that is called up by its code; one that is not asked for says which it is and where it belongs. */
export function useCalledJar(bench: Bench, onOpen: (code: string) => void) {
  const [error, setError] = useState<string | undefined>()
  const [isBusy, setBusy] = useState(false)

  async function call(given: string) {
    const code = readJarCode(given)
    if (!code) {
      setError(notACode)
      return
    }
    setError(undefined)
    if (bench.stations.some((s) => s.jars.some((j) => j.code === code))) return onOpen(code)
    setBusy(true)
    try {
      await fetcher(benchKeys.jar(code))
      onOpen(code)
    } catch (refused) {
      setError(refused instanceof ClientError && refused.status !== 0 ? refused.sentence : notOnDevice(code))
    } finally {
      setBusy(false)
    }
  }

  return { call, error, isBusy, forget: () => setError(undefined) }
}
