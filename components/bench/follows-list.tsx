'use client'

import { useState } from 'react'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'
import type { Substitute, WhatFollows } from '@/lib/pull/queries/what-follows'
import { pullKeys } from '@/lib/pull/keys'

type Props = {
  pullJarId: string
  follows: WhatFollows
  onTaken: (code: string) => void
  onNone: () => void
}

/** What a jar that is not read means for its trends, and the spares and retains that could be read instead. */
export function FollowsList({ pullJarId, follows, onTaken, onNone }: Props) {
  const [error, setError] = useState<unknown>(null)
  const [taking, setTaking] = useState<string | null>(null)

  async function take({ jarId }: Substitute) {
    setTaking(jarId)
    setError(null)
    try {
      const { code } = await send<{ code: string }>(pullKeys.standIn(pullJarId), 'POST', {
        id: newId(),
        jarId,
      })
      onTaken(code)
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
      {follows.substitutes.length > 0 ? (
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
        {follows.substitutes.length > 0 ? 'Leave it unread' : 'Back to the walk'}
      </Button>
    </div>
  )
}
