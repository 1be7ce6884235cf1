'use client'

import { useState } from 'react'
import useSWR from 'swr'
import type { BenchPerson } from '@/components/device/last-person'
import { notACode, notOnDevice } from '@/components/bench/use-called-jar'
import { MissDialog } from '@/components/bench/miss-dialog'
import { nextJar } from '@/components/bench/next-jar'
import { OpenJar } from '@/components/bench/open-jar'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { useReadDrafts } from '@/components/device/use-read-drafts'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { ClientError, fetcher } from '@/lib/http/fetcher'
import { readJarCode } from '@/lib/jar/rules/code'

export type JarScreenProps = {
  code: string
  bench: Bench
  person: BenchPerson
  outbox: OutboxOnScreen
  onOpen: (code: string) => void
  onWalk: () => void
  onChange: () => void
}

/** One jar: what is asked of it, typed by gloved hands, judged while it is typed, kept with one press. */
export function JarScreen({ code, onChange, ...rest }: JarScreenProps) {
  const { data: jar, error: unread, mutate } = useSWR<BenchJarPage>(benchKeys.jar(code), fetcher)
  // A field that is in hand before the device was read would take the place of the one that was left.
  const isRead = useReadDrafts() !== null
  // Asked above the jar: noted as not read it is shown in its next pull, while what follows is still being chosen.
  const [missing, setMissing] = useState<{ jar: BenchJarPage; versionNow: () => Promise<number> } | null>(
    null,
  )
  if (!jar || !isRead)
    return (
      <div className="mx-auto flex max-w-[820px] flex-col gap-5 p-5">
        {unread ? (
          <ErrorNote error={saidOf(unread, code)} />
        ) : (
          <p role="status">The jar is being looked up.</p>
        )}
        <Button density="bench" onClick={rest.onWalk}>
          Back to the walk
        </Button>
      </div>
    )
  function change() {
    void mutate()
    onChange()
  }

  function missed(name: string, substitute: string | undefined) {
    setMissing(null)
    change()
    if (substitute !== undefined) return rest.onOpen(substitute)
    toast(`${name} is noted as not read.`, { density: 'bench' })
    const next = nextJar(rest.bench, code, rest.outbox)
    if (next) rest.onOpen(next.code)
    else rest.onWalk()
  }

  return (
    <>
      <OpenJar
        key={jar.pullJarId}
        jar={jar}
        {...rest}
        onChange={change}
        onMiss={(versionNow) => setMissing({ jar, versionNow })}
      />
      {missing ? (
        <MissDialog
          {...missing}
          onClose={() => setMissing(null)}
          onDone={(substitute) => missed(missing.jar.name, substitute)}
        />
      ) : null}
    </>
  )
}

/** Without network a jar is known where the days that this device keeps ask for it. */
function saidOf(unread: unknown, code: string): unknown {
  if (!(unread instanceof ClientError) || unread.status !== 0) return unread
  return readJarCode(code) ? notOnDevice(code) : notACode
}
