'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { useSWRConfig } from 'swr'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { send } from '@/lib/http/fetcher'
import type { StudyStationRow } from '@/lib/study/queries/head'
import type { ShownStudy } from '@/lib/study/queries/sheet'
import { studyKeys } from '@/lib/study/keys'
import { AmendDialog } from './amend-dialog'

/** What a formulator does with a running study as a whole. */
export function StudyActs({ study, stations }: { study: ShownStudy; stations: StudyStationRow[] }) {
  const [isEnding, setIsEnding] = useState(false)
  const [isAmending, setIsAmending] = useState(false)
  if (study.state !== 'running') return null
  return (
    <>
      <Button kind="link" onClick={() => setIsAmending(true)}>
        Amend the study
      </Button>
      {isAmending ? (
        <AmendDialog study={study} stations={stations} onClose={() => setIsAmending(false)} />
      ) : null}
      <Button kind="link" onClick={() => setIsEnding(true)}>
        End the study
      </Button>
      <EndDialog study={study} isOpen={isEnding} onClose={() => setIsEnding(false)} />
    </>
  )
}

function EndDialog({ study, isOpen, onClose }: { study: ShownStudy; isOpen: boolean; onClose: () => void }) {
  const router = useRouter()
  const { mutate } = useSWRConfig()
  const [reason, setReason] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)

  async function end() {
    setBusy(true)
    setError(null)
    try {
      await send(studyKeys.end(study.code), 'POST', { version: study.version, reason })
      await mutate(studyKeys.sheet(study.code))
      router.refresh()
      toast(`${study.code} has ended`)
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen={isOpen}
      onClose={onClose}
      title={`End ${study.code}?`}
      sentence="Nothing is pulled or logged any more. All that was read stays."
      acts={
        <>
          <Button onClick={onClose}>Leave it running</Button>
          <Button kind="danger-asked" busy={busy} onClick={end}>
            End it
          </Button>
        </>
      }
    >
      <TextArea label="Reason" value={reason} onText={setReason} rows={2} />
      <ErrorNote error={error} />
    </Dialog>
  )
}
