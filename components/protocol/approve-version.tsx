'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { send } from '@/lib/http/fetcher'
import { protocolKeys } from '@/lib/protocol/keys'

type Props = {
  code: string
  version: { number: number; version: number; createdBy: string }
  approver: string
  missing: string | null
}

/** QA's word on a plan before a study that is to carry a shelf life starts on it. */
export function ApproveVersion({ code, version, approver, missing }: Props) {
  const router = useRouter()
  const [isOpen, setIsOpen] = useState(false)
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const isAuthor = version.createdBy === approver

  async function approve() {
    setBusy(true)
    setError(null)
    try {
      await send(protocolKeys.approve(code, version.number), 'POST', { version: version.version })
      toast(`Version ${version.number} of ${code} is approved`)
      setIsOpen(false)
      router.refresh()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <>
      <Button
        why={isAuthor ? 'You wrote it, so someone else approves it.' : (missing ?? undefined)}
        onClick={() => setIsOpen(true)}
      >
        Approve this version
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title={`Approve version ${version.number} of ${code}?`}
        sentence="It is locked as it stands, and studies that start on it from now on may carry a signed shelf life."
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={busy} onClick={approve}>
              Approve it
            </Button>
          </>
        }
      >
        <ErrorNote error={error} />
      </Dialog>
    </>
  )
}
