'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { send } from '@/lib/http/fetcher'
import { pullKeys } from '@/lib/pull/keys'

/** A measuring jar rests closed before it is opened, unless it has its room's temperature already. */
export function TakeOut({ jar, onChange }: { jar: BenchJarPage; onChange: () => void }) {
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function takeOut() {
    setBusy(true)
    setError(null)
    try {
      await send(pullKeys.takeOut(jar.pullJarId), 'POST', { version: jar.version })
      onChange()
    } catch (refused) {
      setError(refused)
      setBusy(false)
    }
  }
  return (
    <div className="mx-4 mt-2 flex flex-wrap items-center justify-between gap-3 border-b-2 border-ink pb-3 sm:mx-7">
      <p className="min-w-0 flex-1">
        It rests closed for {jar.restHours} h first, unless it has the room’s temperature.
      </p>
      <Button density="bench" busy={isBusy} onClick={takeOut}>
        Taken out
      </Button>
      <ErrorNote error={error} />
    </div>
  )
}
