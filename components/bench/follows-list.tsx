'use client'

import { useState } from 'react'
import { useOutbox } from '@/components/device/use-outbox'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import { newId } from '@/lib/db/id'
import type { Substitute, WhatFollows } from '@/lib/pull/queries/what-follows'
import { pullKeys } from '@/lib/pull/keys'

type Props = {
  jar: Pick<BenchJar, 'name' | 'code' | 'pullJarId'>
  follows: WhatFollows
  /** With its code; without one while that waits on this device, where the jar is not asked for yet. */
  onTaken: (code?: string) => void
  onNone: () => void
}

/** What a jar that is not read means for its trends, and the spares and retains that could be read instead. */
export function FollowsList({ jar, follows, onTaken, onNone }: Props) {
  const { items, send } = useOutbox()
  const [error, setError] = useState<unknown>(null)
  const [taking, setTaking] = useState<string | null>(null)
  const url = pullKeys.standIn(jar.pullJarId)
  const waiting = items.find((item) => item.url === url)
  const chosen = follows.substitutes.find((one) => one.jarId === waiting?.body['jarId'])

  async function take({ jarId, code, name }: Substitute) {
    setTaking(jarId)
    setError(null)
    try {
      const { how } = await send({
        url,
        body: { id: newId(), jarId },
        about: {
          ...{ kind: 'missed', label: `Jar ${jar.name}`, code: jar.code, pullJarId: jar.pullJarId },
          ...{ what: `${name} takes its place`, href: `/bench/${jar.code}` },
        },
      })
      if (how === 'sent') return onTaken(code)
      toast(`${name} takes the place of ${jar.name}`, {
        density: 'bench',
        detail: 'Kept on this tablet; it is asked for once that is sent.',
      })
      onTaken()
    } catch (refused) {
      setError(refused)
      setTaking(null)
    }
  }

  return (
    <div className="flex flex-col gap-4">
      {follows.sentences.map((sentence) => (
        <p key={sentence} className="text-20">
          {sentence}
        </p>
      ))}
      {follows.takenBy ? <p className="text-20">Jar {follows.takenBy.code} takes its place.</p> : null}
      {waiting ? (
        <p className="text-20">
          {chosen ? `Jar ${chosen.name}` : 'Another jar'} takes its place: kept on this tablet, not sent yet.
        </p>
      ) : follows.substitutes.length > 0 ? (
        <>
          <h3 className="text-20 font-650">Or read another jar in its place</h3>
          <ul className="flex flex-col gap-3">
            {follows.substitutes.slice(0, 4).map((one) => (
              <li key={one.jarId}>
                <button
                  type="button"
                  aria-busy={taking === one.jarId || undefined}
                  onClick={() => (taking === null ? void take(one) : undefined)}
                  className="flex min-h-16 w-full items-center gap-4 rounded border-2 border-rule bg-paper px-3 py-2 text-left"
                >
                  <JarGlyph height={40} state="due" />
                  <b className="font-mono text-26">{one.name}</b>
                  <span className="text-17">
                    {one.kind === 'spare' ? 'spare' : 'retain, kept elsewhere: its readings will be doubted'}
                    {one.shelf === null ? '' : `, shelf ${one.shelf}, place ${one.place}`}
                  </span>
                </button>
              </li>
            ))}
          </ul>
        </>
      ) : follows.takenBy ? null : (
        <p className="text-17 text-soft">No spare and no retain is left to read in its place.</p>
      )}
      <ErrorNote error={error} />
      <Button density="bench" className="self-end" onClick={onNone}>
        {follows.substitutes.length > 0 && !waiting ? 'Leave it unread' : 'Back to the walk'}
      </Button>
    </div>
  )
}
