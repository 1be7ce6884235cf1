'use client'

import { useMemo, useState, useSyncExternalStore } from 'react'
import useSWR from 'swr'
import { fetcher } from '@/lib/http/fetcher'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { formulaKey } from '@/lib/formula/keys'
import { FormulaEditor } from './formula-editor'
import { hasKeptDraft } from './use-draft'

export type FormulaPart = 'lines' | 'process' | 'batches' | 'versions'

type Props = { code: string; number?: number; part: FormulaPart; personId: string; mayWrite: boolean }

/** Keeps the page fresh; a draft that someone else saved meanwhile is offered, never put under the hand. */
export function FormulaView({ code, number, part, personId, mayWrite }: Props) {
  const { data, mutate } = useSWR<FormulaPage>(formulaKey(code, number), fetcher)
  const isClient = useSyncExternalStore(noChange, yes, no)
  const [round, setRound] = useState(0)
  const versionId = data?.versionId
  // Asked once, not while typing: mounted anew only where a kept draft takes the place of what the server has.
  const isKept = useMemo(
    () => isClient && versionId !== undefined && hasKeptDraft(versionId, personId),
    [isClient, versionId, personId],
  )
  if (!data) return null
  return (
    <FormulaEditor
      key={`${data.versionId} ${data.state} ${isKept && data.state === 'draft'} ${round}`}
      formula={data}
      part={part}
      personId={personId}
      mayWrite={mayWrite}
      isClient={isClient}
      onReload={async () => {
        await mutate()
        setRound((now) => now + 1)
      }}
      onSaved={() => void mutate()}
    />
  )
}

const noChange = () => () => undefined
const yes = () => true
const no = () => false
