'use client'

import useSWR from 'swr'
import type { BenchPerson } from '@/components/device/last-person'
import { OpenJar } from '@/components/bench/open-jar'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { fetcher } from '@/lib/http/fetcher'

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
  if (!jar)
    return (
      <div className="mx-auto flex max-w-[820px] flex-col gap-5 p-5">
        {unread ? <ErrorNote error={unread} /> : <p role="status">The jar is being looked up.</p>}
        <Button density="bench" onClick={rest.onWalk}>
          Back to the walk
        </Button>
      </div>
    )
  return (
    <OpenJar
      key={jar.pullJarId}
      jar={jar}
      {...rest}
      onChange={() => {
        void mutate()
        onChange()
      }}
    />
  )
}
