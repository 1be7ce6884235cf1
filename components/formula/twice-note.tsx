'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { findTwice, joinLines } from '@/lib/formula/rules/twice'
import type { TypedLine } from '@/lib/formula/rules/typed'

type Props = { lines: TypedLine[]; onLines: (next: (lines: TypedLine[]) => TypedLine[]) => void }

/** The same ingredient twice in a phase may be meant, or a slip: it is asked about, not refused. */
export function TwiceNote({ lines, onLines }: Props) {
  const [meant, setMeant] = useState<string[]>([])
  const asked = findTwice(lines).filter(({ ids }) => !meant.includes(ids.join()))
  return asked.map(({ phase, inciName, ids }) => {
    const joined = joinLines(lines, ids)
    return (
      <div key={ids.join()} role="status" className="mt-3 border-l-4 border-ink py-0.5 pl-3">
        <p className="font-650">
          {inciName} stands {ids.length === 2 ? 'twice' : `${ids.length} times`} in phase {phase}. Is that
          meant?
        </p>
        <div className="mt-1.5 flex flex-wrap gap-2">
          <Button
            why={joined ? undefined : 'A share of it cannot be read yet.'}
            onClick={() => onLines((now) => joinLines(now, ids) ?? now)}
          >
            Join into one line
          </Button>
          <Button onClick={() => setMeant((now) => [...now, ids.join()])}>Leave as they are</Button>
        </div>
      </div>
    )
  })
}
