'use client'

import { useMemo, useState } from 'react'
import useSWR from 'swr'
import { useReadDrafts } from '@/components/device/use-read-drafts'
import { fetcher } from '@/lib/http/fetcher'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { formulaKey } from '@/lib/formula/keys'
import { FormulaEditor } from './formula-editor'
import { hasKeptDraft } from './use-draft'

export type FormulaPart = 'lines' | 'process' | 'batches' | 'versions'

type Props = { code: string; number?: number; part: FormulaPart; mayWrite: boolean }

/** Keeps the page fresh; a draft that someone else saved meanwhile is offered, never put under the hand. */
export function FormulaView({ code, number, part, mayWrite }: Props) {
  const { data, mutate } = useSWR<FormulaPage>(formulaKey(code, number), fetcher)
  const drafts = useReadDrafts()
  const [round, setRound] = useState(0)
  const versionId = data?.versionId
  // Asked once, not while typing: mounted anew only where a kept draft takes the place of what the server has.
  const isKept = useMemo(
    () => drafts !== null && versionId !== undefined && hasKeptDraft(versionId, drafts),
    [drafts, versionId],
  )
  if (!data) return null
  return (
    <FormulaEditor
      key={`${data.versionId} ${data.state} ${isKept && data.state === 'draft'} ${round}`}
      formula={data}
      part={part}
      mayWrite={mayWrite}
      drafts={drafts}
      onReload={async () => {
        await mutate()
        setRound((now) => now + 1)
      }}
      onSaved={() => void mutate()}
    />
  )
}
