'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { FollowsList } from '@/components/bench/follows-list'
import { MissDialog } from '@/components/bench/miss-dialog'
import { Button } from '@/components/ui/button'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { fetcher } from '@/lib/http/fetcher'
import type { WhatFollows } from '@/lib/pull/queries/what-follows'
import { pullKeys } from '@/lib/pull/keys'

/** A jar that was not read: what that means, and still the choice of another in its place. */
export function MissedFollows({
  jar,
  onOpen,
  onWalk,
}: {
  jar: BenchJarPage
  onOpen: (code: string) => void
  onWalk: () => void
}) {
  const { data } = useSWR<WhatFollows>(pullKeys.standIn(jar.pullJarId), fetcher)
  if (!data) return null
  return (
    <FollowsList
      jar={jar}
      follows={data}
      onTaken={(code) => (code === undefined ? onWalk() : onOpen(code))}
      onNone={onWalk}
    />
  )
}

/** A jar whose window is still to come: it can be pulled early, with the reason. */
export function EarlyAct({ jar, onChange }: { jar: BenchJarPage; onChange: () => void }) {
  const [isOpen, setOpen] = useState(false)
  return (
    <>
      <Button density="bench" onClick={() => setOpen(true)}>
        Read it early
      </Button>
      {isOpen ? (
        <MissDialog
          jar={jar}
          versionNow={() => Promise.resolve(jar.version)}
          isEarly
          onClose={() => setOpen(false)}
          onDone={() => {
            setOpen(false)
            onChange()
          }}
        />
      ) : null}
    </>
  )
}
