import { useEffect, useRef } from 'react'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/keys'

/**
 * Others see who has the jar open. Without network, or with the jar in other hands, one may still go on. Gives the version
 * of the jar: opening counts as a change of it, and as it is shown it may still be the one before.
 */
export function useOpening(jar: BenchJarPage, mayType: boolean, onChange: () => void): () => Promise<number> {
  const opening = useRef<Promise<number> | null>(null)
  useEffect(() => {
    if (mayType && jar.state === 'due' && !jar.openedBy)
      opening.current = send<{ version: number }>(pullKeys.open(jar.pullJarId), 'POST', {
        version: jar.version,
      }).then(
        (opened) => {
          onChange()
          return opened.version
        },
        () => jar.version,
      )
    // Once per jar: its screen is keyed by the jar in its pull.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [])
  return async () => Math.max(jar.version, (await opening.current) ?? 0)
}
